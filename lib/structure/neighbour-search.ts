import { type Metric, reciprocalLengths, type Vec3 } from "./cell.ts";

/** Boxes per atom that still pay; a nearly empty cell is not cut finer. */
const BOXES_PER_ATOM = 2;

/** Distances are rounded to this, so that equivalent pairs agree exactly when compared with a limit; angstrom. */
const ROUNDING = 1e-9;

/** A pair of atoms: the second one is meant shifted by whole cells. */
export interface Contact {
  readonly first: number;
  readonly second: number;
  /** Whole cells to be added to the fractional coordinates of the second atom. */
  readonly shift: readonly [number, number, number];
  /** angstrom */
  readonly distance: number;
}

/** Answer of a search, with the work it took, so that linear growth can be tested without a clock. */
export interface SearchResult {
  readonly contacts: readonly Contact[];
  /** Pairs whose distance was computed. */
  readonly compared: number;
}

/**
 * All pairs of atoms of a periodic crystal nearer than a limit, each pair once, an atom and its own images included.
 * The cell is cut into boxes and only boxes within reach are compared, over as many cells as the reach spans: linear
 * in the number of atoms at given density.
 * @param points fractional coordinates, anywhere
 * @param reach largest distance wanted, angstrom
 * @param limit largest distance wanted for a pair of points, at most `reach`; angstrom
 */
export function contactsWithin(
  metric: Metric,
  points: readonly Vec3[],
  reach: number,
  limit: (first: number, second: number) => number = () => reach,
): SearchResult {
  const grid = new BoxGrid(metric, points, reach);
  const contacts: Contact[] = [];
  let compared = 0;
  const compare = (first: number, second: number, t: readonly [number, number, number]) => {
    if (second < first || (second === first && !isForward(t))) return;
    compared++;
    const distance = grid.distance(first, second, t);
    if (distance > reach || distance > limit(first, second)) return;
    contacts.push({ first, second, shift: grid.unwrapped(first, second, t), distance });
  };
  for (let i = 0; i < points.length; i++) grid.around(i, compare);
  return { contacts, compared };
}

/** An atom near another, moved by whole cells from where it was given. */
export interface NearAtom {
  readonly atom: number;
  readonly shift: readonly [number, number, number];
  /** angstrom */
  readonly distance: number;
}

/**
 * All atoms around chosen ones nearer than a limit, nearest first. Linear in the number of centres at given density.
 * @param points fractional coordinates, anywhere
 * @param centres indices of points
 * @param reach largest distance wanted, angstrom
 * @param limit largest distance wanted for a centre and another point, at most `reach`; angstrom
 */
export function atomsAround(
  metric: Metric,
  points: readonly Vec3[],
  centres: readonly number[],
  reach: number,
  limit: (centre: number, other: number) => number = () => reach,
): NearAtom[][] {
  const grid = new BoxGrid(metric, points, reach);
  return centres.map((centre) => {
    const near: NearAtom[] = [];
    grid.around(centre, (_, atom, t) => {
      if (atom === centre && t[0] === 0 && t[1] === 0 && t[2] === 0) return;
      const distance = grid.distance(centre, atom, t);
      if (distance > reach || distance > limit(centre, atom)) return;
      near.push({ atom, shift: grid.unwrapped(centre, atom, t), distance });
    });
    return near.sort((a, b) => a.distance - b.distance);
  });
}

/** Of a translation and its opposite, one is forward; the null translation is not. */
function isForward(t: readonly [number, number, number]): boolean {
  return t[0] > 0 || (t[0] === 0 && (t[1] > 0 || (t[1] === 0 && t[2] > 0)));
}

type Visit = (first: number, second: number, shift: readonly [number, number, number]) => void;

/** Points wrapped into the cell and sorted by box. */
class BoxGrid {
  private readonly counts: readonly [number, number, number];
  private readonly spans: readonly [number, number, number]; // boxes within reach, each way
  private readonly cells: Int32Array; // whole cells by which each point was wrapped
  private readonly wrapped: Float64Array; // fractional
  private readonly cartesian: Float64Array;
  private readonly boxOf: Int32Array;
  private readonly starts: Int32Array;
  private readonly members: Int32Array;
  private readonly axes: Float64Array;

