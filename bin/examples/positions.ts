import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold positions fixtures/halite.cif",
  output: `
fixtures/halite.cif, block halite
space group F m -3 m (No. 225, Oh^5), reference setting
...
label  element         x         y         z  occupancy  made by        code     meaning
Na     Na       0.000000  0.000000  0.000000          1  x,y,z          1_555    1
Na     Na       0.000000  0.500000  0.500000          1  x,y+1/2,z+1/2  49_555   t(0,1/2,1/2)
Na     Na       0.500000  0.000000  0.500000          1  x+1/2,y,z+1/2  97_555   t(1/2,0,1/2)
...
`,
};
