import type { AtomSet } from "./atom-set.ts";
import { inverse3 } from "./cell.ts";

/** Boxes per atom that still pay. */
const BOXES_PER_ATOM = 2;

/**
 * Finds the atom of a species nearest to a point, in constant time at given density: the cell is cut into boxes and only
 * those within reach are searched. Results stand in the fields until the next search, so that nothing is allocated.
 */
export class NearestAtom {
  /** Distance of the atom found, angstrom. */
  distance = 0;
  /** The atom found, moved by these whole cells, lies next to the point. */
  readonly shift: [number, number, number] = [0, 0, 0];
  /** Searches so far. */
  searches = 0;
  private readonly atoms: AtomSet;
  private readonly reach: number;
  private readonly counts: readonly [number, number, number];
  private readonly spans: readonly [number, number, number];
  private readonly starts: Int32Array;
  private readonly members: Int32Array;

  /** @param reach angstrom */
  constructor(atoms: AtomSet, reach: number) {
    this.atoms = atoms;
    this.reach = reach;
    const n = atoms.species.length;
    const inverse = inverse3(atoms.axes);
    const thickness = [0, 1, 2].map((i) => 1 / Math.hypot(...inverse.slice(3 * i, 3 * i + 3)));
    this.counts = boxCounts(thickness, reach, n);
    this.spans = [0, 1, 2].map((i) => Math.ceil((reach * this.counts[i]!) / thickness[i]! - 1e-12)) as unknown as [
      number,
      number,
      number,
    ];
    this.starts = new Int32Array(this.counts[0] * this.counts[1] * this.counts[2] + 1);
    this.members = new Int32Array(n);
    this.sort(n);
  }

  private sort(n: number): void {
    const [, n1, n2] = this.counts;
    const { x } = this.atoms;
    const box = (k: number) =>
      (this.along(x[3 * k]!, 0) * n1 + this.along(x[3 * k + 1]!, 1)) * n2 + this.along(x[3 * k + 2]!, 2);
    for (let k = 0; k < n; k++) this.starts[box(k) + 1]!++;
    for (let b = 1; b < this.starts.length; b++) this.starts[b]! += this.starts[b - 1]!;
    const next = this.starts.slice();
    for (let k = 0; k < n; k++) this.members[next[box(k)]!++] = k;
  }

  private along(wrapped: number, i: 0 | 1 | 2): number {
    return Math.min(this.counts[i] - 1, Math.floor(wrapped * this.counts[i]));
  }

  /**
   * The nearest atom of a species within the reach of a fractional point, or -1.
   * @param u fractional, anywhere
   */
  find(u: number, v: number, w: number, species: number): number {
    this.searches++;
    const [cu, cv, cw] = [Math.floor(u), Math.floor(v), Math.floor(w)];
    const [pu, pv, pw] = [u - cu, v - cv, w - cw];
    const [n0, n1, n2] = this.counts;
    const [s0, s1, s2] = this.spans;
    const [b0, b1, b2] = [this.along(pu, 0), this.along(pv, 1), this.along(pw, 2)];
    let best = this.reach * this.reach;
    let found = -1;
    for (let i = b0 - s0; i <= b0 + s0; i++) {
      const tu = Math.floor(i / n0);
      for (let j = b1 - s1; j <= b1 + s1; j++) {
        const tv = Math.floor(j / n1);
        const row = ((i - tu * n0) * n1 + (j - tv * n1)) * n2;
        for (let k = b2 - s2; k <= b2 + s2; k++) {
          const tw = Math.floor(k / n2);
          const box = row + k - tw * n2;
          for (let m = this.starts[box]!; m < this.starts[box + 1]!; m++) {
            const atom = this.members[m]!;
            if (this.atoms.species[atom] !== species) continue;
            const square = this.square(atom, tu - pu, tv - pv, tw - pw);
            if (square > best) continue;
            best = square;
            found = atom;
            this.shift[0] = tu + cu;
            this.shift[1] = tv + cv;
            this.shift[2] = tw + cw;
          }
        }
      }
    }
    this.distance = Math.sqrt(best);
    return found;
  }

  private square(atom: number, du: number, dv: number, dw: number): number {
    const { x, axes } = this.atoms;
    const u = x[3 * atom]! + du;
    const v = x[3 * atom + 1]! + dv;
    const w = x[3 * atom + 2]! + dw;
    const a = axes[0] * u + axes[1] * v + axes[2] * w;
    const b = axes[3] * u + axes[4] * v + axes[5] * w;
    const c = axes[6] * u + axes[7] * v + axes[8] * w;
    return a * a + b * b + c * c;
  }
}

function boxCounts(thickness: readonly number[], reach: number, atoms: number): [number, number, number] {
  const counts = thickness.map((d) => Math.max(1, Math.floor(d / Math.max(reach, 1e-3)))) as [number, number, number];
  const most = Math.max(1, BOXES_PER_ATOM * atoms);
  while (counts[0] * counts[1] * counts[2] > most) {
    const largest = counts.indexOf(Math.max(...counts));
    counts[largest] = Math.max(1, Math.floor(counts[largest]! * 0.7));
  }
  return counts;
}
