import { apply3, type Vec3 } from "./cell.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import type { CellUncertainties } from "./cell-uncertainty.ts";
import { ErrorPropagation, type MeasuredPoint } from "./error-propagation.ts";
import { angleOf, distanceOf, torsionOf } from "./measure.ts";
import type { NeighbourAtoms } from "./neighbour-atoms.ts";

/** A value with its standard uncertainty: 0 where symmetry fixes the value, null where the file does not tell. */
export interface MeasuredQuantity {
  readonly value: number;
  readonly su: number | null;
}

/** Distances (angstrom) and angles (degrees) of atoms of the lattice with their uncertainties. */
export class NeighbourMeasures {
  private readonly source: NeighbourAtoms;
  readonly propagation: ErrorPropagation;

  constructor(source: NeighbourAtoms, cell: CellUncertainties) {
    this.source = source;
    this.propagation = new ErrorPropagation(source.crystal, cell);
  }

  point(there: LatticeAtom): MeasuredPoint {
    const { site } = this.source.atoms[there.atom]!;
    const { W } = this.source.operationTo(there);
    return { site, W, cartesian: this.source.cartesian(there) };
  }

  distance(a: LatticeAtom, b: LatticeAtom): MeasuredQuantity {
    const points = [this.point(a), this.point(b)];
    const { value, gradients } = distanceOf(points[0]!.cartesian, points[1]!.cartesian);
    return { value, su: this.propagation.su(points, gradients) };
  }

  /** At exactly 180 degrees the angle is taken as fixed by symmetry. */
  angle(a: LatticeAtom, b: LatticeAtom, c: LatticeAtom): MeasuredQuantity {
    const points = [this.point(a), this.point(b), this.point(c)];
    const { value, gradients } = angleOf(points[0]!.cartesian, points[1]!.cartesian, points[2]!.cartesian);
    return { value, su: gradients ? this.propagation.su(points, gradients) : 0 };
  }

  /** Null where three of the atoms stand in a line. */
  torsion(a: LatticeAtom, b: LatticeAtom, c: LatticeAtom, d: LatticeAtom): MeasuredQuantity | null {
    const points = [a, b, c, d].map((p) => this.point(p));
    const [p, q, r, s] = points.map((e) => e.cartesian) as [Vec3, Vec3, Vec3, Vec3];
    const found = torsionOf(p, q, r, s);
    return found && { value: found.value, su: this.propagation.su(points, found.gradients) };
  }

  /**
   * A function of distances from one atom, with its uncertainty.
   * @param slope change of the function by each distance
   */
  ofDistances(centre: LatticeAtom, others: readonly LatticeAtom[], slope: (index: number) => number): number | null {
    const origin = this.point(centre);
    let pull: Vec3 = [0, 0, 0];
    const points = others.map((o) => this.point(o));
    const gradients = points.map(({ cartesian }, i): Vec3 => {
      const { gradients: pair } = distanceOf(origin.cartesian, cartesian);
      const k = slope(i);
      pull = [pull[0] + k * pair[0]![0], pull[1] + k * pair[0]![1], pull[2] + k * pair[0]![2]];
      return [k * pair[1]![0], k * pair[1]![1], k * pair[1]![2]];
    });
    return this.propagation.su([origin, ...points], [pull, ...gradients]);
  }

  /** Direction and length from one atom to another, Cartesian, angstrom. */
  between(a: LatticeAtom, b: LatticeAtom): Vec3 {
    const { toCartesian } = this.source.crystal.metric;
    const [x, y] = [this.source.position(a), this.source.position(b)];
    return apply3(toCartesian, [y[0] - x[0], y[1] - x[1], y[2] - x[2]]);
  }
}
