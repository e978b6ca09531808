import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: 'sitefold polarise fixtures/calcite.cif --geometry "z(xy)-z"',
  output: `
fixtures/calcite.cif, block calcite
space group R -3 c (No. 167, D3d^6), reference setting
...
Raman tensors (a dot is 0; letters are measured numbers):

                [ a  .  . ]
A₁g (1 optic)   [ .  a  . ]
                [ .  .  b ]

                [  c   .   . ]   [  .  -c  -d ]
Eg (4 optic)    [  .  -c   d ]   [ -c   .   . ]
                [  .   d   . ]   [ -d   .   . ]

Infrared dipoles (letters anew):
  A₂u (3 optic): (0, 0, a)
  Eu (5 optic): (b, 0, 0) and (0, b, 0)

Geometries asked for:
  geometry  species seen, with tensor element and amplitude of each partner
  z(xy)-z   Eg xy: -c
...
`,
};
