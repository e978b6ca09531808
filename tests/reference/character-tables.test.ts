import { describe, expect, it } from "vitest";
import { crystalMatrices, pointGroup, pointGroupTable } from "../../lib/representation/index.ts";

/**
 * Published character tables: F. A. Cotton, Chemical Applications of Group Theory (3rd edition, 1990), appendix IIA;
 * C. J. Bradley and A. P. Cracknell, The Mathematical Theory of Symmetry in Solids (1972), table 2.2. Written down from
 * memory. Pairs of complex conjugate species stand as one, with the sum of their characters; t is the golden ratio,
 * u its reciprocal, r the square root of 2.
 * After the bars: vectors; rotations; quadratic functions.
 */
const TABLES = `
C1 | E
A | 1 | x, y, z | Rx, Ry, Rz | x2, y2, z2, xy, xz, yz
Cs | E sigma_h
A' | 1 1 | x, y | Rz | x2, y2, z2, xy
A'' | 1 -1 | z | Rx, Ry | yz, xz
Ci | E i
Ag | 1 1 | | Rx, Ry, Rz | x2, y2, z2, xy, xz, yz
Au | 1 -1 | x, y, z | |
C2 | E C2
A | 1 1 | z | Rz | x2, y2, z2, xy
B | 1 -1 | x, y | Rx, Ry | yz, xz
C3 | E C3 C3^2
A | 1 1 1 | z | Rz | x2+y2, z2
E | 2 -1 -1 | (x, y) | (Rx, Ry) | (x2-y2, xy), (yz, xz)
C4 | E C4 C2 C4^3
A | 1 1 1 1 | z | Rz | x2+y2, z2
B | 1 -1 1 -1 | | | x2-y2, xy
E | 2 0 -2 0 | (x, y) | (Rx, Ry) | (yz, xz)
C6 | E C6 C3 C2 C3^2 C6^5
A | 1 1 1 1 1 1 | z | Rz | x2+y2, z2
B | 1 -1 1 -1 1 -1 | | |
E1 | 2 1 -1 -2 -1 1 | (x, y) | (Rx, Ry) | (xz, yz)
E2 | 2 -1 -1 2 -1 -1 | | | (x2-y2, xy)
D2 | E C2(z) C2(y) C2(x)
A | 1 1 1 1 | | | x2, y2, z2
B1 | 1 1 -1 -1 | z | Rz | xy
B2 | 1 -1 1 -1 | y | Ry | xz
B3 | 1 -1 -1 1 | x | Rx | yz
D3 | E 2C3 3C2'
A1 | 1 1 1 | | | x2+y2, z2
A2 | 1 1 -1 | z | Rz |
E | 2 -1 0 | (x, y) | (Rx, Ry) | (x2-y2, xy), (xz, yz)
D4 | E 2C4 C2 2C2' 2C2''
A1 | 1 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 -1 -1 | z | Rz |
B1 | 1 -1 1 1 -1 | | | x2-y2
B2 | 1 -1 1 -1 1 | | | xy
E | 2 0 -2 0 0 | (x, y) | (Rx, Ry) | (xz, yz)
D6 | E 2C6 2C3 C2 3C2' 3C2''
A1 | 1 1 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 1 -1 -1 | z | Rz |
B1 | 1 -1 1 -1 1 -1 | | |
B2 | 1 -1 1 -1 -1 1 | | |
E1 | 2 1 -1 -2 0 0 | (x, y) | (Rx, Ry) | (xz, yz)
E2 | 2 -1 -1 2 0 0 | | | (x2-y2, xy)
C2v | E C2 sigma(xz) sigma(yz)
A1 | 1 1 1 1 | z | | x2, y2, z2
A2 | 1 1 -1 -1 | | Rz | xy
B1 | 1 -1 1 -1 | x | Ry | xz
B2 | 1 -1 -1 1 | y | Rx | yz
C3v | E 2C3 3sigma_v
A1 | 1 1 1 | z | | x2+y2, z2
A2 | 1 1 -1 | | Rz |
E | 2 -1 0 | (x, y) | (Rx, Ry) | (x2-y2, xy), (xz, yz)
C4v | E 2C4 C2 2sigma_v 2sigma_d
A1 | 1 1 1 1 1 | z | | x2+y2, z2
A2 | 1 1 1 -1 -1 | | Rz |
B1 | 1 -1 1 1 -1 | | | x2-y2
B2 | 1 -1 1 -1 1 | | | xy
E | 2 0 -2 0 0 | (x, y) | (Rx, Ry) | (xz, yz)
C6v | E 2C6 2C3 C2 3sigma_v 3sigma_d
A1 | 1 1 1 1 1 1 | z | | x2+y2, z2
A2 | 1 1 1 1 -1 -1 | | Rz |
B1 | 1 -1 1 -1 1 -1 | | |
B2 | 1 -1 1 -1 -1 1 | | |
E1 | 2 1 -1 -2 0 0 | (x, y) | (Rx, Ry) | (xz, yz)
E2 | 2 -1 -1 2 0 0 | | | (x2-y2, xy)
C2h | E C2 i sigma_h
Ag | 1 1 1 1 | | Rz | x2, y2, z2, xy
Bg | 1 -1 1 -1 | | Rx, Ry | xz, yz
Au | 1 1 -1 -1 | z | |
Bu | 1 -1 -1 1 | x, y | |
C3h | E C3 C3^2 sigma_h S3 S3^5
A' | 1 1 1 1 1 1 | | Rz | x2+y2, z2
E' | 2 -1 -1 2 -1 -1 | (x, y) | | (x2-y2, xy)
A'' | 1 1 1 -1 -1 -1 | z | |
E'' | 2 -1 -1 -2 1 1 | | (Rx, Ry) | (xz, yz)
C4h | E C4 C2 C4^3 i S4^3 sigma_h S4
Ag | 1 1 1 1 1 1 1 1 | | Rz | x2+y2, z2
Bg | 1 -1 1 -1 1 -1 1 -1 | | | x2-y2, xy
Eg | 2 0 -2 0 2 0 -2 0 | | (Rx, Ry) | (xz, yz)
Au | 1 1 1 1 -1 -1 -1 -1 | z | |
Bu | 1 -1 1 -1 -1 1 -1 1 | | |
Eu | 2 0 -2 0 -2 0 2 0 | (x, y) | |
C6h | E C6 C3 C2 C3^2 C6^5 i S3^5 S6^5 sigma_h S6 S3
Ag | 1 1 1 1 1 1 1 1 1 1 1 1 | | Rz | x2+y2, z2
Bg | 1 -1 1 -1 1 -1 1 -1 1 -1 1 -1 | | |
E1g | 2 1 -1 -2 -1 1 2 1 -1 -2 -1 1 | | (Rx, Ry) | (xz, yz)
E2g | 2 -1 -1 2 -1 -1 2 -1 -1 2 -1 -1 | | | (x2-y2, xy)
Au | 1 1 1 1 1 1 -1 -1 -1 -1 -1 -1 | z | |
Bu | 1 -1 1 -1 1 -1 -1 1 -1 1 -1 1 | | |
E1u | 2 1 -1 -2 -1 1 -2 -1 1 2 1 -1 | (x, y) | |
E2u | 2 -1 -1 2 -1 -1 -2 1 1 -2 1 1 | | |
D2h | E C2(z) C2(y) C2(x) i sigma(xy) sigma(xz) sigma(yz)
Ag | 1 1 1 1 1 1 1 1 | | | x2, y2, z2
B1g | 1 1 -1 -1 1 1 -1 -1 | | Rz | xy
B2g | 1 -1 1 -1 1 -1 1 -1 | | Ry | xz
B3g | 1 -1 -1 1 1 -1 -1 1 | | Rx | yz
Au | 1 1 1 1 -1 -1 -1 -1 | | |
B1u | 1 1 -1 -1 -1 -1 1 1 | z | |
B2u | 1 -1 1 -1 -1 1 -1 1 | y | |
B3u | 1 -1 -1 1 -1 1 1 -1 | x | |
D3h | E 2C3 3C2' sigma_h 2S3 3sigma_v
A1' | 1 1 1 1 1 1 | | | x2+y2, z2
A2' | 1 1 -1 1 1 -1 | | Rz |
E' | 2 -1 0 2 -1 0 | (x, y) | | (x2-y2, xy)
A1'' | 1 1 1 -1 -1 -1 | | |
A2'' | 1 1 -1 -1 -1 1 | z | |
E'' | 2 -1 0 -2 1 0 | | (Rx, Ry) | (xz, yz)
D4h | E 2C4 C2 2C2' 2C2'' i 2S4 sigma_h 2sigma_v 2sigma_d
A1g | 1 1 1 1 1 1 1 1 1 1 | | | x2+y2, z2
A2g | 1 1 1 -1 -1 1 1 1 -1 -1 | | Rz |
B1g | 1 -1 1 1 -1 1 -1 1 1 -1 | | | x2-y2
B2g | 1 -1 1 -1 1 1 -1 1 -1 1 | | | xy
Eg | 2 0 -2 0 0 2 0 -2 0 0 | | (Rx, Ry) | (xz, yz)
A1u | 1 1 1 1 1 -1 -1 -1 -1 -1 | | |
A2u | 1 1 1 -1 -1 -1 -1 -1 1 1 | z | |
B1u | 1 -1 1 1 -1 -1 1 -1 -1 1 | | |
B2u | 1 -1 1 -1 1 -1 1 -1 1 -1 | | |
Eu | 2 0 -2 0 0 -2 0 2 0 0 | (x, y) | |
D6h | E 2C6 2C3 C2 3C2' 3C2'' i 2S3 2S6 sigma_h 3sigma_d 3sigma_v
A1g | 1 1 1 1 1 1 1 1 1 1 1 1 | | | x2+y2, z2
A2g | 1 1 1 1 -1 -1 1 1 1 1 -1 -1 | | Rz |
B1g | 1 -1 1 -1 1 -1 1 -1 1 -1 1 -1 | | |
B2g | 1 -1 1 -1 -1 1 1 -1 1 -1 -1 1 | | |
E1g | 2 1 -1 -2 0 0 2 1 -1 -2 0 0 | | (Rx, Ry) | (xz, yz)
E2g | 2 -1 -1 2 0 0 2 -1 -1 2 0 0 | | | (x2-y2, xy)
A1u | 1 1 1 1 1 1 -1 -1 -1 -1 -1 -1 | | |
A2u | 1 1 1 1 -1 -1 -1 -1 -1 -1 1 1 | z | |
B1u | 1 -1 1 -1 1 -1 -1 1 -1 1 -1 1 | | |
B2u | 1 -1 1 -1 -1 1 -1 1 -1 1 1 -1 | | |
E1u | 2 1 -1 -2 0 0 -2 -1 1 2 0 0 | (x, y) | |
E2u | 2 -1 -1 2 0 0 -2 1 1 -2 0 0 | | |
D2d | E 2S4 C2 2C2' 2sigma_d
A1 | 1 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 -1 -1 | | Rz |
B1 | 1 -1 1 1 -1 | | | x2-y2
B2 | 1 -1 1 -1 1 | z | | xy
E | 2 0 -2 0 0 | (x, y) | (Rx, Ry) | (xz, yz)
D3d | E 2C3 3C2' i 2S6 3sigma_d
A1g | 1 1 1 1 1 1 | | | x2+y2, z2
A2g | 1 1 -1 1 1 -1 | | Rz |
Eg | 2 -1 0 2 -1 0 | | (Rx, Ry) | (x2-y2, xy), (xz, yz)
A1u | 1 1 1 -1 -1 -1 | | |
A2u | 1 1 -1 -1 -1 1 | z | |
Eu | 2 -1 0 -2 1 0 | (x, y) | |
S4 | E S4 C2 S4^3
A | 1 1 1 1 | | Rz | x2+y2, z2
B | 1 -1 1 -1 | z | | x2-y2, xy
E | 2 0 -2 0 | (x, y) | (Rx, Ry) | (xz, yz)
S6 | E C3 C3^2 i S6^5 S6
Ag | 1 1 1 1 1 1 | | Rz | x2+y2, z2
Eg | 2 -1 -1 2 -1 -1 | | (Rx, Ry) | (x2-y2, xy), (xz, yz)
Au | 1 1 1 -1 -1 -1 | z | |
Eu | 2 -1 -1 -2 1 1 | (x, y) | |
T | E 4C3 4C3^2 3C2
A | 1 1 1 1 | | | x2+y2+z2
E | 2 -1 -1 2 | | | (2z2-x2-y2, x2-y2)
T | 3 0 0 -1 | (x, y, z) | (Rx, Ry, Rz) | (xy, xz, yz)
Th | E 4C3 4C3^2 3C2 i 4S6 4S6^5 3sigma_h
Ag | 1 1 1 1 1 1 1 1 | | | x2+y2+z2
Eg | 2 -1 -1 2 2 -1 -1 2 | | | (2z2-x2-y2, x2-y2)
Tg | 3 0 0 -1 3 0 0 -1 | | (Rx, Ry, Rz) | (xy, xz, yz)
Au | 1 1 1 1 -1 -1 -1 -1 | | |
Eu | 2 -1 -1 2 -2 1 1 -2 | | |
Tu | 3 0 0 -1 -3 0 0 1 | (x, y, z) | |
Td | E 8C3 3C2 6S4 6sigma_d
A1 | 1 1 1 1 1 | | | x2+y2+z2
A2 | 1 1 1 -1 -1 | | |
E | 2 -1 2 0 0 | | | (2z2-x2-y2, x2-y2)
T1 | 3 0 -1 1 -1 | | (Rx, Ry, Rz) |
T2 | 3 0 -1 -1 1 | (x, y, z) | | (xy, xz, yz)
O | E 6C4 3C2 8C3 6C2'
A1 | 1 1 1 1 1 | | | x2+y2+z2
A2 | 1 -1 1 1 -1 | | |
E | 2 0 2 -1 0 | | | (2z2-x2-y2, x2-y2)
T1 | 3 1 -1 0 -1 | (x, y, z) | (Rx, Ry, Rz) |
T2 | 3 -1 -1 0 1 | | | (xy, xz, yz)
Oh | E 8C3 6C2' 6C4 3C2 i 6S4 8S6 3sigma_h 6sigma_d
A1g | 1 1 1 1 1 1 1 1 1 1 | | | x2+y2+z2
A2g | 1 1 -1 -1 1 1 -1 1 1 -1 | | |
Eg | 2 -1 0 0 2 2 0 -1 2 0 | | | (2z2-x2-y2, x2-y2)
T1g | 3 0 -1 1 -1 3 1 0 -1 -1 | | (Rx, Ry, Rz) |
T2g | 3 0 1 -1 -1 3 -1 0 -1 1 | | | (xz, yz, xy)
A1u | 1 1 1 1 1 -1 -1 -1 -1 -1 | | |
A2u | 1 1 -1 -1 1 -1 1 -1 -1 1 | | |
Eu | 2 -1 0 0 2 -2 0 1 -2 0 | | |
T1u | 3 0 -1 1 -1 -3 -1 0 1 1 | (x, y, z) | |
T2u | 3 0 1 -1 -1 -3 1 0 1 -1 | | |
I | E 12C5 12C5^2 20C3 15C2
A | 1 1 1 1 1 | | | x2+y2+z2
T1 | 3 t -u 0 -1 | (x, y, z) | (Rx, Ry, Rz) |
T2 | 3 -u t 0 -1 | | |
G | 4 -1 -1 1 0 | | |
H | 5 0 0 -1 1 | | | (2z2-x2-y2, x2-y2, xy, xz, yz)
Ih | E 12C5 12C5^2 20C3 15C2 i 12S10 12S10^3 20S6 15sigma
Ag | 1 1 1 1 1 1 1 1 1 1 | | | x2+y2+z2
T1g | 3 t -u 0 -1 3 -u t 0 -1 | | (Rx, Ry, Rz) |
T2g | 3 -u t 0 -1 3 t -u 0 -1 | | |
Gg | 4 -1 -1 1 0 4 -1 -1 1 0 | | |
Hg | 5 0 0 -1 1 5 0 0 -1 1 | | | (2z2-x2-y2, x2-y2, xy, xz, yz)
Au | 1 1 1 1 1 -1 -1 -1 -1 -1 | | |
T1u | 3 t -u 0 -1 -3 u -t 0 1 | (x, y, z) | |
T2u | 3 -u t 0 -1 -3 -t u 0 1 | | |
Gu | 4 -1 -1 1 0 -4 1 1 -1 0 | | |
Hu | 5 0 0 -1 1 -5 0 0 1 -1 | | |
D5 | E 2C5 2C5^2 5C2'
A1 | 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 -1 | z | Rz |
E1 | 2 u -t 0 | (x, y) | (Rx, Ry) | (xz, yz)
E2 | 2 -t u 0 | | | (x2-y2, xy)
D5h | E 2C5 2C5^2 5C2' sigma_h 2S5 2S5^3 5sigma_v
A1' | 1 1 1 1 1 1 1 1 | | | x2+y2, z2
A2' | 1 1 1 -1 1 1 1 -1 | | Rz |
E1' | 2 u -t 0 2 u -t 0 | (x, y) | |
E2' | 2 -t u 0 2 -t u 0 | | | (x2-y2, xy)
A1'' | 1 1 1 1 -1 -1 -1 -1 | | |
A2'' | 1 1 1 -1 -1 -1 -1 1 | z | |
E1'' | 2 u -t 0 -2 -u t 0 | | (Rx, Ry) | (xz, yz)
E2'' | 2 -t u 0 -2 t -u 0 | | |
D5d | E 2C5 2C5^2 5C2' i 2S10^3 2S10 5sigma_d
A1g | 1 1 1 1 1 1 1 1 | | | x2+y2, z2
A2g | 1 1 1 -1 1 1 1 -1 | | Rz |
E1g | 2 u -t 0 2 u -t 0 | | (Rx, Ry) | (xz, yz)
E2g | 2 -t u 0 2 -t u 0 | | | (x2-y2, xy)
A1u | 1 1 1 1 -1 -1 -1 -1 | | |
A2u | 1 1 1 -1 -1 -1 -1 1 | z | |
E1u | 2 u -t 0 -2 -u t 0 | (x, y) | |
E2u | 2 -t u 0 -2 t -u 0 | | |
D4d | E 2S8 2C4 2S8^3 C2 4C2' 4sigma_d
A1 | 1 1 1 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 1 1 -1 -1 | | Rz |
B1 | 1 -1 1 -1 1 1 -1 | | |
B2 | 1 -1 1 -1 1 -1 1 | z | |
E1 | 2 r 0 -r -2 0 0 | (x, y) | |
E2 | 2 0 -2 0 2 0 0 | | | (x2-y2, xy)
E3 | 2 -r 0 r -2 0 0 | | (Rx, Ry) | (xz, yz)
D6d | E 2S12 2C6 2S4 2C3 2S12^5 C2 6C2' 6sigma_d
A1 | 1 1 1 1 1 1 1 1 1 | | | x2+y2, z2
A2 | 1 1 1 1 1 1 1 -1 -1 | | Rz |
B1 | 1 -1 1 -1 1 -1 1 1 -1 | | |
B2 | 1 -1 1 -1 1 -1 1 -1 1 | z | |
E1 | 2 s 1 0 -1 -s -2 0 0 | (x, y) | |
E2 | 2 1 -1 -2 -1 1 2 0 0 | | | (x2-y2, xy)
E3 | 2 0 -2 0 2 0 -2 0 0 | | |
E4 | 2 -1 -1 2 -1 -1 2 0 0 | | |
E5 | 2 -s 1 0 -1 s -2 0 0 | | (Rx, Ry) | (xz, yz)
S8 | E S8 C4 S8^3 C2 S8^5 C4^3 S8^7
A | 1 1 1 1 1 1 1 1 | | Rz | x2+y2, z2
B | 1 -1 1 -1 1 -1 1 -1 | z | |
E1 | 2 r 0 -r -2 -r 0 r | (x, y) | |
E2 | 2 0 -2 0 2 0 -2 0 | | | (x2-y2, xy)
E3 | 2 -r 0 r -2 r 0 -r | | (Rx, Ry) | (xz, yz)`;

