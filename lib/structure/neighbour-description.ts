import type { ValenceSum } from "./bond-valence-sums.ts";
import type { MeasuredQuantity } from "./neighbour-measures.ts";
import type { PolyhedronDistortion } from "./polyhedron-distortion.ts";

/** A neighbour of a site where the file lists it. */
export interface Neighbour {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  /** Labels of further sites that share its position. */
  readonly alsoThere: readonly string[];
  /** Symmetry code of the neighbour, `3_655`; null where a digit does not hold the cells. */
  readonly code: string | null;
  /** The operation with its whole cells, `-x+1,y,-z+1/2`. */
  readonly operation: string;
  /** angstrom */
  readonly distance: number;
  /** 0 where symmetry fixes the distance, null where the file does not tell. */
  readonly su: number | null;
  /** The rule by which it is bonded, null where it is not. */
  readonly bond: string | null;
  /** Distance over the sum of the covalent radii. */
  readonly radiiShare: number | null;
  /** Valence units; null without parameters. */
  readonly valence: number | null;
  /** Share of the sphere that its face of the domain of the centre covers; null where domains are not closed or not asked. */
  readonly solidAngle: number | null;
  /** Neighbours of one number are equivalent under the site symmetry of the centre. */
  readonly orbit: number;
}

/** An angle at a site, one for each class under the site symmetry. */
export interface NeighbourAngle {
  /** Indices into the neighbours. */
  readonly ends: readonly [number, number];
  /** Degrees. */
  readonly angle: number;
  readonly su: number | null;
  /** Equivalent angles. */
  readonly count: number;
}

/** Where the first shell ends by the widest gap. */
export interface ShellGap {
  /** Number of atoms before the gap. */
  readonly count: number;
  /** angstrom */
  readonly last: number;
  readonly next: { readonly label: string; readonly distance: number } | null;
}

/** Numbers of neighbours by different definitions; null where one gives none. */
export interface CoordinationNumbers {
  readonly bonds: number;
  readonly gap: number | null;
  /** Effective number of Hoppe. */
  readonly effective: number | null;
  /** Sum of solid angles over the largest. */
  readonly solidAngle: number | null;
}

export interface CoordinationShape {
  readonly name: string;
  readonly symbol: string | null;
  readonly measure: number;
}

export interface SiteNeighbours {
  readonly label: string;
  readonly element: string | null;
  /** Class of the element in the choice of bonds. */
  readonly kind: "hydrogen" | "non-metal" | "metal";
  readonly occupancy: number;
  /** Images in the cell. */
  readonly multiplicity: number;
  /** Order of the site-symmetry group. */
  readonly order: number;
  /** Fractional, on the special position. */
  readonly position: readonly [number, number, number];
  /** Labels of further sites that share the position. */
  readonly alsoHere: readonly string[];
  /** Number of the neighbours listed. */
  readonly coordination: number;
  /** How many of them are there on average when the site is occupied. */
  readonly occupied: number;
  /** Centre and neighbours: `CaO6`, `C(C2H)` where both have an element in common. */
  readonly formula: string;
  readonly numbers: CoordinationNumbers;
  readonly gap: ShellGap | null;
  /** The nearest atom that is no neighbour, angstrom; null where there is none within 6 angstrom. */
  readonly next: { readonly label: string; readonly distance: number } | null;
  readonly meanDistance: MeasuredQuantity | null;
  readonly valence: ValenceSum | null;
  /** Whether some neighbours are never there at the same time; there is no shape then. */
  readonly alternatives: boolean;
  /** Best first. */
  readonly shapes: readonly CoordinationShape[];
  /** Whether every assignment of corners was tried. */
  readonly shapeSearch: "exhaustive" | "turns";
  readonly distortion: PolyhedronDistortion | null;
  readonly neighbours: readonly Neighbour[];
  /** Of two neighbours always, of more if asked for. */
  readonly angles: readonly NeighbourAngle[];
}
