import {
  equalVectors,
  IDENTITY,
  inverseRatMat,
  multiplyRatMat,
  type RatMat3,
  ratMat3,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import {
  type BravaisType,
  chain,
  groupProperties,
  identify,
  type Operation,
  reduce,
  spaceGroup,
  type Transformation,
  transformOperation,
} from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import { multiply3 } from "./cell.ts";
import { axisChoice, precedes } from "./conventional-cell.ts";
import { gramOf, type LatticeAxes } from "./lattice-axes.ts";

/** Identifications that are tried at most for one with better axes. */
const MOST_TRIALS = 40;

/**
 * The way to the reference setting of a group, with the shortest axes that setting allows: a and c short and beta not
 * acute for monoclinic groups, a, b, c ascending for orthorhombic ones as far as their symbol permits.
 * @param axes of the cell the operations are written in, primitive and reduced
 */
export function preferredReference(
  axes: LatticeAxes,
  operations: readonly Operation[],
): { readonly number: number; readonly transformation: Transformation } {
  const { number, transformation } = identify(operations);
  const { bravaisType, crystalFamily } = groupProperties(number, operations);
  const choice = axisChoice(crystalFamily === "monoclinic" ? "mP" : orthorhombicChoice(bravaisType));
  if (!choice) return { number, transformation };
  const gram = (P: RatMat3) => gramOf(multiply3(axes, floatMatrix(P)));
  const start = choice.order(gram(transformation.P));
  const better = choice.changes
    .map((N) => ({ N, order: choice.order(gram(multiplyRatMat(transformation.P, ratMat3(N)))) }))
    .filter(({ order }) => precedes(order, start))
    .sort((a, b) => (precedes(a.order, b.order) ? -1 : precedes(b.order, a.order) ? 1 : 0));
  const conventional = inCell(operations, transformation);
  for (const { N } of better.slice(0, MOST_TRIALS)) {
    const change: Transformation = { P: ratMat3(N), p: ZERO_VECTOR };
    const again = identify(inCell(conventional, change)).transformation;
    if (again.P.d !== 1 || again.P.n.some((e, i) => e !== IDENTITY[i])) continue; // its symbol would change
    return { number, transformation: chain(transformation, chain(change, again)) };
  }
  return { number, transformation };
}

function orthorhombicChoice(type: BravaisType): BravaisType {
  return type === "oS" ? "oP" : type; // the letter of the reference setting decides which axes may change
}

/** All operations of a group in a cell of the same lattice or of a sublattice, modulo that cell. */
export function inCell(operations: readonly Operation[], change: Transformation): readonly Operation[] {
  const moved = operations.map((a) => {
    const image = transformOperation(a, change);
    if (!image) throw new RangeError("a cell that is not kept by the group");
    return reduce(image);
  });
  return spaceGroup([...moved, ...latticeIn(change.P)]).operations;
}

/** The axes of the old cell as translations of the new one. */
export function latticeIn(P: RatMat3): Operation[] {
  const { n, d } = inverseRatMat(P);
  return [0, 1, 2]
    .map((j) => reduce({ W: IDENTITY, w: { n: [n[j]!, n[3 + j]!, n[6 + j]!], d } }))
    .filter((t) => !equalVectors(t.w, ZERO_VECTOR));
}
