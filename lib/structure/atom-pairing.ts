import { type AtomSet, pointOf } from "./atom-set.ts";
import { apply3, type Vec3 } from "./cell.ts";
import { NearestAtom } from "./nearest-atom.ts";

/** Atoms of one set laid onto those of another by a shift. */
export interface AtomPairing {
  /** Added to the fractional coordinates of the first set; leaves no displacement on average. */
  readonly shift: Vec3;
  /** For each atom of the first set its partner. */
  readonly partners: Int32Array;
  /** Distances between partners, angstrom. */
  readonly largest: number;
  readonly rootMeanSquare: number;
}

/** Looks for shifts that lay atoms onto those of a set on the same axes; each takes one partner of its species. */
export class AtomPairer {
  private readonly target: AtomSet;
  private readonly nearest: NearestAtom;
  private readonly taken: Int32Array;
  private readonly bySpecies = new Map<number, number[]>();
  private round = 0;
  private readonly limit: number;

  /** @param limit largest displacement, angstrom */
  constructor(target: AtomSet, limit: number) {
    this.target = target;
    this.limit = limit;
    // the shift tried may itself be off by the displacement of the atom it was read from
    this.nearest = new NearestAtom(target, 2 * limit);
    this.taken = new Int32Array(target.species.length);
    target.species.forEach((species, k) => {
      const list = this.bySpecies.get(species);
      if (list) list.push(k);
      else this.bySpecies.set(species, [k]);
    });
  }

  /** Every pairing within the limit, one for each partner that the first atom may have. */
  pairings(atoms: AtomSet, first: number): AtomPairing[] {
    const start = pointOf(atoms, first);
    return (this.bySpecies.get(atoms.species[first]!) ?? []).flatMap((k) => {
      const x = pointOf(this.target, k);
      return this.pair(atoms, [x[0] - start[0], x[1] - start[1], x[2] - start[2]]) ?? [];
    });
  }

  private pair({ x, species }: AtomSet, shift: Vec3): AtomPairing | null {
    const n = species.length;
    const partners = new Int32Array(n);
    const residuals = new Float64Array(3 * n);
    this.round++;
    const [u, v, w] = shift;
    for (let k = 0; k < n; k++) {
      const [a, b, c] = [x[3 * k]! + u, x[3 * k + 1]! + v, x[3 * k + 2]! + w];
      const j = this.nearest.find(a, b, c, species[k]!);
      if (j < 0 || this.taken[j] === this.round) return null;
      this.taken[j] = this.round;
      partners[k] = j;
      const cells = this.nearest.shift;
      residuals[3 * k] = this.target.x[3 * j]! + cells[0] - a;
      residuals[3 * k + 1] = this.target.x[3 * j + 1]! + cells[1] - b;
      residuals[3 * k + 2] = this.target.x[3 * j + 2]! + cells[2] - c;
    }
    const pairing = this.measured(shift, partners, residuals);
    return pairing.largest <= this.limit ? pairing : null;
  }

  private measured(shift: Vec3, partners: Int32Array, residuals: Float64Array): AtomPairing {
    const n = partners.length;
    const mean: [number, number, number] = [0, 0, 0];
    residuals.forEach((e, i) => {
      mean[i % 3]! += e / n;
    });
    let largest = 0;
    let squares = 0;
    for (let k = 0; k < n; k++) {
      const d = [0, 1, 2].map((i) => residuals[3 * k + i]! - mean[i]!) as unknown as Vec3;
      const length = Math.hypot(...apply3(this.target.axes, d));
      largest = Math.max(largest, length);
      squares += length * length;
    }
    const best = shift.map((e, i) => e + mean[i]!) as unknown as Vec3;
    return { shift: best, partners, largest, rootMeanSquare: Math.sqrt(squares / n) };
  }
}
