/** Modes of a crystal at k = 0: sites to factor group, activities, counts. */
export { type Activity, activities } from "./activity.ts";
export {
  COORDINATE_KINDS,
  type CoordinateContent,
  type CoordinateKind,
  type CoordinateSet,
  type CoordinateSetAnswer,
  coordinateContent,
  type KindContent,
  rigidMotions,
} from "./coordinate-content.ts";
export { countedCharacters } from "./counted-characters.ts";
export { type CrystalTensors, crystalTensors, hyperRamanTensors } from "./crystal-tensors.ts";
export {
  type FactorGroupModes,
  factorGroupModes,
  type ModeSpecies,
  type ModeTotals,
  type SiteModes,
} from "./factor-group.ts";
export type { PointAnswer, PointClassAnswer, PointOptions, PointSpeciesAnswer } from "./finite-point-answer.ts";
export { freeUnitsLike, freeUnitsOf } from "./free-unit-names.ts";
export {
  formatDirection,
  formatGeometry,
  parseDirection,
  parseGeometry,
  type WrittenDirection,
  type WrittenGeometry,
} from "./geometry-text.ts";
export { RANK_TOLERANCE } from "./independent-species.ts";
export {
  type AcousticPattern,
  type AcousticTerm,
  type ModePattern,
  type ModePatterns,
  modePatterns,
} from "./mode-patterns.ts";
export { type TensorIrrep, type TensorModes, withRamanTensors } from "./mode-tensors.ts";
export { type IrrepAnswer, type ModesAnswer, modesAnswer, type SiteModesAnswer } from "./modes-answer.ts";
export { opticPatterns } from "./optic-patterns.ts";
export { isOrdered, orderedWarnings } from "./ordered-warnings.ts";
export {
  type AcousticAnswer,
  type PatternAnswer,
  type PatternAtomAnswer,
  type PatternSpeciesAnswer,
  type PatternsAnswer,
  type PatternsOptions,
  patternsAnswer,
} from "./patterns-answer.ts";
export { pointAnswer } from "./point-answer.ts";
export { type PointName, readPointName } from "./point-name.ts";
export type { PointTensorsAnswer } from "./point-tensors.ts";
export {
  type AllowedSpecies,
  type DipoleAnswer,
  type GeometryAnswer,
  type HyperRamanAnswer,
  type PolariseAnswer,
  type PolariseOptions,
  polariseAnswer,
  type RamanTensorAnswer,
} from "./polarise-answer.ts";
export {
  type PolyhedraAnswer,
  type PolyhedraKind,
  type PolyhedronAnswer,
  polyhedraAnswer,
} from "./polyhedra-answer.ts";
export { type PrimitiveAtom, primitiveAtoms } from "./primitive-atoms.ts";
export { intensityOf, type PolarPart, type SpeciesScattering, scatteringOf } from "./raman-scattering.ts";
export { type RotationCurve, type RotationTable, rotationTable } from "./rotation-curve.ts";
export type { AngleLaw, RotationLaw } from "./rotation-law.ts";
export { type Scaffold, type Star, unitScaffold, unitStars } from "./scaffold.ts";
export { type ScatteringGeometry, scatteringGeometry } from "./scattering-geometry.ts";
export type { SpeciesCounts } from "./species-counts.ts";
export type { ProductAnswer } from "./species-product.ts";
export {
  type ExtendedAnswer,
  type LoneAtomAnswer,
  type SplitAnswer,
  type SplitOptions,
  splitAnswer,
} from "./split-answer.ts";
export type { SplitSums } from "./split-sums.ts";
export { BACKSCATTERING, type GeometryResult, geometryResult, separatingGeometries } from "./standard-geometries.ts";
export { structureWarnings } from "./structure-warnings.ts";
export type { SubgroupAnswer } from "./subgroup-answer.ts";
export type { FreeMode, FreeUnit } from "./tables/free-units.ts";
export type { InternalMode, NamedLibration, UnitAnswer, UnitMotions } from "./unit-answer.ts";
export { type KindAnswer, type SpeciesContent, type UnitContent, unitContent } from "./unit-content.ts";
export { correlateUnit, type FreeSpeciesCorrelation, type UnitCorrelation } from "./unit-correlation.ts";
export { type UnitSummaries, type UnitSummary, unitSummaries } from "./unit-summary.ts";
export { type VibratingSite, vibratingSites } from "./vibrating-sites.ts";
