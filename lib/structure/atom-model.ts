import { IDENTITY_TRANSFORMATION, type Transformation } from "../symmetry/index.ts";
import type { Metric } from "./cell.ts";
import { cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
import { type CellRequest, requestedCell } from "./cell-request-text.ts";
import { changeOfCell, metricIn } from "./change-of-cell.ts";
import type { Crystal } from "./crystal.ts";
import { type ExpandedAtom, type ExpansionOptions, expandedAtoms, type Interval } from "./expanded-atoms.ts";
import { connectedUnit, gatheredPieces } from "./gathered-pieces.ts";
import { wrapOf } from "./image-wrap.ts";

/** Which atoms are listed: those of a cell, one of each site, the same chosen to hang together. */
export type ModelContent = "cell" | "asymmetric" | "connected";

export interface ModelOptions {
  readonly cell?: CellRequest;
  /** `none`: the operations of the file make the atoms, and no symmetry is claimed for the new cell. */
  readonly symmetry?: "kept" | "none";
  readonly content?: ModelContent;
  /** Molecules stay whole and are placed by their centroids. */
  readonly wholeUnits?: boolean;
  readonly range?: readonly [Interval, Interval, Interval];
  readonly boundary?: "in" | "out";
}

/** A list of atoms to be shown or written, in a cell. */
export interface AtomModel {
  readonly name: string;
  /** Its sites and group are what `atoms` refer to: in the new cell if the symmetry is kept, else as the file gives it. */
  readonly crystal: Crystal;
  readonly symmetry: "kept" | "none";
  /** A range is no unit of repetition. */
  readonly content: ModelContent | "range";
  /** The cell of the coordinates. */
  readonly metric: Metric;
  /** That cell in terms of the one of the file. */
  readonly transformation: Transformation;
  /** From the cell of `crystal` to that of the coordinates. */
  readonly fromCrystal: Transformation;
  readonly atoms: readonly ExpandedAtom[];
  readonly notes: readonly string[];
}

/**
 * The atoms asked for, with the symmetry that the cell can hold or without.
 * @throws InputProblem as `changeOfCell` and `expandedAtoms`
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * atomModel(halite).atoms.length; // 8
 * atomModel(halite, { cell: { kind: "primitive" } }).atoms.length; // 2
 * atomModel(halite, { range: parseRange("0:1,0:1,0:1") }).atoms.length; // 27
 * atomModel(halite, { content: "asymmetric" }).atoms.length; // 2
 * atomModel(halite, { cell: parseCellRequest("2,1,1"), symmetry: "none" }).symmetry; // "none"
 * ```
 */
export function atomModel(crystal: Crystal, options: ModelOptions = {}): AtomModel {
  const transformation = options.cell ? requestedCell(crystal, options.cell) : IDENTITY_TRANSFORMATION;
  const symmetry = options.symmetry ?? "kept";
  const notes: string[] = [];
  let home = crystal;
  if (symmetry === "kept") {
    const { crystal: changed, rotations } = changeOfCell(crystal, transformation);
    home = changed;
    if (rotations.after < rotations.before) {
      notes.push(
        `the new cell holds ${rotations.after} of the ${rotations.before} rotation parts of the space group; the others do not keep its shape`,
      );
    }
  }
  const fromCrystal = symmetry === "kept" ? IDENTITY_TRANSFORMATION : transformation;
  const content = options.range ? "range" : (options.content ?? "cell");
  return {
    name: crystal.name,
    crystal: home,
    symmetry,
    content,
    metric: metricIn(home.metric, fromCrystal.P),
    transformation,
    fromCrystal,
    atoms: atomsOf(home, fromCrystal, options),
    notes,
  };
}

function atomsOf(crystal: Crystal, transformation: Transformation, options: ModelOptions): ExpandedAtom[] {
  const { content = "cell", range, boundary, wholeUnits } = options;
  if (content === "cell" || range) {
    const wanted: ExpansionOptions = {
      transformation,
      ...(range ? { range } : {}),
      ...(boundary ? { boundary } : {}),
      ...(wholeUnits ? { pieces: gatheredPieces(crystal) } : {}),
    };
    return expandedAtoms(crystal, wanted);
  }
  return content === "asymmetric" ? listedAtoms(crystal) : chosenAtoms(crystal, connectedUnit(crystal));
}

/** The atoms as listed, on their special positions. */
export function listedAtoms(crystal: Crystal): ExpandedAtom[] {
  return crystal.sites.map(({ symmetry }, site) => ({
    site,
    operation: 0,
    cells: [0, 0, 0],
    position: symmetry.point,
  }));
}

function chosenAtoms(crystal: Crystal, chosen: readonly LatticeAtom[]): ExpandedAtom[] {
  const atoms = cellAtoms(crystal);
  return chosen.map(({ atom, shift }) => {
    const { site, image, position } = atoms[atom]!;
    const { operation } = crystal.sites[site]!.images[image]!;
    const wrap = wrapOf(crystal, atoms[atom]!);
    return {
      site,
      operation,
      cells: [shift[0] + wrap[0], shift[1] + wrap[1], shift[2] + wrap[2]],
      position: [position[0] + shift[0], position[1] + shift[1], position[2] + shift[2]],
    };
  });
}