  constructor(metric: Metric, points: readonly Vec3[], reach: number) {
    const n = points.length;
    const thickness = reciprocalLengths(metric).map((e) => 1 / e);
    this.counts = boxCounts(thickness, reach, n);
    this.spans = [0, 1, 2].map((i) => Math.ceil((reach * this.counts[i]!) / thickness[i]! - 1e-12)) as unknown as [
      number,
      number,
      number,
    ];
    this.axes = Float64Array.from(metric.toCartesian);
    this.cells = new Int32Array(3 * n);
    this.wrapped = new Float64Array(3 * n);
    this.cartesian = new Float64Array(3 * n);
    this.boxOf = new Int32Array(n);
    for (let i = 0; i < n; i++) this.place(i, points[i]!);
    const boxes = this.counts[0] * this.counts[1] * this.counts[2];
    this.starts = new Int32Array(boxes + 1);
    this.members = new Int32Array(n);
    for (let i = 0; i < n; i++) this.starts[this.boxOf[i]! + 1]!++;
    for (let b = 0; b < boxes; b++) this.starts[b + 1]! += this.starts[b]!;
    const next = this.starts.slice();
    for (let i = 0; i < n; i++) this.members[next[this.boxOf[i]!]!++] = i;
  }

  private place(i: number, x: Vec3): void {
    let box = 0;
    for (let a = 0; a < 3; a++) {
      const whole = Math.floor(x[a]!);
      this.cells[3 * i + a] = whole;
      this.wrapped[3 * i + a] = x[a]! - whole;
      box = box * this.counts[a]! + this.boxAlong(i, a);
    }
    for (let a = 0; a < 3; a++) this.cartesian[3 * i + a] = this.along(a, this.wrapped.subarray(3 * i, 3 * i + 3));
    this.boxOf[i] = box;
  }

  private boxAlong(i: number, a: number): number {
    return Math.min(this.counts[a]! - 1, Math.floor(this.wrapped[3 * i + a]! * this.counts[a]!));
  }

  private along(a: number, v: ArrayLike<number>): number {
    return this.axes[3 * a]! * v[0]! + this.axes[3 * a + 1]! * v[1]! + this.axes[3 * a + 2]! * v[2]!;
  }

  /** Calls back for every point in a box within reach of point i, shifts between wrapped points. */
  around(i: number, visit: Visit): void {
    const [n0, n1, n2] = this.counts;
    const [s0, s1, s2] = this.spans;
    const [b0, b1, b2] = [this.boxAlong(i, 0), this.boxAlong(i, 1), this.boxAlong(i, 2)];
    for (let u = b0 - s0; u <= b0 + s0; u++) {
      const tu = Math.floor(u / n0);
      for (let v = b1 - s1; v <= b1 + s1; v++) {
        const tv = Math.floor(v / n1);
        const row = ((u - tu * n0) * n1 + (v - tv * n1)) * n2;
        for (let w = b2 - s2; w <= b2 + s2; w++) {
          const tw = Math.floor(w / n2);
          const box = row + (w - tw * n2);
          const from = this.starts[box]!;
          const to = this.starts[box + 1]!;
          if (from === to) continue;
          const shift: [number, number, number] = [tu, tv, tw];
          for (let k = from; k < to; k++) visit(i, this.members[k]!, shift);
        }
      }
    }
  }

  distance(first: number, second: number, t: readonly [number, number, number]): number {
    const c = this.cartesian;
    const dx = c[3 * second]! - c[3 * first]! + this.along(0, t);
    const dy = c[3 * second + 1]! - c[3 * first + 1]! + this.along(1, t);
    const dz = c[3 * second + 2]! - c[3 * first + 2]! + this.along(2, t);
    return Math.round(Math.sqrt(dx * dx + dy * dy + dz * dz) / ROUNDING) * ROUNDING;
  }

  /** The shift between the points as they were given. */
  unwrapped(first: number, second: number, t: readonly [number, number, number]): [number, number, number] {
    const s = (a: 0 | 1 | 2) => t[a] + this.cells[3 * first + a]! - this.cells[3 * second + a]! + 0;
    return [s(0), s(1), s(2)];
  }
}

function boxCounts(thickness: readonly number[], reach: number, points: number): [number, number, number] {
  const counts = thickness.map((d) => Math.max(1, Math.floor(d / Math.max(reach, 1e-3))));
  const most = Math.max(1, BOXES_PER_ATOM * points);
  while (counts[0]! * counts[1]! * counts[2]! > most) {
    const largest = counts.indexOf(Math.max(...counts));
    counts[largest] = Math.max(1, Math.floor(counts[largest]! * 0.7));
  }
  return counts as [number, number, number];
}
