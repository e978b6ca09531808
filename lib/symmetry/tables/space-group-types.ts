/**
 * The 230 space-group types in their reference settings (monoclinic unique axis b, cell choice 1; origin choice 2;
 * hexagonal axes for R): one line per type in the order of their numbers,
 * `Schoenflies|Hermann-Mauguin|Hall|full Hermann-Mauguin`, the last only where it differs. A colon marks the choice of
 * origin or axes; monoclinic symbols name all three directions.
 *
 * Source: IUCr core CIF dictionary, `templ_enum.cif` version 1.4.9 (2025), save frame `ref_set`, CC BY 4.0. The full
 * symbols are not in it; they were computed from the operations, and a test computes them again.
 */
export const SPACE_GROUP_TYPES = `
C1^1|P 1|P 1
Ci^1|P -1|-P 1
C2^1|P 1 2 1|P 2y
C2^2|P 1 21 1|P 2yb
C2^3|C 1 2 1|C 2y
Cs^1|P 1 m 1|P -2y
Cs^2|P 1 c 1|P -2yc
Cs^3|C 1 m 1|C -2y
Cs^4|C 1 c 1|C -2yc
C2h^1|P 1 2/m 1|-P 2y
C2h^2|P 1 21/m 1|-P 2yb
C2h^3|C 1 2/m 1|-C 2y
C2h^4|P 1 2/c 1|-P 2yc
C2h^5|P 1 21/c 1|-P 2ybc
C2h^6|C 1 2/c 1|-C 2yc
D2^1|P 2 2 2|P 2 2
D2^2|P 2 2 21|P 2c 2
D2^3|P 21 21 2|P 2 2ab
D2^4|P 21 21 21|P 2ac 2ab
D2^5|C 2 2 21|C 2c 2
D2^6|C 2 2 2|C 2 2
D2^7|F 2 2 2|F 2 2
D2^8|I 2 2 2|I 2 2
D2^9|I 21 21 21|I 2b 2c
C2v^1|P m m 2|P 2 -2
C2v^2|P m c 21|P 2c -2
C2v^3|P c c 2|P 2 -2c
C2v^4|P m a 2|P 2 -2a
C2v^5|P c a 21|P 2c -2ac
C2v^6|P n c 2|P 2 -2bc
C2v^7|P m n 21|P 2ac -2
C2v^8|P b a 2|P 2 -2ab
C2v^9|P n a 21|P 2c -2n
C2v^10|P n n 2|P 2 -2n
C2v^11|C m m 2|C 2 -2
C2v^12|C m c 21|C 2c -2
C2v^13|C c c 2|C 2 -2c
C2v^14|A m m 2|A 2 -2
C2v^15|A e m 2|A 2 -2b
C2v^16|A m a 2|A 2 -2a
C2v^17|A e a 2|A 2 -2ab
C2v^18|F m m 2|F 2 -2
C2v^19|F d d 2|F 2 -2d
C2v^20|I m m 2|I 2 -2
C2v^21|I b a 2|I 2 -2c
C2v^22|I m a 2|I 2 -2a
D2h^1|P m m m|-P 2 2|P 2/m 2/m 2/m
D2h^2|P n n n:2|-P 2ab 2bc|P 2/n 2/n 2/n
D2h^3|P c c m|-P 2 2c|P 2/c 2/c 2/m
D2h^4|P b a n:2|-P 2ab 2b|P 2/b 2/a 2/n
D2h^5|P m m a|-P 2a 2a|P 21/m 2/m 2/a
D2h^6|P n n a|-P 2a 2bc|P 2/n 21/n 2/a
D2h^7|P m n a|-P 2ac 2|P 2/m 2/n 21/a
D2h^8|P c c a|-P 2a 2ac|P 21/c 2/c 2/a
D2h^9|P b a m|-P 2 2ab|P 21/b 21/a 2/m
D2h^10|P c c n|-P 2ab 2ac|P 21/c 21/c 2/n
D2h^11|P b c m|-P 2c 2b|P 2/b 21/c 21/m
D2h^12|P n n m|-P 2 2n|P 21/n 21/n 2/m
D2h^13|P m m n:2|-P 2ab 2a|P 21/m 21/m 2/n
D2h^14|P b c n|-P 2n 2ab|P 21/b 2/c 21/n
D2h^15|P b c a|-P 2ac 2ab|P 21/b 21/c 21/a
D2h^16|P n m a|-P 2ac 2n|P 21/n 21/m 21/a
D2h^17|C m c m|-C 2c 2|C 2/m 2/c 21/m
D2h^18|C m c e|-C 2ac 2|C 2/m 2/c 21/e
D2h^19|C m m m|-C 2 2|C 2/m 2/m 2/m
D2h^20|C c c m|-C 2 2c|C 2/c 2/c 2/m
D2h^21|C m m e|-C 2a 2|C 2/m 2/m 2/e
D2h^22|C c c e:2|-C 2a 2ac|C 2/c 2/c 2/e
D2h^23|F m m m|-F 2 2|F 2/m 2/m 2/m
D2h^24|F d d d:2|-F 2uv 2vw|F 2/d 2/d 2/d
D2h^25|I m m m|-I 2 2|I 2/m 2/m 2/m
D2h^26|I b a m|-I 2 2c|I 2/b 2/a 2/m
D2h^27|I b c a|-I 2b 2c|I 21/b 21/c 21/a
D2h^28|I m m a|-I 2b 2|I 21/m 21/m 21/a
C4^1|P 4|P 4
C4^2|P 41|P 4w
C4^3|P 42|P 4c
C4^4|P 43|P 4cw
C4^5|I 4|I 4
C4^6|I 41|I 4bw
S4^1|P -4|P -4
S4^2|I -4|I -4
C4h^1|P 4/m|-P 4
C4h^2|P 42/m|-P 4c
C4h^3|P 4/n:2|-P 4a
C4h^4|P 42/n:2|-P 4bc
C4h^5|I 4/m|-I 4
C4h^6|I 41/a:2|-I 4ad
D4^1|P 4 2 2|P 4 2
D4^2|P 4 21 2|P 4ab 2ab
D4^3|P 41 2 2|P 4w 2c
D4^4|P 41 21 2|P 4abw 2nw
D4^5|P 42 2 2|P 4c 2
D4^6|P 42 21 2|P 4n 2n
D4^7|P 43 2 2|P 4cw 2c
D4^8|P 43 21 2|P 4nw 2abw
D4^9|I 4 2 2|I 4 2
D4^10|I 41 2 2|I 4bw 2bw
C4v^1|P 4 m m|P 4 -2
C4v^2|P 4 b m|P 4 -2ab
C4v^3|P 42 c m|P 4c -2c
C4v^4|P 42 n m|P 4n -2n
C4v^5|P 4 c c|P 4 -2c
C4v^6|P 4 n c|P 4 -2n
C4v^7|P 42 m c|P 4c -2
C4v^8|P 42 b c|P 4c -2ab
C4v^9|I 4 m m|I 4 -2
C4v^10|I 4 c m|I 4 -2c
C4v^11|I 41 m d|I 4bw -2
C4v^12|I 41 c d|I 4bw -2c
D2d^1|P -4 2 m|P -4 2
D2d^2|P -4 2 c|P -4 2c
D2d^3|P -4 21 m|P -4 2ab
D2d^4|P -4 21 c|P -4 2n
D2d^5|P -4 m 2|P -4 -2
D2d^6|P -4 c 2|P -4 -2c
D2d^7|P -4 b 2|P -4 -2ab
D2d^8|P -4 n 2|P -4 -2n
D2d^9|I -4 m 2|I -4 -2
D2d^10|I -4 c 2|I -4 -2c
D2d^11|I -4 2 m|I -4 2
D2d^12|I -4 2 d|I -4 2bw
D4h^1|P 4/m m m|-P 4 2|P 4/m 2/m 2/m
D4h^2|P 4/m c c|-P 4 2c|P 4/m 2/c 2/c
D4h^3|P 4/n b m:2|-P 4a 2b|P 4/n 2/b 2/m
D4h^4|P 4/n n c:2|-P 4a 2bc|P 4/n 2/n 2/c
D4h^5|P 4/m b m|-P 4 2ab|P 4/m 21/b 2/m
D4h^6|P 4/m n c|-P 4 2n|P 4/m 21/n 2/c
D4h^7|P 4/n m m:2|-P 4a 2a|P 4/n 21/m 2/m
D4h^8|P 4/n c c:2|-P 4a 2ac|P 4/n 21/c 2/c
D4h^9|P 42/m m c|-P 4c 2|P 42/m 2/m 2/c
D4h^10|P 42/m c m|-P 4c 2c|P 42/m 2/c 2/m
D4h^11|P 42/n b c:2|-P 4ac 2b|P 42/n 2/b 2/c
D4h^12|P 42/n n m:2|-P 4ac 2bc|P 42/n 2/n 2/m
D4h^13|P 42/m b c|-P 4c 2ab|P 42/m 21/b 2/c
D4h^14|P 42/m n m|-P 4n 2n|P 42/m 21/n 2/m
D4h^15|P 42/n m c:2|-P 4ac 2a|P 42/n 21/m 2/c
D4h^16|P 42/n c m:2|-P 4ac 2ac|P 42/n 21/c 2/m
D4h^17|I 4/m m m|-I 4 2|I 4/m 2/m 2/m
D4h^18|I 4/m c m|-I 4 2c|I 4/m 2/c 2/m
D4h^19|I 41/a m d:2|-I 4bd 2|I 41/a 2/m 2/d
D4h^20|I 41/a c d:2|-I 4bd 2c|I 41/a 2/c 2/d
C3^1|P 3|P 3
C3^2|P 31|P 31
C3^3|P 32|P 32
C3^4|R 3:h|R 3
C3i^1|P -3|-P 3
C3i^2|R -3:h|-R 3
D3^1|P 3 1 2|P 3 2
D3^2|P 3 2 1|P 3 2"
D3^3|P 31 1 2|P 31 2 (0 0 4)
D3^4|P 31 2 1|P 31 2"
D3^5|P 32 1 2|P 32 2 (0 0 2)
D3^6|P 32 2 1|P 32 2"
D3^7|R 3 2:h|R 3 2"
C3v^1|P 3 m 1|P 3 -2"
C3v^2|P 3 1 m|P 3 -2
C3v^3|P 3 c 1|P 3 -2"c
C3v^4|P 3 1 c|P 3 -2c
C3v^5|R 3 m:h|R 3 -2"
C3v^6|R 3 c:h|R 3 -2"c
D3d^1|P -3 1 m|-P 3 2|P -3 1 2/m
D3d^2|P -3 1 c|-P 3 2c|P -3 1 2/c
D3d^3|P -3 m 1|-P 3 2"|P -3 2/m 1
D3d^4|P -3 c 1|-P 3 2"c|P -3 2/c 1
D3d^5|R -3 m:h|-R 3 2"|R -3 2/m
D3d^6|R -3 c:h|-R 3 2"c|R -3 2/c
C6^1|P 6|P 6
C6^2|P 61|P 61
C6^3|P 65|P 65
C6^4|P 62|P 62
C6^5|P 64|P 64
C6^6|P 63|P 6c
C3h^1|P -6|P -6
C6h^1|P 6/m|-P 6
C6h^2|P 63/m|-P 6c
D6^1|P 6 2 2|P 6 2
D6^2|P 61 2 2|P 61 2 (0 0 5)
D6^3|P 65 2 2|P 65 2 (0 0 1)
D6^4|P 62 2 2|P 62 2 (0 0 4)
D6^5|P 64 2 2|P 64 2 (0 0 2)
D6^6|P 63 2 2|P 6c 2c
C6v^1|P 6 m m|P 6 -2
C6v^2|P 6 c c|P 6 -2c
C6v^3|P 63 c m|P 6c -2
C6v^4|P 63 m c|P 6c -2c
D3h^1|P -6 m 2|P -6 2
D3h^2|P -6 c 2|P -6c 2
D3h^3|P -6 2 m|P -6 -2
D3h^4|P -6 2 c|P -6c -2c
D6h^1|P 6/m m m|-P 6 2|P 6/m 2/m 2/m
D6h^2|P 6/m c c|-P 6 2c|P 6/m 2/c 2/c
D6h^3|P 63/m c m|-P 6c 2|P 63/m 2/c 2/m
D6h^4|P 63/m m c|-P 6c 2c|P 63/m 2/m 2/c
T^1|P 2 3|P 2 2 3
T^2|F 2 3|F 2 2 3
T^3|I 2 3|I 2 2 3
T^4|P 21 3|P 2ac 2ab 3
T^5|I 21 3|I 2b 2c 3
Th^1|P m -3|-P 2 2 3|P 2/m -3
Th^2|P n -3:2|-P 2ab 2bc 3|P 2/n -3
Th^3|F m -3|-F 2 2 3|F 2/m -3
Th^4|F d -3:2|-F 2uv 2vw 3|F 2/d -3
Th^5|I m -3|-I 2 2 3|I 2/m -3
Th^6|P a -3|-P 2ac 2ab 3|P 21/a -3
Th^7|I a -3|-I 2b 2c 3|I 21/a -3
O^1|P 4 3 2|P 4 2 3
O^2|P 42 3 2|P 4n 2 3
O^3|F 4 3 2|F 4 2 3
O^4|F 41 3 2|F 4d 2 3
O^5|I 4 3 2|I 4 2 3
O^6|P 43 3 2|P 4acd 2ab 3
O^7|P 41 3 2|P 4bd 2ab 3
O^8|I 41 3 2|I 4bd 2c 3
Td^1|P -4 3 m|P -4 2 3
Td^2|F -4 3 m|F -4 2 3
Td^3|I -4 3 m|I -4 2 3
Td^4|P -4 3 n|P -4n 2 3
Td^5|F -4 3 c|F -4a 2 3
Td^6|I -4 3 d|I -4bd 2c 3
Oh^1|P m -3 m|-P 4 2 3|P 4/m -3 2/m
Oh^2|P n -3 n:2|-P 4a 2bc 3|P 4/n -3 2/n
Oh^3|P m -3 n|-P 4n 2 3|P 42/m -3 2/n
Oh^4|P n -3 m:2|-P 4bc 2bc 3|P 42/n -3 2/m
Oh^5|F m -3 m|-F 4 2 3|F 4/m -3 2/m
Oh^6|F m -3 c|-F 4a 2 3|F 4/m -3 2/c
Oh^7|F d -3 m:2|-F 4vw 2vw 3|F 41/d -3 2/m
Oh^8|F d -3 c:2|-F 4ud 2vw 3|F 41/d -3 2/c
Oh^9|I m -3 m|-I 4 2 3|I 4/m -3 2/m
Oh^10|I a -3 d|-I 4bd 2c 3|I 41/a -3 2/d
`;
