/**
 * The public face: what most programs need, by name. Everything else is exported by its room: `sitefold/cif`,
 * `sitefold/symmetry`, `sitefold/structure`, `sitefold/representation`, `sitefold/vibrations`, `sitefold/report`.
 */
export { type VetAnswer, vetAnswer } from "./audit/index.ts";
export { type CifBlock, type CifDocument, decodeCif, readCif, writeCif } from "./cif/index.ts";
export { InputProblem, locate, type ParseResult, type Place, requireClean, type Span } from "./problem.ts";
export { problemText } from "./report/index.ts";
export { molecularGroup, type PointGroup, pointGroup, pointGroupTable } from "./representation/index.ts";
export {
  atomModel,
  type ComposeAnswer,
  type Crystal,
  composeAnswer,
  composedCrystal,
  crystalFromBlock,
  crystalOf,
  molecularUnits,
  type NeighboursAnswer,
  neighboursAnswer,
  POSITION_TOLERANCE,
  type PositionsAnswer,
  parseSiteTable,
  pointsAnswer,
  positionsAnswer,
  type SitesAnswer,
  sitesAnswer,
} from "./structure/index.ts";
export {
  assignWyckoff,
  type GroupAnswer,
  groupAnswer,
  identify,
  identifyGroup,
  namedGroup,
  parseOperation,
  parsePoint,
  readGroupName,
  reflectionConditions,
  type SpaceGroup,
  settingsOf,
  spaceGroup,
  wyckoffPositions,
} from "./symmetry/index.ts";
export {
  factorGroupModes,
  type ModesAnswer,
  modesAnswer,
  type PatternsAnswer,
  type PointAnswer,
  type PolariseAnswer,
  patternsAnswer,
  pointAnswer,
  polariseAnswer,
  type SplitAnswer,
  splitAnswer,
} from "./vibrations/index.ts";