const GOLDEN = (1 + Math.sqrt(5)) / 2;
const LETTERS: Readonly<Record<string, number>> = { t: GOLDEN, u: GOLDEN - 1, r: Math.SQRT2, s: Math.sqrt(3) };

interface Row {
  readonly label: string;
  readonly characters: readonly number[];
  /** Vectors, rotations, quadratic functions. */
  readonly functions: readonly string[];
}

function number(text: string): number {
  const plain = text.replace("-", "");
  return (LETTERS[plain] ?? Number(plain)) * (text.startsWith("-") ? -1 : 1);
}

/** Without coefficients and signs, partners and sets in a fixed order: `(xy,x2y2) (xz,yz)`. */
function bare(text: string): string {
  const sets = text.match(/\(([^()]|\([^()]*\))*\)|[^,()\s]+/g) ?? [];
  return sets
    .map((set) => {
      const partners = set.startsWith("(") ? set.slice(1, -1).split(",") : [set];
      const monomials = partners.map((p) => (p.replace(/sqrt\d/g, "").match(/R?[xyz][xyz2]?/g) ?? []).sort().join(""));
      return monomials.sort().join(",");
    })
    .sort()
    .join(" ");
}

const groups = new Map<string, { classes: string[]; rows: Row[] }>();
let current = "";
for (const line of TABLES.trim().split("\n")) {
  const [head = "", body = "", ...functions] = line.split("|").map((part) => part.trim());
  if (body.startsWith("E")) {
    current = head;
    groups.set(head, { classes: body.split(" "), rows: [] });
  } else groups.get(current)!.rows.push({ label: head, characters: body.split(" ").map(number), functions });
}

