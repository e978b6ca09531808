/** Results as text. Takes finished result objects; computes nothing. */
export { absencesText } from "./absences-text.ts";
export { composeText } from "./compose-text.ts";
export { composedCif } from "./composed-cif.ts";
export { configurationsText } from "./configurations-text.ts";
export { type CorrelationLevels, correlationDiagram, correlationLevels } from "./correlation-diagram.ts";
export { correlationSvg } from "./correlation-svg.ts";
export { formatNumber } from "./format-number.ts";
export { groupText } from "./group-text.ts";
export { groupName, type HeadingData, headingText } from "./heading.ts";
export { mmcifText } from "./mmcif.ts";
export { modesText } from "./modes-text.ts";
export { neighboursText } from "./neighbours-text.ts";
export { patternsText } from "./patterns-text.ts";
export { pdbText } from "./pdb.ts";
export { pointText } from "./point-text.ts";
export { pointsText } from "./points-text.ts";
export { polariseText } from "./polarise-text.ts";
export { polyhedraText } from "./polyhedra-text.ts";
export { positionsCsv } from "./positions-csv.ts";
export { positionsText } from "./positions-text.ts";
export { problemText } from "./problem-text.ts";
export { reduceText } from "./reduce-text.ts";
export { resiteText } from "./resite-text.ts";
export { sitesText } from "./sites-text.ts";
export {
  classText,
  functionText,
  type SpeciesTerm,
  type SpeciesWriter,
  speciesSum,
  speciesWriter,
  type TripleLetter,
  typographicLabel,
} from "./species.ts";
export { splitText } from "./split-text.ts";
export { type CifHeading, structureCif } from "./structure-cif.ts";
export { symmetriseText } from "./symmetrise-text.ts";
export { symmetrisedCif } from "./symmetrised-cif.ts";
export { type Column, textTable, wrapText } from "./table.ts";
export { unitSummaryText } from "./unit-summary-text.ts";
export { criteriaText, criterionText, type VettedBlock, vetTable, vetText } from "./vet-text.ts";
export { extendedXyz, xyzText } from "./xyz.ts";
