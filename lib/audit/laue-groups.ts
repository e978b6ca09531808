import { equal, IDENTITY, type IntMat3, multiply, negate, ZERO_VECTOR } from "../algebra/index.ts";
import { type GroupProperties, groupProperties, identify } from "../symmetry/index.ts";
import { type Family, indexKey, largestKey, mergeFamily, mergingFigures } from "./merge-reflections.ts";

/** A Laue class in one of the orientations that the lattice allows, with the agreement of its equivalents. */
export interface LaueGroup {
  /** `2/m`, `-3m`. */
  readonly laueClass: GroupProperties["laueClass"];
  /** Rotation parts of determinant 1, in the basis of the lattice; with their opposites they are all. */
  readonly rotations: readonly IntMat3[];
  /** Sum |I - <I>| / sum I over all equivalents, Friedel mates among them; null where no value has an equivalent. */
  readonly rInt: number | null;
  readonly compared: number;
  /**
   * The worst of its rotations: sum |I(h) - I(hW)| / sum (I(h) + I(hW)); 0.5 for unrelated acentric, 0.64 for unrelated
   * centric intensities; null where none could be tested.
   */
  readonly rWorst: number | null;
  readonly accepted: boolean;
}

export interface LaueTests {
  /** The highest first. */
  readonly groups: readonly LaueGroup[];
  /** The highest of those accepted, the one of the best agreement among several. */
  readonly chosen: LaueGroup;
  /** What equivalents may differ by, from Friedel mates, repeated values and uncertainties. */
  readonly rBase: number;
  /** Limit for `rWorst`. */
  readonly limit: number;
}

/**
 * A rotation is accepted up to twice what equivalents differ by anyway, and 0.05 for absorption and scaling that
 * Friedel mates do not show; never above 0.35, where unrelated intensities with heavy atoms begin. Dimensionless.
 */
const LIMIT = { factor: 2, addend: 0.05, most: 0.35 } as const;

/**
 * Tests every Laue class that the lattice allows against the intensities.
 * @param families with indices in the basis of the rotations
 * @param lattice rotation parts of determinant 1 of the lattice's point group
 */
export function testLaueGroups(families: readonly Family[], lattice: readonly IntMat3[]): LaueTests {
  const rBase = basicDisagreement(families);
  const limit = Math.min(LIMIT.most, LIMIT.factor * rBase + LIMIT.addend);
  const means = new Map(families.map((f) => [largestKey(f.h, [IDENTITY, negate(IDENTITY)]), mergeFamily(f).value]));
  const byRotation = new Map(lattice.map((W) => [W.join(), equal(W, IDENTITY) ? 0 : disagreement(means, families, W)]));
  const groups = subgroups(lattice).map((rotations): LaueGroup => {
    const tested = rotations.flatMap((W) => byRotation.get(W.join()) ?? []);
    const rWorst = rotations.length > 1 && tested.length > 1 ? Math.max(...tested) : null;
    const { number } = identify([...rotations, ...rotations.map(negate)].map((W) => ({ W, w: ZERO_VECTOR })));
    const figures = mergingFigures(families, rotations);
    const { laueClass } = groupProperties(number);
    return { laueClass, rotations, ...figures, rWorst, accepted: (rWorst ?? 0) <= limit };
  });
  groups.sort((a, b) => b.rotations.length - a.rotations.length || (a.rWorst ?? 0) - (b.rWorst ?? 0));
  return { groups, chosen: groups.find((g) => g.accepted)!, rBase, limit }; // the class -1 has nothing to refuse
}

/** Mean |I1 - I2| / (I1 + I2) of two values of one intensity with normal errors s, in units of s/I. */
const NOISE = 1 / Math.sqrt(Math.PI);

function basicDisagreement(families: readonly Family[]): number {
  const { rInt } = mergingFigures(families, [IDENTITY]);
  let [sigma, value] = [0, 0];
  for (const family of families) {
    const merged = mergeFamily(family);
    sigma += merged.sigma ?? 0;
    value += merged.value;
  }
  return Math.max(rInt ?? 0, value > 0 ? (NOISE * sigma) / value : 0);
}

/** Null where no reflection is measured together with a different image of it. */
function disagreement(means: ReadonlyMap<number, number>, families: readonly Family[], W: IntMat3): number | null {
  const images = [W, negate(W)];
  let [difference, sum] = [0, 0];
  for (const { h } of families) {
    const own = indexKey(h[0], h[1], h[2]);
    const image = largestKey(h, images);
    const [a, b] = [means.get(own), means.get(image)];
    if (image === own || a === undefined || b === undefined) continue;
    difference += Math.abs(a - b);
    sum += a + b;
  }
  return sum > 0 ? difference / sum : null;
}

/** All subgroups of a group of rotations; those of the cube and of the hexagonal prism need no more than two generators. */
function subgroups(rotations: readonly IntMat3[]): IntMat3[][] {
  const found = new Map<string, IntMat3[]>();
  for (const a of rotations) {
    for (const b of rotations) {
      const group = generatedBy([a, b]);
      found.set(
        group
          .map((W) => W.join())
          .sort()
          .join(" "),
        group,
      );
    }
  }
  return [...found.values()];
}

function generatedBy(generators: readonly IntMat3[]): IntMat3[] {
  const found: IntMat3[] = [IDENTITY];
  for (let i = 0; i < found.length; i++) {
    for (const g of generators) {
      const product = multiply(found[i]!, g);
      if (!found.some((m) => equal(m, product))) found.push(product);
    }
  }
  return found;
}
