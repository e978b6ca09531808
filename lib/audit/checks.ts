import * as absoluteStructure from "./absolute-structure.ts";
import * as absorption from "./absorption.ts";
import type { AuditInput } from "./audit-input.ts";
import * as bondValence from "./bond-valence.ts";
import * as cellShape from "./cell-shape.ts";
import * as cellVolume from "./cell-volume.ts";
import * as contacts from "./contacts.ts";
import * as displacementSize from "./displacement-size.ts";
import * as displacementSymmetry from "./displacement-symmetry.ts";
import type { Criterion, Finding } from "./finding.ts";
import * as forbiddenIntensities from "./forbidden-intensities.ts";
import * as formulaContents from "./formula-contents.ts";
import * as geometryLists from "./geometry-lists.ts";
import * as labels from "./labels.ts";
import * as massAndElectrons from "./mass-and-electrons.ts";
import * as missedSymmetry from "./missed-symmetry.ts";
import * as occupancies from "./occupancies.ts";
import * as oxidationNumbers from "./oxidation-numbers.ts";
import * as radiation from "./radiation.ts";
import * as reflectionLimits from "./reflection-limits.ts";
import * as reflectionNumbers from "./reflection-numbers.ts";
import * as requiredItems from "./required-items.ts";
import * as rigidBond from "./rigid-bond.ts";
import * as siteSymmetry from "./site-symmetry.ts";
import * as specialPositions from "./special-positions.ts";
import * as symmetryOperations from "./symmetry-operations.ts";
import * as symmetryStatements from "./symmetry-statements.ts";
import * as syntax from "./syntax.ts";
import * as uncertainties from "./uncertainties.ts";
import * as wyckoffLetters from "./wyckoff-letters.ts";

/** One question put to a file, with what it may find. */
export interface Check {
  readonly criteria: readonly Criterion[];
  check(input: AuditInput): readonly Finding[];
}

/** Every check, in the order of the findings. A new check is a file of its own and one line here. */
export const CHECKS: readonly Check[] = [
  syntax,
  symmetryOperations,
  symmetryStatements,
  cellShape,
  cellVolume,
  formulaContents,
  massAndElectrons,
  absorption,
  siteSymmetry,
  wyckoffLetters,
  specialPositions,
  occupancies,
  displacementSymmetry,
  displacementSize,
  rigidBond,
  geometryLists,
  contacts,
  labels,
  requiredItems,
  uncertainties,
  missedSymmetry,
  bondValence,
  oxidationNumbers,
  absoluteStructure,
  reflectionLimits,
  reflectionNumbers,
  forbiddenIntensities,
  radiation,
];
