import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold symmetrise fixtures/barium-titanate.cif --tolerance 0.2 --strain 0.03",
  output: `
fixtures/barium-titanate.cif, block barium_titanate
space group P 4 m m (No. 99, C4v^1), reference setting
...
found within 0.2 Å: P m -3 m (No. 221, Oh^1), reference setting; axes a,b,c, origin 0,0,0, in terms of the
  cell of the file
the origin of the file is first moved by 0.00000, 0.00000, -0.00830
6 times as many operations as the file declares: symmetry is missed

Operations, with the distances from images to atoms
operation  in the cell of the file            largest/Å  mean/Å
x,y,z      x,y,z                    declared     0.0000  0.0000
...
x,-y,-z    x,-y,-z                               0.1760  0.0972
...
Symmetrised structure, conventional cell: 4.0068 4.0068 4.0068 90.000 90.000 90.000
atoms moved by 0.0486 Å on average, 0.0880 Å at most
label  element  occ.  position  site symmetry        x        y        z  moved/Å  stands also for
Ba     Ba          1        1a  m-3m           0.00000  0.00000  0.00000   0.0335
Ti     Ti          1        1b  m-3m           0.50000  0.50000  0.50000   0.0880
O1     O           1        3c  4/mm.m         0.50000  0.50000  0.00000   0.0674  O2
`,
};
