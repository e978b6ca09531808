import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold resite fixtures/gypsum-c2c.cif --to fixtures/gypsum-i2a.cif",
  output: `
fixtures/gypsum-c2c.cif, block gypsum_C2c
space group C 2/c (No. 15, C2h^6), reference setting
positions closer than 0.05 Å are one position
- symmetry: the operations listed in the file
...
the two files hold the same structure
limits: 0.30 Å for an atom, 3.00 % for the lattice, 0.10 for an occupancy
largest displacement 0.0000 Å, root mean square 0.0000 Å over 48 atoms
lattice strained by 0.00 %, 0.00 %, 0.00 % along its principal directions, volume ratio 1.0000; displacements
  leave that strain out
from the first to the second: axes -c,b,a+c, origin 0,0,1/2; (a,b,c) second = (a,b,c) first P, x(first) = P
  x(second) + p

...
first file  position  occ.  second file  position  occ.  displacement/Å
Ca                4e     1  Ca                 4e     1          0.0000
S                 4e     1  S                  4e     1          0.0000
...
written in I 2/a (No. 15, C2h^6), setting b3; (a,b,c) of the reference setting C 2/c = -a-c,b,a, origin 0,0,0
axes -c,b,a+c, origin 0,0,1/2, in terms of the cell of the file: (a',b',c') = (a,b,c) P, x = P x' + p
cell 5.6790 15.2020 6.5220 90.000 118.430 90.000, volume 495.15 Å^3
...
`,
};
