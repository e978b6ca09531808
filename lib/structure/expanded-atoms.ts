import { type IntVec3, inverseRatMat, lcm, RAT_IDENTITY, type RatMat3 } from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { IDENTITY_TRANSFORMATION, type Transformation } from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import { apply3, type Metric, reciprocalLengths, type Vec3 } from "./cell.ts";
import { AtomAction, type CellAtom, cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import { axesInPrimitive, type CellTranslations, translationsBetween } from "./cell-lattice.ts";
import { metricIn } from "./change-of-cell.ts";
import type { Crystal } from "./crystal.ts";
import { wrapOf } from "./image-wrap.ts";
import { translatedOperations } from "./translated-operations.ts";

/** An atom of the crystal, and how it comes from the list: by an operation of the group, then whole cells. */
export interface ExpandedAtom {
  /** Index of the site in the crystal. */
  readonly site: number;
  /** Index in the operations of the group. */
  readonly operation: number;
  /** Whole cells of the crystal added to the image by that operation of the listed atom. */
  readonly cells: IntVec3;
  /** Fractional in the cell asked for. */
  readonly position: Vec3;
}

/** From and to, in fractions of an axis. */
export type Interval = readonly [number, number];

export interface ExpansionOptions {
  /** The cell that is filled, in terms of that of the crystal; its own by default. */
  readonly transformation?: Transformation;
  /** Groups of atoms that stay together, each placed by its centroid; every atom by itself by default. */
  readonly pieces?: readonly (readonly LatticeAtom[])[];
  /** Fractional coordinates wanted instead of those from 0 to 1 (exclusive). */
  readonly range?: readonly [Interval, Interval, Interval];
  /** Whether a range holds what lies on its ends. */
  readonly boundary?: "in" | "out";
}

/** Atoms nearer to an end of a range than this lie on it; angstrom. */
const ON_BOUNDARY = 1e-3;
/** Rounding of sums of doubles, in fractions of an axis. */
const ROUNDING = 1e-9;
/** More atoms than this are refused. */
export const MOST_ATOMS = 4_000_000;

/**
 * Every atom of a cell, or of a range of coordinates: site by site, image by image, lattice point by lattice point.
 * No symmetry of the new cell is needed, so any cell can be filled; linear in the number of atoms.
 * @throws InputProblem `cell-left-handed`, `cell-no-lattice`, `cell-too-large`, `range-empty`
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const atoms = expandedAtoms(halite, { transformation: multiplesOf(2, 2, 2) });
 * atoms.length; // 64
 * const shell = expandedAtoms(halite, { range: [[0, 1], [0, 1], [0, 0]], boundary: "in" });
 * shell.filter((a) => a.site === 0).length; // 5
 * ```
 */
export function expandedAtoms(crystal: Crystal, options: ExpansionOptions = {}): ExpandedAtom[] {
  const { transformation = IDENTITY_TRANSFORMATION } = options;
  const { P } = transformation;
  const atoms = cellAtoms(crystal);
  const given = options.pieces ?? atoms.map((_, atom): LatticeAtom[] => [{ atom, shift: [0, 0, 0] }]);
  const isWhole = P.d === 1;
  const pieces = isWhole ? given : withoutCentrings(crystal, atoms, given);
  const M = axesInPrimitive(crystal.group, P);
  const points = isWhole ? translationsBetween(RAT_IDENTITY, P.n) : translationsBetween(crystal.group.primitive, M);
  const box = boxOf(options, metricIn(crystal.metric, P));
  const share = options.range?.reduce((v, [lo, hi]) => v * Math.max(0, hi - lo), 1) ?? 1;
  const count = pieces.reduce((s, p) => s + p.length, 0) * points.n.length * share;
  if (count > MOST_ATOMS) throw tooMany(count);
  return new Expansion(crystal, atoms, transformation, points).fill(pieces, box);
}

function tooMany(count: number): InputProblem {
  return new InputProblem(
    "cell-too-large",
    `that are some ${Math.round(count)} atoms, more than ${MOST_ATOMS}`,
    null,
    "choose a smaller cell or range",
  );
}

/** Pieces of which no two differ by a centring of the cell. */
function withoutCentrings(
  crystal: Crystal,
  atoms: readonly CellAtom[],
  pieces: readonly (readonly LatticeAtom[])[],
): (readonly LatticeAtom[])[] {
  const action = new AtomAction(crystal, atoms);
  const { group } = crystal;
  const centrings = group.operations.filter((a) => a.W.join() === RAT_IDENTITY.n.join());
  const seen = new Set<number>();
  return pieces.filter((piece) => {
    if (seen.has(piece[0]!.atom)) return false;
    for (const g of centrings) for (const m of piece) seen.add(action.image(g, m).atom);
    return true;
  });
}

/** Bounds of coordinates, widened or narrowed by what counts as lying on them. */
interface Box {
  readonly low: Vec3;
  readonly high: Vec3;
  readonly isCell: boolean;
}

function boxOf({ range, boundary = "in" }: ExpansionOptions, metric: Metric): Box {
  if (!range) return { low: [0, 0, 0], high: [1, 1, 1], isCell: true };
  const sign = boundary === "in" ? 1 : -1;
  const margin = reciprocalLengths(metric).map((e) => sign * ON_BOUNDARY * e);
  const empty = range.findIndex(([lo, hi]) => !(lo <= hi));
  if (empty >= 0) {
    const [lo, hi] = range[empty]!;
    throw new InputProblem(
      "range-empty",
      `a range from ${lo} to ${hi} holds nothing`,
      null,
      "give the lower end first",
    );
  }
  return {
    low: range.map(([lo], i) => lo - margin[i]!) as unknown as Vec3,
    high: range.map(([, hi], i) => hi + margin[i]!) as unknown as Vec3,
    isCell: false,
  };
}

class Expansion {
  private readonly crystal: Crystal;
  private readonly atoms: readonly CellAtom[];
  private readonly P: RatMat3;
  private readonly points: CellTranslations;
  /** Common denominator of the lattice points and of P. */
  private readonly d: number;
  private readonly toNew: (x: Vec3) => [number, number, number];
  private readonly translated: ReturnType<typeof translatedOperations>;
  /** Per atom of the cell: whole cells between it and the image of the listed point. */
  private readonly wraps: readonly IntVec3[];
  private readonly found: ExpandedAtom[] = [];

  constructor(crystal: Crystal, atoms: readonly CellAtom[], { P, p }: Transformation, points: CellTranslations) {
    this.crystal = crystal;
    this.atoms = atoms;
    this.P = P;
    this.points = points;
    this.d = lcm(points.d, P.d);
    const M = floatMatrix(inverseRatMat(P));
    this.toNew = (x) => apply3(M, [x[0] - p.n[0] / p.d, x[1] - p.n[1] / p.d, x[2] - p.n[2] / p.d]);
    this.translated = translatedOperations(crystal.group, this.d);
    this.wraps = atoms.map((atom) => wrapOf(crystal, atom));
  }

  fill(pieces: readonly (readonly LatticeAtom[])[], box: Box): ExpandedAtom[] {
    const k = this.d / this.points.d;
    for (const piece of pieces) {
      for (const n of this.points.n) this.place(piece, [n[0] * k, n[1] * k, n[2] * k], box);
    }
    return this.found;
  }

  /** A piece moved by t / d, in all the cells of the new lattice in which the box holds its centroid. */
  private place(piece: readonly LatticeAtom[], t: IntVec3, box: Box): void {
    const moved = piece.map(({ atom, shift }) => {
      const x = this.atoms[atom]!.position;
      return this.toNew([0, 1, 2].map((i) => x[i]! + shift[i]! + t[i]! / this.d) as unknown as Vec3);
    });
    const centroid = [0, 1, 2].map((i) => moved.reduce((s, x) => s + x[i]!, 0) / moved.length);
    const [a, b, c] = centroid.map((e, i) => cellsInside(e, box.low[i]!, box.high[i]!, box.isCell));
    for (const u of a!) {
      for (const v of b!) for (const w of c!) this.add(piece, moved, t, [u, v, w]);
    }
  }

  private add(piece: readonly LatticeAtom[], moved: readonly Vec3[], t: IntVec3, s: IntVec3): void {
    const k = this.d / this.P.d;
    const m = this.P.n;
    // the whole translation in the cell of the crystal, over d
    const n = [0, 1, 2].map((i) => t[i]! + k * (m[3 * i]! * s[0] + m[3 * i + 1]! * s[1] + m[3 * i + 2]! * s[2]));
    for (let j = 0; j < piece.length; j++) {
      const { atom, shift } = piece[j]!;
      const { site, image } = this.atoms[atom]!;
      const first = this.crystal.sites[site]!.images[image]!.operation;
      const { operation, cells } = this.translated(first, n as unknown as IntVec3);
      const wrap = this.wraps[atom]!;
      const x = moved[j]!;
      this.found.push({
        site,
        operation,
        cells: [cells[0] + shift[0] + wrap[0], cells[1] + shift[1] + wrap[1], cells[2] + shift[2] + wrap[2]],
        position: [clean(x[0] + s[0]), clean(x[1] + s[1]), clean(x[2] + s[2])],
      });
    }
  }
}

/** Whole numbers that carry a coordinate into a range; exactly one where the range is a cell. */
function cellsInside(x: number, low: number, high: number, isCell: boolean): number[] {
  if (isCell) return [-Math.floor(x + ROUNDING)];
  const list: number[] = [];
  for (let s = Math.ceil(low - x); x + s <= high; s++) list.push(s);
  return list;
}

function clean(x: number): number {
  return Math.abs(x) < ROUNDING ? 0 : x;
}
