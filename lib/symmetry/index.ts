/** What is true of a space group before any atom is placed. Everything here is exact. */
export {
  type AffineExpression,
  formatExpression,
  parseTriplet,
} from "./affine-text.ts";
export { centringLetter, centringsOf, primitiveBasis } from "./centring.ts";
export { type ExactImage, exactOrbit, siteOperations } from "./exact-site.ts";
export { extendedSymbol } from "./extended-symbol.ts";
export { extinctionSymbol } from "./extinction-symbol.ts";
export { type PlacedPoints, placedPoints } from "./first-triplet.ts";
export { DECIMAL_TOLERANCE, fractionFromDecimal } from "./fraction-text.ts";
export type { CrystalFamily, GeometricClass } from "./geometric-class.ts";
export { type GeometricMeaning, geometricMeaning } from "./geometric-meaning.ts";
export {
  type ConditionAnswer,
  type GroupAnswer,
  groupAnswer,
  type LetterExchange,
  type OperationAnswer,
  type WyckoffAnswer,
} from "./group-answer.ts";
export { closeGroup, LARGEST_GROUP, type MissingProduct, missingProduct } from "./group-closure.ts";
export { type BravaisType, type GroupProperties, groupProperties } from "./group-properties.ts";
export { type HallGroup, operationsFromHall } from "./hall-symbol.ts";
export { hallSymbolOf } from "./hall-symbol-of.ts";
export { formatHallSymbol, type HallRotation, type HallSymbol, parseHallSymbol } from "./hall-symbol-text.ts";
export { type GroupNameCandidate, type GroupNameReading, readGroupName } from "./hermann-mauguin.ts";
export { type Identification, identify } from "./identification.ts";
export { type LabelFrames, ownFrame, referenceFrame } from "./label-frame.ts";
export { matchingSetting } from "./matching-setting.ts";
export { type NamedGroup, type NamedSetting, namedGroup } from "./named-group.ts";
export { normaliserShifts, normalisingShift } from "./normaliser.ts";
export {
  compose,
  IDENTITY_OPERATION,
  invert,
  type Operation,
  operationKey,
  reduce,
  sameOperation,
  transformPoint,
} from "./operation.ts";
export { formatOperation, parseOperation, writtenTranslation } from "./operation-text.ts";
export {
  formatPoint,
  parsePoint,
  pointVector,
  unroundedPoint,
  type WrittenCoordinate,
  type WrittenPoint,
} from "./point-text.ts";
export {
  freeLetters,
  type PositionGroup,
  type PositionInCell,
  type PositionPoints,
  pointOfForm,
  pointsOfPosition,
  positionsInCell,
} from "./position-points.ts";
export { type ProductFinder, productFinder } from "./product-finder.ts";
export { coordinatesIn } from "./reciprocal-strata.ts";
export {
  independentConditions,
  isSystematicallyAbsent,
  meetsConditions,
  type ReflectionCondition,
  reflectionConditions,
} from "./reflection-conditions.ts";
export { type RequestedSetting, requestedHall, requestedSetting } from "./requested-setting.ts";
export { settingHall, settingOperations } from "./setting-group.ts";
export { type Setting, settingsOf } from "./settings.ts";
export {
  type CellShape,
  MEASURED_METRIC_TOLERANCE,
  settleByCell,
  WRITTEN_METRIC_TOLERANCE,
} from "./settle-by-cell.ts";
export {
  type AssignmentGroup,
  assignWyckoff,
  nameSite,
  type SiteAssignment,
  type SiteName,
} from "./site-assignment.ts";
export { rotationIndex, rotationParts, type SpaceGroup, spaceGroup } from "./space-group.ts";
export { type SpaceGroupType, spaceGroupType, spaceGroupTypes } from "./space-group-type.ts";
export { type SpecialCondition, specialConditions } from "./special-reflection-conditions.ts";
export { conventionalSetting, type IdentifiedGroup, identifyGroup, type SpaceGroupSummary } from "./summary.ts";
export { TENSOR_COMPONENTS, TENSOR_PAIRS, type TensorConstraint, tensorConstraint } from "./tensor-constraint.ts";
export {
  chain,
  IDENTITY_TRANSFORMATION,
  reverse,
  type Transformation,
  transformOperation,
} from "./transformation.ts";
export { formatBasis, formatTransformation, formatVector, parseTransformation } from "./transformation-text.ts";
export { type WyckoffPosition, wyckoffPositions } from "./wyckoff-positions.ts";
