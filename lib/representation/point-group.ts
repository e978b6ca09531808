import { adjugate, type IntMat3 } from "../algebra/index.ts";
import { axialCharacters } from "./axial-characters.ts";
import { type CharacterTable, tabulate } from "./character-table.ts";
import { analyse } from "./crystal-analysis.ts";
import { cubicCharacters } from "./cubic-characters.ts";
import { type AxisFrame, BASIS_FRAME, frameMatrix } from "./direction.ts";
import { labelMarks, nameClasses } from "./group-naming.ts";
import { orientedSymbol } from "./hermann-mauguin.ts";
import { mullikenLabels } from "./mulliken.ts";
import { type ReferenceAxes, referenceAxes } from "./reference-axes.ts";
import { type CrystalSystem, crystalClasses } from "./schoenflies.ts";

/** A crystallographic point group given by its matrices, with its classes and physically irreducible species. */
export interface PointGroup extends CharacterTable {
  readonly schoenflies: string;
  /** International symbol, oriented where the frame gives the orientation a meaning: `-4m2`, `31m`, `2mm`. */
  readonly hermannMauguin: string;
  /** International symbol of the crystal class, without orientation: `-42m`, `3m`, `mm2`. */
  readonly crystalClass: string;
  readonly crystalSystem: CrystalSystem;
  /** The matrices, in the order given. */
  readonly elements: readonly IntMat3[];
  /** The conventional axes in the basis of the matrices, as given. */
  readonly frame: AxisFrame;
  /** The directions, in terms of the frame, to which labels and class names refer. */
  readonly axes: ReferenceAxes;
}

/**
 * The point group formed by a list of integer rotation matrices, in any basis of the lattice.
 * @param rotations the matrices, each once, in any order
 * @param frame conventional axes in the basis of the matrices; labels such as B1g and names such as C2' refer to them
 * @throws InputProblem `not-a-group` if the list lacks the identity or a product, or repeats an element
 * @throws RangeError if the frame vectors lie in one plane
 */
export function pointGroup(rotations: readonly IntMat3[], frame: AxisFrame = BASIS_FRAME): PointGroup {
  const analysis = analyse(rotations, frame);
  const { table, axial, orientation } = analysis;
  const characters =
    orientation.kind === "cubic"
      ? cubicCharacters(analysis.elements, table)
      : axialCharacters(axial, analysis.turns, table);
  const kind = crystalClasses().get(analysis.schoenflies)!;
  const labels = mullikenLabels(characters, labelMarks(analysis));
  const tabulated = tabulate(table, nameClasses(analysis), characters, labels);
  const back = adjugate(frameMatrix(frame));
  return {
    schoenflies: kind.schoenflies,
    hermannMauguin: orientedSymbol(kind, analysis),
    crystalClass: kind.hermannMauguin,
    crystalSystem: kind.crystalSystem,
    elements: rotations,
    frame,
    axes: referenceAxes(analysis, axial, orientation, frame, back, tabulated.classes),
    ...tabulated,
  };
}
