import type { Metric } from "../structure/index.ts";
import { isSystematicallyAbsent, reflectionConditions, rotationParts, type SpaceGroup } from "../symmetry/index.ts";
import { type ConditionTest, testCondition } from "./condition-test.ts";
import { changeIndices, type IndexMatrix } from "./index-matrix.ts";
import { type Family, familiesOf, mergingFigures } from "./merge-reflections.ts";
import { type Observation, observe } from "./observations.ts";
import { asSquares, type ReflectionList } from "./reflection-list.ts";

/** A list of reflections with its indices in the cell of the structure, set against the declared group. */
export interface IndexedList {
  /** Null where the indices are used as listed. */
  readonly matrix: IndexMatrix | null;
  /** Why the matrix was used or left, in words; empty where there was nothing to choose. */
  readonly why: string;
  readonly families: readonly Family[];
  /** Reflections in use, and those left out since their new indices are no integers. */
  readonly used: number;
  readonly fractional: number;
  /** Against the declared group; empty without one. */
  readonly observations: readonly Observation[];
  readonly conditions: readonly ConditionTest[];
  /** Merging R in the Laue class of the declared group; null where nothing can be compared or no group is declared. */
  readonly rInt: number | null;
}

/** Merging R values that differ by less are no reason to prefer one indexing. Dimensionless. */
const SAME_R = 0.05;

/**
 * Settles in which cell a list is indexed: as it stands or, if the file holds a matrix, in the cell the matrix comes
 * from. The indexing that violates fewer conditions of the declared group counts, then the better agreement of
 * equivalents; if both do equally well, a plain text is read with the matrix, since such a matrix is written for it.
 */
export function chooseIndexing(
  list: ReflectionList,
  matrices: readonly IndexMatrix[],
  metric: Metric,
  declared: SpaceGroup | null,
): IndexedList {
  const asListed = indexedBy(list, null, metric, declared);
  const applicable = matrices.filter((m) => !m.diffractionListOnly || list.kind === "diffrn_refln");
  const changed = applicable.map((m) => indexedBy(list, m, metric, declared));
  const best = changed.sort((a, b) => violations(a) - violations(b) || (a.rInt ?? 0) - (b.rInt ?? 0))[0];
  if (!best) return asListed;
  const [mine, theirs] = [violations(asListed), violations(best)];
  if (mine !== theirs) {
    const text =
      "as listed, the indices violate reflection conditions of the declared group that they meet with the matrix";
    return theirs < mine
      ? { ...best, why: text }
      : { ...asListed, why: "with the matrix, more conditions are violated" };
  }
  const [r, s] = [asListed.rInt ?? 0, best.rInt ?? 0];
  if (Math.abs(r - s) > SAME_R) {
    const why = `equivalents agree better: R ${Math.min(r, s).toFixed(3)} against ${Math.max(r, s).toFixed(3)}`;
    return s < r ? { ...best, why } : { ...asListed, why };
  }
  const plain = list.kind === "text" || list.kind === "diffrn_refln";
  const why = "absences and equivalents fit either way";
  return plain ? { ...best, why } : { ...asListed, why };
}

/** The list under a matrix, or as it stands. */
export function indexedBy(
  list: ReflectionList,
  matrix: IndexMatrix | null,
  metric: Metric,
  declared: SpaceGroup | null,
): IndexedList {
  const squares = asSquares(list).filter((r) => r.h.some((e) => e !== 0));
  const { reflections, fractional } = matrix
    ? changeIndices(squares, matrix.M)
    : { reflections: squares, fractional: 0 };
  const families = familiesOf(reflections);
  const rotations = declared ? rotationParts(declared) : [];
  const observations = declared
    ? observe(families, metric, rotations, (h) => isSystematicallyAbsent(declared.operations, h))
    : [];
  const conditions = declared
    ? reflectionConditions(declared).map((c) => testCondition(c, declared, observations))
    : [];
  const rInt = declared ? mergingFigures(families, rotations).rInt : null;
  return { matrix, why: "", families, used: reflections.length, fractional, observations, conditions, rInt };
}

/** Violated conditions; reflections without integer indices count as one more. */
function violations({ conditions, fractional, used }: IndexedList): number {
  return conditions.filter((c) => c.verdict === "violated").length + (fractional > 0.01 * used ? 1 : 0);
}
