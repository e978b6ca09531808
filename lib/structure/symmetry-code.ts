import type { IntVec3 } from "../algebra/index.ts";

/**
 * Symmetry code of the IUCr core dictionary: number of the operation in the list, from 1, and 5 plus the whole cells
 * added along each axis, `3_655`. Null where a digit does not hold the cells.
 */
export function symmetryCode(operation: number, cells: IntVec3): string | null {
  const [a, b, c] = cells;
  if (Math.min(a, b, c) < -5 || Math.max(a, b, c) > 4) return null;
  return `${operation + 1}_${5 + a}${5 + b}${5 + c}`;
}
