import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold patterns fixtures/rutile.cif --species A1g",
  output: `
fixtures/rutile.cif, block rutile
space group P 42/m n m (No. 136, D4h^14), reference setting
...
atom  site       a       b       c  made by
   1  Ti    0.0000  0.0000  0.0000  x,y,z
   2  Ti    0.5000  0.5000  0.5000  -y+1/2,x+1/2,z+1/2
   3  O     0.3048  0.3048  0.0000  x,y,z
   4  O     0.6952  0.6952  0.0000  -x,-y,-z
   5  O     0.1952  0.8048  0.5000  -y+1/2,x+1/2,z+1/2
   6  O     0.8048  0.1952  0.5000  x+1/2,-y+1/2,-z+1/2

A₁g: Raman active

A₁g of O, times 1/√8
atom  site   x   y  z
   3  O      1   1  .
   4  O     -1  -1  .
   5  O     -1   1  .
   6  O      1  -1  .
`,
};
