import { equal, IDENTITY, inverseRatMat, type RatMat3, ratMat3, transpose, ZERO_VECTOR } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import {
  IDENTITY_OPERATION,
  LARGEST_GROUP,
  type Operation,
  reduce,
  reverse,
  type SpaceGroup,
  spaceGroup,
  type Transformation,
  transformOperation,
} from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import { carriedAtom } from "./carried-atom.ts";
import { apply3, cellOfMetric, type Metric, metricOf, multiply3, type Vec3 } from "./cell.ts";
import { AtomAction, cellAtoms } from "./cell-atoms.ts";
import { translationsIn } from "./cell-lattice.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { FreeLabels } from "./free-labels.ts";

/** A crystal in another cell. */
export interface ChangedCell {
  readonly crystal: Crystal;
  /** From the cell before: (a', b', c') = (a, b, c) P, x = P x' + p. */
  readonly transformation: Transformation;
  /** Rotation parts before and after: fewer where the new cell has not the shape that some of them need. */
  readonly rotations: { readonly before: number; readonly after: number };
}

/** The metric of the axes (a, b, c) P. */
export function metricIn(metric: Metric, P: RatMat3): Metric {
  if (P.d === 1 && equal(P.n, IDENTITY)) return metric;
  const m = floatMatrix(P);
  const t = floatMatrix({ n: transpose(P.n), d: P.d });
  return metricOf(cellOfMetric(multiply3(t, multiply3(metric.g, m))));
}

/**
 * The same crystal in another cell, with all the symmetry that the cell can hold: the operations whose rotation parts
 * are integer in it, with every translation of the crystal. Worked out exactly; an orbit that falls apart under fewer
 * operations gets a site for each part.
 * @throws InputProblem `cell-left-handed`, `cell-no-lattice`, `cell-too-large`, `operations-too-many`
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const { crystal, rotations } = changeOfCell(halite, multiplesOf(1, 1, 2));
 * rotations; // { before: 48, after: 16 }
 * crystal.identified.summary.hermannMauguin; // "I 4/m m m"
 * crystal.metric.volume / halite.metric.volume; // 2
 * ```
 */
export function changeOfCell(crystal: Crystal, transformation: Transformation): ChangedCell {
  const { representatives, centrings } = crystal.group;
  const points = translationsIn(crystal.group, transformation.P).n.length;
  const kept = keptRotations(crystal.group, transformation);
  if (kept.size * points > LARGEST_GROUP) throw tooMany(kept.size * points);
  const group = groupIn(crystal.group, transformation, kept);
  const operations = crystal.group.operations.filter((a) => kept.has(a.W.join()));
  const metric = metricIn(crystal.metric, transformation.P);
  const sites = splitOrbits(crystal, operations, transformation, metric);
  const { name, tolerance } = crystal;
  const isUnchanged = kept.size === representatives.length && points === centrings.length && isIdentity(transformation);
  return {
    crystal: isUnchanged ? crystal : crystalOf({ name, metric, group, sites, tolerance }),
    transformation,
    rotations: { before: representatives.length, after: kept.size },
  };
}

function isIdentity({ P, p }: Transformation): boolean {
  return P.d === 1 && equal(P.n, IDENTITY) && p.n.every((e) => e === 0);
}

function tooMany(count: number): InputProblem {
  return new InputProblem(
    "operations-too-many",
    `the group has ${count} operations in the new cell, more than the ${LARGEST_GROUP} that are listed`,
    null,
    "ask for the atoms without symmetry (--p1)",
  );
}

/** Rotation parts, as text, that keep the lattice of the new cell. */
function keptRotations(group: SpaceGroup, t: Transformation): ReadonlySet<string> {
  const back = reverse(t);
  return new Set(group.representatives.flatMap((a) => (transformOperation(a, t, back) ? [a.W.join()] : [])));
}

function groupIn(group: SpaceGroup, t: Transformation, kept: ReadonlySet<string>): SpaceGroup {
  const back = reverse(t);
  const moved = group.representatives
    .filter((a) => kept.has(a.W.join()))
    .map((a) => reduce(transformOperation(a, t, back)!));
  const lattice = [...group.centrings, ...[0, 1, 2].map((j) => ratVecOfColumn(j))].flatMap((w): Operation[] => {
    // a translation has no rotation part, so its matrix stays the identity
    const translation = transformOperation({ W: IDENTITY, w }, t, back)!;
    return [reduce(translation)];
  });
  return spaceGroup([IDENTITY_OPERATION, ...moved, ...lattice]);
}

function ratVecOfColumn(j: number) {
  const n = [0, 1, 2].map((i) => (i === j ? 1 : 0)) as unknown as typeof ZERO_VECTOR.n;
  return { n, d: 1 };
}

/** One site for each orbit of the operations kept: the listed atom where it can be, else the first of its images. */
function splitOrbits(
  crystal: Crystal,
  operations: readonly Operation[],
  transformation: Transformation,
  to: Metric,
): AtomSite[] {
  const atoms = cellAtoms(crystal);
  const action = new AtomAction(crystal, atoms);
  const labels = new FreeLabels(crystal.sites.map((s) => s.label));
  const M = floatMatrix(inverseRatMat(transformation.P));
  const { n, d } = transformation.p;
  const seen = new Set<number>();
  const sites: AtomSite[] = [];
  atoms.forEach((atom, index) => {
    if (seen.has(index)) return;
    for (const g of operations) seen.add(action.image(g, { atom: index, shift: [0, 0, 0] }).atom);
    const site = crystal.sites[atom.site]!;
    const isListed = atom.image === 0;
    const at = isListed ? site.symmetry.point : atom.position;
    const position = apply3(M, at.map((e, i) => e - n[i]! / d) as unknown as Vec3);
    const W = isListed ? IDENTITY : crystal.group.operations[site.images[atom.image]!.operation]!.W;
    sites.push({
      ...carriedAtom(site, position, { W, M, from: crystal.metric, to }),
      label: isListed ? site.label : labels.next(site.label),
    });
  });
  return sites;
}

/** The change to axes that are so many times as long. */
export function multiplesOf(a: number, b: number, c: number): Transformation {
  return { P: ratMat3([a, 0, 0, 0, b, 0, 0, 0, c]), p: ZERO_VECTOR };
}