describe.each([...groups])("the published table of %s", (name, { classes, rows }) => {
  const { group, functions } = pointGroupTable(name);

  it("has the same classes and species", () => {
    expect(group.classes.map((c) => c.name).sort()).toEqual([...classes].sort());
    expect(group.irreps.map((r) => r.label)).toEqual(rows.map((r) => r.label));
  });

  it("has the same characters", () => {
    const order = classes.map((c) => group.classes.findIndex((k) => k.name === c));
    rows.forEach((row, r) => {
      const found = order.map((k) => group.irreps[r]!.characters[k]!);
      row.characters.forEach((c, k) => {
        expect(found[k], `${row.label} on ${classes[k]}`).toBeCloseTo(c, 12);
      });
    });
  });

  it("has the same vectors, rotations and quadratic functions", () => {
    rows.forEach((row, r) => {
      const { vectors, rotations, quadratics } = functions[r]!;
      const found = [vectors, rotations, quadratics].map((list) => bare(list.join(", ")));
      expect([row.label, ...found]).toEqual([row.label, ...row.functions.map(bare)]);
    });
  });
});

describe("the same tables in crystals", () => {
  /** Oriented symbols in which the lateral axes lie as in the standard orientation, with z along c. */
  const SYMBOLS = [
    ["C1", "1"],
    ["Ci", "-1"],
    ["C2", "112"],
    ["Cs", "11m"],
    ["C2h", "112/m"],
    ["D2", "222"],
    ["C2v", "mm2"],
    ["D2h", "mmm"],
    ["C4", "4"],
    ["S4", "-4"],
    ["C4h", "4/m"],
    ["D4", "422"],
    ["C4v", "4mm"],
    ["D2d", "-42m"],
    ["D4h", "4/mmm"],
    ["C3", "3"],
    ["S6", "-3"],
    ["D3", "321"],
    ["C3v", "31m"],
    ["D3d", "-3m1"],
    ["C6", "6"],
    ["C3h", "-6"],
    ["C6h", "6/m"],
    ["D6", "622"],
    ["C6v", "6mm"],
    ["D3h", "-62m"],
    ["D6h", "6/mmm"],
    ["T", "23"],
    ["Th", "m-3"],
    ["Td", "-43m"],
    ["O", "432"],
    ["Oh", "m-3m"],
  ] as const;

  it("are all 32", () => expect(new Set(SYMBOLS.map(([name]) => name)).size).toBe(32));

  it.each(SYMBOLS)("%s as %s has the same species, with the same characters and functions", (name, symbol) => {
    const published = groups.get(name)!;
    const { group, functions } = pointGroupTable(symbol);
    expect(group.irreps.map((r) => r.label)).toEqual(published.rows.map((r) => r.label));
    // In 6/mmm the planes normal to the secondary directions are called sigma_v; molecules call them sigma_d.
    const swap = (c: string) =>
      name === "D6h" ? c.replace(/sigma_([vd])/, (_, k) => `sigma_${k === "v" ? "d" : "v"}`) : c;
    published.rows.forEach((row, r) => {
      published.classes.forEach((c, k) => {
        const found = group.classes.findIndex((other) => other.name === swap(c));
        expect(group.irreps[r]!.characters[found], `${row.label} on ${c}`).toBe(row.characters[k]);
      });
      const { vectors, rotations, quadratics } = functions[r]!;
      const lists = [vectors, rotations, quadratics].map((list) => bare(list.join(", ")));
      expect([row.label, ...lists]).toEqual([row.label, ...row.functions.map(bare)]);
    });
  });

  it("B1 and B2 of -42m and -4m2 keep to C2', wherever its axes lie", () => {
    const inFrame = (symbol: string) => {
      const { group, functions } = pointGroupTable(symbol);
      return Object.fromEntries(group.irreps.map((r, i) => [r.label, functions[i]!.quadratics.join()]));
    };
    expect(inFrame("-42m")).toMatchObject({ B1: "x2-y2", B2: "xy" });
    expect(inFrame("-4m2")).toMatchObject({ B1: "xy", B2: "x2-y2" });
    const directions = pointGroup(crystalMatrices("-4m2")).classes.map((c) => `${c.name} ${c.directions.join(" ")}`);
    expect(directions).toContain("2C2' [110] [1-10]");
    expect(directions).toContain("2sigma_d [100] [010]");
  });
});
