/**
 * CIF 1.1 and 2.0 as text: blocks, items and loops with their places, numbers with standard uncertainties, equivalent
 * data names, and writing. What a value means is decided in the rooms above.
 */

export type { CifBlock, CifDocument } from "./block.ts";
export {
  aliasesOf,
  canonicalName,
  cellOf,
  columnName,
  type FoundValue,
  findLoop,
  findNumb,
  findValue,
  numbInLoop,
} from "./data-names.ts";
export { decodeCif } from "./encoding.ts";
export type { CifLoop } from "./loop.ts";
export { type Numb, numbOf, parseNumb } from "./numb.ts";
export { readCif } from "./reader.ts";
export type { CifVersion } from "./token-buffer.ts";
export type { CifValue } from "./value.ts";
export type { WritableValue } from "./write-value.ts";
export { type WritableBlock, type WritableItem, writeCif } from "./writer.ts";
