import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold sites fixtures/calcite.cif",
  output: `
fixtures/calcite.cif, block calcite
space group R -3 c (No. 167, D3d^6), reference setting
positions closer than 0.05 Å are one position
- symmetry: the operations listed in the file

label  element  occ.  in cell  position  site symmetry        x        y        z  moved/Å  may move in  U 11,22,33,12,13,23
Ca1    Ca          1        6  6b        -3. (C3i)      0.00000  0.00000  0.00000           0,0,0        u11,u11,u33,u11/2,0,0
C1     C           1        6  6a        32 (D3)        0.00000  0.00000  0.25000           0,0,1/4      u11,u11,u33,u11/2,0,0
O1     O           1       18  18e       .2 (C2)        0.25680  0.00000  0.25000           x,0,1/4      u11,u22,u33,u22/2,u13,2u13
`,
};
