import { formatBasis, formatOperation, formatVector, geometricMeaning } from "../symmetry/index.ts";
import type { AtomModel } from "./atom-model.ts";
import { cellModel } from "./cell-model.ts";
import type { ConfigurationsAnswer } from "./configurations-answer.ts";
import type { Crystal } from "./crystal.ts";
import type { ExpandedAtom } from "./expanded-atoms.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";
import { symmetryCode } from "./symmetry-code.ts";

/** One atom; fractional coordinates. */
export interface Position {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  /** The operation of the group that carries the listed atom here up to whole cells, `-x,y+1/2,-z`. */
  readonly operation: string;
  /** That operation by its number, and the whole cells, as the IUCr core dictionary writes them: `3_655`. */
  readonly code: string | null;
  /** What the operation, whole cells included, is geometrically: `2(0,1/2,0) 0,y,1/4`. */
  readonly meaning: string;
}

/** The atoms of one site. */
export interface PositionOrbit {
  readonly label: string;
  readonly element: string | null;
  readonly occupancy: number;
  /** Images in the cell of the group. */
  readonly multiplicity: number;
  /** Order of the site-symmetry group. */
  readonly order: number;
  /** Indices into the positions. */
  readonly members: readonly number[];
}

/** The cell of the coordinates, in terms of that of the file: (a', b', c') = (a, b, c) P, x = P x' + p. */
export interface PositionsCell {
  readonly cell: CellNumbers;
  readonly P: string;
  readonly p: string;
  /** Cubic angstrom. */
  readonly volume: number;
  /** Whether the operations named are those of this cell (`kept`) or of the file (`none`). */
  readonly symmetry: "kept" | "none";
}

export interface PositionsAnswer {
  readonly positions: readonly Position[];
  readonly count: number;
  readonly cell: PositionsCell;
  readonly orbits: readonly PositionOrbit[];
  /** Where ordered structures of a disordered cell were asked for; the positions are then those of the average. */
  readonly configurations?: ConfigurationsAnswer;
}

/**
 * Every atom of the cell, site by site in the order of the file, image by image in the order of the operations.
 * @example
 * ```ts
 * const rutile = composedCrystal(parseSiteTable("group 136\ncell a=4.59 c=2.96\nTi 2a\nO 4f x=0.305"));
 * const { count, positions } = positionsAnswer(rutile);
 * count; // 6
 * positions.map((p) => p.operation).slice(2, 4); // ["x,y,z", "-x,-y,z"]
 * positions[4]!.meaning; // "4+(0,0,1/2) 0,1/2,z"
 * ```
 */
export function positionsAnswer(crystal: Crystal): PositionsAnswer {
  return modelPositions(cellModel(crystal));
}

/**
 * The atoms of a model, each with the operation that made it.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const supercell = atomModel(halite, { cell: parseCellRequest("2,2,1") });
 * const { count, cell } = modelPositions(supercell);
 * count; // 32
 * cell.cell; // [11.28, 11.28, 5.64, 90, 90, 90]
 * ```
 */
export function modelPositions(model: AtomModel): PositionsAnswer {
  const { crystal, atoms, metric, transformation, symmetry } = model;
  const operations = crystal.group.operations.map(formatOperation);
  const meaning = meanings(crystal);
  const members = crystal.sites.map((): number[] => []);
  const positions = atoms.map((atom, i): Position => {
    const { label, element, occupancy } = crystal.sites[atom.site]!;
    members[atom.site]!.push(i);
    const [x, y, z] = atom.position;
    const operation = operations[atom.operation]!;
    const code = symmetryCode(atom.operation, atom.cells);
    return { label, element, occupancy, x, y, z, operation, code, meaning: meaning(atom) };
  });
  return {
    positions,
    count: positions.length,
    cell: {
      cell: cellNumbers(metric.cell),
      P: formatBasis(transformation.P),
      p: formatVector(transformation.p),
      volume: metric.volume,
      symmetry,
    },
    orbits: crystal.sites.map(({ label, element, occupancy, images, symmetry: { operations: own } }, site) => ({
      label,
      element,
      occupancy,
      multiplicity: images.length,
      order: own.length,
      members: members[site]!,
    })),
  };
}

/** Meaning of an operation with its whole cells, each worked out once. */
function meanings({ group }: Crystal): (atom: ExpandedAtom) => string {
  const known = new Map<string, string>();
  return ({ operation, cells }) => {
    const key = `${operation},${cells.join()}`;
    let text = known.get(key);
    if (text === undefined) {
      const { W, w } = group.operations[operation]!;
      const [a, b, c] = cells;
      const n = [w.n[0] + a * w.d, w.n[1] + b * w.d, w.n[2] + c * w.d] as const;
      text = geometricMeaning({ W, w: { n, d: w.d } }).text;
      known.set(key, text);
    }
    return text;
  };
}
