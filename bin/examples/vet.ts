import type { CommandExample } from "../arguments.ts";

/** For the help; a test runs it. */
export const EXAMPLE: CommandExample = {
  line: "sitefold vet fixtures/damaged/operations-that-do-not-close.cif",
  output: `
fixtures/damaged/operations-that-do-not-close.cif, block niter
1 contradiction, no doubts, 1 remark

CONTRADICTION operations-no-group: the 4 operations listed are no group: -x,-y,-z after -x+1/2,-y+1/2,z+1/2 is
    x+1/2,y+1/2,-z+1/2, which the list lacks (closing it gives 16)
    at     line 11, _space_group_symop.operation_xyz
    says   _space_group_symop.operation_xyz: 4 operations
    but    their products: the 4 operations listed are no group: -x,-y,-z after -x+1/2,-y+1/2,z+1/2 is
           x+1/2,y+1/2,-z+1/2, which the list lacks (closing it gives 16)
    do     Look for a wrong sign, letter or fraction, or for lines that were lost.
...
`,
};
