import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: 'sitefold group "P 21/c"',
  output: `
...
space group P 21/c (No. 14, C2h^5), reference setting
symbols: short P 21/c; full P 1 21/c 1; extended P 1 21/c 1
Hall symbol -P 2ybc
monoclinic, crystal class 2/m (C2h), Laue class 2/m, Bravais type mP, arithmetic class P 2/m
centrosymmetric, not symmorphic, not a Sohncke type, not polar

Operations
what it is          image of x,y,z
1                   x,y,z
2(0,1/2,0) 0,y,1/4  -x,y+1/2,-z+1/2
-1 0,0,0            -x,-y,-z
c x,1/4,z           x,-y+1/2,z+1/2
...

Wyckoff positions
    site symmetry  coordinates                                       extra conditions
2a  -1 (Ci)        0,0,0  0,1/2,1/2                                  hkl: k+l=2n
2b  -1 (Ci)        1/2,0,0  1/2,1/2,1/2                              hkl: k+l=2n
2c  -1 (Ci)        0,0,1/2  0,1/2,0                                  hkl: k+l=2n
2d  -1 (Ci)        1/2,0,1/2  1/2,1/2,0                              hkl: k+l=2n
4e  1 (C1)         x,y,z  -x,y+1/2,-z+1/2  -x,-y,-z  x,-y+1/2,z+1/2
...
`,
};
