import { apply3, type Cell, type Measure, type Metric, metricOf, type Vec3 } from "../structure/index.ts";
import { parameterRounding, rounding, type StatedNumber } from "./audit-input.ts";
import { cellOfStated, type StatedCell } from "./stated-cell.ts";
import { type CodedImage, imageOf } from "./symmetry-codes.ts";

/** An atom at the place that a listed distance or angle means. */
export interface PlacedAtom {
  readonly label: string;
  /** Coordinates as written; null where they are not written as fractions. */
  readonly stated: readonly StatedNumber[] | null;
  readonly position: Vec3;
  readonly image: CodedImage;
}

/** A value with what rounding and uncertainties of coordinates and cell make of it. */
export interface PropagatedValue {
  readonly value: number;
  /** Sum of the changes by half a unit of every last digit. */
  readonly rounding: number;
  /** Standard uncertainty, all parameters taken as independent. */
  readonly su: number;
}

/** One number that a value hangs on, by how much it may be off. */
interface Parameter {
  readonly set: (from: Setting, by: number) => Setting;
  readonly rounding: number;
  readonly su: number;
}

interface Setting {
  readonly cell: Cell;
  readonly metric: Metric;
  /** By label. */
  readonly positions: ReadonlyMap<string, Vec3>;
}

/**
 * Measures points with their uncertainties, each parameter moved by its own slack. An atom that occurs with several
 * images is moved in all of them at once. Correlations between parameters are not known to a file and left out.
 */
export function propagate(cell: StatedCell, atoms: readonly PlacedAtom[], measure: Measure): PropagatedValue {
  const values = cellOfStated(cell);
  const start: Setting = {
    cell: values,
    metric: metricOf(values),
    positions: new Map(atoms.map((a) => [a.label, a.position])),
  };
  const at = ({ metric, positions }: Setting) =>
    measure(atoms.map((a) => apply3(metric.toCartesian, imageOf(a.image, positions.get(a.label)!))));
  const value = at(start);
  const change = (p: Parameter, by: number) => (by > 0 ? wrapped(at(p.set(start, by)) - value) : 0);
  const parameters = [...cellParameters(cell), ...coordinates(atoms)];
  return {
    value,
    rounding: parameters.reduce((s, p) => s + Math.abs(change(p, p.rounding)), 0),
    su: Math.hypot(...parameters.map((p) => change(p, p.su))),
  };
}

/** Torsions jump by 360 degrees; no other value changes by so much. */
function wrapped(difference: number): number {
  return Math.abs(difference) > 180 ? 360 - Math.abs(difference) : difference;
}

function cellParameters(cell: StatedCell): Parameter[] {
  return (Object.keys(cell) as (keyof Cell)[]).flatMap((name): Parameter[] => {
    const stated = cell[name];
    if (/^(?:90|120|60)(?:\.0*)?$/.test(stated.text)) return [];
    const set = (from: Setting, by: number): Setting => {
      const moved = { ...from.cell, [name]: from.cell[name] + by };
      return { ...from, cell: moved, metric: metricOf(moved) };
    };
    return [{ set, rounding: rounding(stated), su: stated.su ?? 0 }];
  });
}

function coordinates(atoms: readonly PlacedAtom[]): Parameter[] {
  const different = [...new Map(atoms.map((a) => [a.label, a])).values()];
  return different.flatMap(({ label, stated }) =>
    (stated ?? []).map((n, axis): Parameter => {
      const set = (from: Setting, by: number): Setting => {
        const x = [...from.positions.get(label)!];
        x[axis]! += by;
        return { ...from, positions: new Map(from.positions).set(label, x as unknown as Vec3) };
      };
      return { set, rounding: parameterRounding(n), su: n.su ?? 0 };
    }),
  );
}
