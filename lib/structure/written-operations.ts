import type { IntMat3, IntVec3 } from "../algebra/index.ts";
import { type CifBlock, cellOf, findLoop } from "../cif/index.ts";
import { formatOperation, operationKey, reduce, writtenTranslation } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import type { Crystal } from "./crystal.ts";
import { type DeclaredOperation, declaredSymmetry } from "./declared-symmetry.ts";

/** An operation with its translation as written, not reduced: x' = W x + t. */
export interface WrittenOperation {
  readonly W: IntMat3;
  readonly t: Vec3;
}

const XYZ = "_space_group_symop.operation_xyz";

/**
 * The operations that a block lists by what symmetry codes call them: their id, or else their place in the list, from 1;
 * null for lines that could not be read.
 */
export function writtenOperations(
  block: CifBlock,
  declared: readonly DeclaredOperation[] = declaredSymmetry(block).operations,
): ReadonlyMap<string, WrittenOperation | null> {
  const loop = findLoop(block, XYZ);
  const found = new Map<string, WrittenOperation | null>();
  declared.forEach(({ operation, text }, i) => {
    const id = loop ? cellOf(loop, i, "_space_group_symop.id") : null;
    const name = id?.kind === "text" && id.text.trim() !== "" ? id.text.trim() : String(i + 1);
    found.set(name, operation && { W: operation.W, t: constantsOf(text) });
  });
  return found;
}

function constantsOf(text: string): Vec3 {
  const { n, d } = writtenTranslation(text);
  return [n[0] / d, n[1] / d, n[2] / d];
}

/** What the numbers in symmetry codes mean. */
export interface CodeList {
  /** In the order of the group: number, and the operation as codes of the file mean it. */
  readonly operations: readonly { readonly number: string; readonly xyz: string }[];
  /** Whether the numbers are those of the list in the file, or of the list given here. */
  readonly numbering: "file" | "here";
  /**
   * Code of an operation of the group followed by whole cells, `3_655`; null where a digit does not hold the cells.
   * @param operation index in the group
   */
  readonly code: (operation: number, cells: IntVec3) => string | null;
}

/** Codes as the list of operations in the block numbers them; without such a list, in the order of the group, from 1. */
export function codeList(crystal: Crystal, block: CifBlock | null): CodeList {
  const { operations } = crystal.group;
  const written = block && crystal.symmetrySource === "operations" ? ownList(crystal, block) : null;
  const entries = operations.map((_, i) => written?.get(i) ?? { number: String(i + 1), cells: [0, 0, 0] as IntVec3 });
  return {
    numbering: written ? "file" : "here",
    operations: operations.map((a, i) => {
      const { number, cells } = entries[i]!;
      const n = a.w.n.map((e, k) => e + cells[k]! * a.w.d) as unknown as IntVec3;
      return { number, xyz: formatOperation({ W: a.W, w: { n, d: a.w.d } }) };
    }),
    code: (operation, cells) => {
      const { number, cells: own } = entries[operation]!;
      const digits = cells.map((e, k) => 5 + e - own[k]!);
      return digits.some((e) => e < 0 || e > 9) ? null : `${number}_${digits.join("")}`;
    },
  };
}

/** Per operation of the group its number in the file and the whole cells in its translation; null where some are absent. */
function ownList(crystal: Crystal, block: CifBlock): Map<number, { number: string; cells: IntVec3 }> | null {
  const index = new Map(crystal.group.operations.map((a, i) => [operationKey(reduce(a)), i]));
  const found = new Map<number, { number: string; cells: IntVec3 }>();
  const declared = declaredSymmetry(block).operations;
  const written = [...writtenOperations(block, declared)];
  if (written.length !== declared.length) return null; // two lines of one number
  declared.forEach(({ operation }, k) => {
    const [number, image] = written[k]!;
    const i = operation && index.get(operationKey(reduce(operation)));
    if (i === undefined || i === null || !image || found.has(i)) return;
    const { w } = crystal.group.operations[i]!;
    const cells = image.t.map((e, j) => Math.round(e - w.n[j]! / w.d) + 0) as unknown as IntVec3;
    found.set(i, { number, cells });
  });
  return found.size === crystal.group.operations.length ? found : null;
}
