import { inverseRatMat, RAT_IDENTITY, type RatMat3, transpose } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import {
  chain,
  IDENTITY_TRANSFORMATION,
  type Operation,
  reduce,
  reverse,
  spaceGroup,
  type Transformation,
  transformOperation,
} from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import { apply3, cellOfMetric, type Metric, metricOf, multiply3, type Vec3 } from "./cell.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { exactOrigin } from "./exact-origin.ts";
import { invariantMetric } from "./invariant-metric.ts";
import { wrap } from "./orbit.ts";
import { latticeIn, preferredReference } from "./preferred-reference.ts";
import { symmetrisedAtoms } from "./symmetrised-atoms.ts";
import type { SymmetrySearch } from "./symmetry-search.ts";

/** The cell that a symmetrised structure is written in: that of the file, or the reference setting of its type. */
export type CellChoice = "given" | "conventional";

/** A structure with the symmetry found, exactly. */
export interface SymmetrisedCrystal {
  readonly crystal: Crystal;
  /** From the cell given, its origin shifted, to that of the crystal: (a', b', c') = (a, b, c) P, x = P x' + p. */
  readonly transformation: Transformation;
  /** The origin of the cell given is moved by this first; 0 unless the declared group leaves it free; fractional. */
  readonly originShift: Vec3;
  /** From the axes of the folded atoms, about the origin of the group found. */
  readonly fromFolded: Transformation;
  /** The operations of the search, in its order, in the cell of the crystal. */
  readonly operations: readonly Operation[];
  /** For each site of the crystal: the sites of the file it stands for, and how far their atoms moved, angstrom. */
  readonly origins: readonly { readonly labels: readonly string[]; readonly moved: number }[];
  /** Distances by which the atoms of the cell given were moved, angstrom. */
  readonly moved: { readonly largest: number; readonly mean: number };
}

/** Atoms of the symmetrised structure lie on special positions exactly; this is rounding; angstrom. */
const ON_SPECIAL = 1e-3;

/**
 * The structure with every atom at the mean of its images, in the cell wanted; s.u. and displacement parameters are
 * left out, since they belong to the atoms as they were.
 * @throws InputProblem `cell-not-kept` if the group found has no integer rotation parts in the cell given
 */
export function symmetrisedCrystal(crystal: Crystal, search: SymmetrySearch, choice: CellChoice): SymmetrisedCrystal {
  const frame = frameOf(crystal, search, choice);
  const group = spaceGroup([...frame.operations, ...latticeIn(frame.fromFolded.P)]);
  const { moves, orbits } = symmetrisedAtoms(search);
  const metric = invariantMetric(metricIn(crystal.metric, frame.transformation.P), group);
  const { sites, origins } = representatives(crystal, search, frame, choice, { moves, orbits });
  const distances = moves.map((m) => Math.hypot(...m));
  return {
    crystal: crystalOf({ name: crystal.name, metric, group, sites, tolerance: ON_SPECIAL }),
    transformation: frame.transformation,
    originShift: frame.originShift,
    fromFolded: frame.fromFolded,
    operations: frame.operations,
    origins,
    moved: {
      largest: distances.reduce((m, d) => Math.max(m, d), 0),
      mean: distances.reduce((s, d) => s + d, 0) / distances.length,
    },
  };
}

interface AnswerFrame {
  readonly transformation: Transformation;
  readonly originShift: Vec3;
  /** From the axes of the folded atoms. */
  readonly fromFolded: Transformation;
  readonly operations: readonly Operation[];
}

function frameOf(crystal: Crystal, { folded, exact }: SymmetrySearch, choice: CellChoice): AnswerFrame {
  const { basis } = folded;
  const measured = apply3(floatMatrix(basis), exact.origin);
  const { origin, shift } = exactOrigin(crystal.metric, crystal.group, { basis, ...exact }, measured);
  const toFolded: Transformation = { P: basis, p: origin };
  const fromFolded =
    choice === "given"
      ? chain(reverse(toFolded), IDENTITY_TRANSFORMATION)
      : preferredReference(folded.atoms.axes, exact.operations).transformation;
  const transformation = choice === "given" ? IDENTITY_TRANSFORMATION : chain(toFolded, fromFolded);
  const operations = exact.operations.map((a) => {
    const moved = transformOperation(a, fromFolded);
    if (!moved) throw notKept();
    return reduce(moved);
  });
  return { transformation, originShift: shift, fromFolded, operations };
}

function notKept(): InputProblem {
  return new InputProblem(
    "cell-not-kept",
    "the symmetry found does not keep the cell given: a rotation part has no integer matrix in it",
    null,
    "ask for the conventional cell instead",
  );
}

function metricIn(metric: Metric, P: RatMat3): Metric {
  if (P.d === 1 && P.n.every((e, i) => e === RAT_IDENTITY.n[i])) return metric;
  const m = floatMatrix(P);
  const t = floatMatrix({ n: transpose(P.n), d: P.d });
  return metricOf(cellOfMetric(multiply3(t, multiply3(metric.g, m))));
}

interface Placed {
  readonly moves: readonly Vec3[];
  readonly orbits: Int32Array;
}

/** One site for each orbit: the first of the file, where the group wants it. */
function representatives(
  crystal: Crystal,
  { given }: SymmetrySearch,
  { transformation, originShift }: AnswerFrame,
  choice: CellChoice,
  { moves, orbits }: Placed,
) {
  const back = floatMatrix(inverseRatMat(transformation.P));
  const { n, d } = transformation.p;
  const members = new Map<number, number[]>();
  orbits.forEach((first, i) => {
    const list = members.get(first);
    if (list) list.push(i);
    else members.set(first, [i]);
  });
  const sites: AtomSite[] = [];
  const origins: { labels: string[]; moved: number }[] = [];
  for (const [first, atoms] of members) {
    const site = crystal.sites[given[first]!.site]!;
    const move = apply3(crystal.metric.toFractional, moves[first]!);
    // the first atom given of a site is the listed one, up to whole cells
    const at = site.symmetry.point.map((e, i) => e - move[i]! - originShift[i]! - n[i]! / d) as unknown as Vec3;
    const x = apply3(back, at);
    const position: Vec3 = choice === "given" ? x : [wrap(x[0]), wrap(x[1]), wrap(x[2])];
    sites.push({ ...listed(site), position });
    const labels = [...new Set(atoms.map((i) => given[i]!.site))].map((s) => crystal.sites[s]!.label);
    const moved = atoms.reduce((m, i) => Math.max(m, Math.hypot(...moves[i]!)), 0);
    origins.push({ labels, moved });
  }
  return { sites, origins };
}

/** What is kept of a row of the atom list. */
function listed(site: AtomSite): AtomSite {
  const { label, typeSymbol, element, charge, position, occupancy, assembly, disorderGroup, span } = site;
  const su = [null, null, null] as const;
  return {
    label,
    typeSymbol,
    element,
    charge,
    position,
    su,
    occupancy,
    assembly,
    disorderGroup,
    displacement: null,
    span,
  };
}
