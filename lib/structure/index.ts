/** Atoms at rest: cell and metric, the crystal built from a CIF block, site symmetry and orbits. */
export { type AtomModel, atomModel, type ModelContent, type ModelOptions } from "./atom-model.ts";
export { type AtomSite, readAtomSites, readNumber } from "./atom-site.ts";
export { type BlockLattice, centringsByLetter, latticeFromBlock } from "./block-lattice.ts";
export type {
  BondChoice,
  BondedPair,
  LeftOutPair,
  NearLimit,
} from "./bond-choice.ts";
export {
  type BondPattern,
  formatBondPattern,
  formatBondPatterns,
  formatUnitMembers,
  parseBondPatterns,
  parseUnitMembers,
} from "./bond-choice-text.ts";
export { bondClasses, isHydrogen } from "./bond-class.ts";
export { type Component, componentsOf, type PeriodicEdge } from "./bond-graph.ts";
export type { BondOptions } from "./bond-overrides.ts";
export { HALIDE_TOLERANCE, SHELL_GAP } from "./bond-rules.ts";
export { bondValence, type CationState, cationStates } from "./bond-valence-parameters.ts";
export { type Bond, type BondList, bondsOf } from "./bonds.ts";
export { type BrokenOperation, brokenOperations, type ListedCell } from "./broken-operations.ts";
export {
  apply3,
  type Cell,
  cellOfMetric,
  inverse3,
  lengthOf,
  type Mat3,
  METRIC_TOLERANCE,
  type Metric,
  metricMisfit,
  metricOf,
  multiply3,
  planeReach,
  reciprocalLengths,
  type Vec3,
} from "./cell.ts";
export { AtomAction, type CellAtom, cellAtoms, type LatticeAtom } from "./cell-atoms.ts";
export { type CellTranslations, translationsIn } from "./cell-lattice.ts";
export {
  type CellParameter,
  type CellParameters,
  formatCellParameters,
  parseCellParameters,
  type WrittenCell,
} from "./cell-parameters-text.ts";
export { type CellRequest, formatCellRequest, parseCellRequest, requestedCell } from "./cell-request-text.ts";
export { type ChangedCell, changeOfCell, metricIn, multiplesOf } from "./change-of-cell.ts";
export { chosenComponent, type DecidedCrystal, orderedCrystal } from "./chosen-component.ts";
export type { SymmetryDisagreement } from "./compare-statements.ts";
export {
  type ComparedStructure,
  type Comparison,
  type ComparisonAnswer,
  compareStructures,
  type Disagreement,
} from "./comparison-answer.ts";
export {
  COMPARISON_DISPLACEMENT,
  COMPARISON_STRAIN,
  type ComparisonOptions,
  ISOTYPIC_DISPLACEMENT,
  ISOTYPIC_STRAIN,
  OCCUPANCY_DIFFERENCE,
} from "./comparison-limits.ts";
export { type CellOrigin, cellInOrder, completedCell } from "./completed-cell.ts";
export { type ComposeAnswer, type ComposeResult, composeAnswer, type HigherSymmetry } from "./compose-answer.ts";
export { type ComposedContents, composedContents } from "./composed-contents.ts";
export { composedCrystal } from "./composed-crystal.ts";
export { cellContents, contentsMisfit } from "./composition.ts";
export {
  type ConfigurationRow,
  type ConfigurationsAnswer,
  configurationsAnswer,
} from "./configurations-answer.ts";
export { BOND_TOLERANCE, type BondRule, NEAR_LIMIT, radiusSum } from "./contact-table.ts";
export { type ConventionalCell, conventionalCell } from "./conventional-cell.ts";
export { type CoordinateAtom, type CoordinateList, coordinateList, equivalentDisplacement } from "./coordinate-list.ts";
export {
  type CoordinationPolyhedron,
  coordinationPolyhedra,
  type PolyhedronAnalysis,
} from "./coordination-polyhedra.ts";
export { coordinationShell, SHELL_REACH, type ShellAtom } from "./coordination-shell.ts";
export { covalentRadius, RADII_SOURCE } from "./covalent-radius.ts";
export {
  type Crystal,
  type CrystalOptions,
  type CrystalParts,
  type CrystalSite,
  checkedTolerance,
  crystalFromBlock,
  crystalOf,
  POSITION_TOLERANCE,
  placeSites,
  readCell,
} from "./crystal.ts";
export { type CrystalFrame, crystalFrame, directionVector, planeNormal } from "./crystal-frame.ts";
export {
  type Arbiter,
  type ResolvedSymmetry,
  resolveSymmetry,
} from "./declared-group.ts";
export {
  type Declared,
  type DeclaredOperation,
  type DeclaredSymmetry,
  declaredSymmetry,
  listedGroup,
  type SymmetrySource,
} from "./declared-symmetry.ts";
export { DALTON_PER_CUBIC_ANGSTROM, massOf } from "./density.ts";
export type { Deviation } from "./deviation.ts";
export { type ComponentChoice, chooseComponents } from "./disorder.ts";
export { type DisplacementTensor, EIGHT_PI_SQUARED } from "./displacement.ts";
export { type Element, element, readLabel, readTypeSymbol, type SpeciesReading } from "./elements.ts";
export { type ExpandedAtom, type ExpansionOptions, expandedAtoms, type Interval } from "./expanded-atoms.ts";
export { type Formula, formatFormula, hillOrder, parseFormula } from "./formula-text.ts";
export { type FormulaUnits, formulaUnits, statedFormula } from "./formula-units.ts";
export { connectedUnit, gatheredPieces } from "./gathered-pieces.ts";
export { CENTRED_HYDROGEN } from "./hydrogen-rule.ts";
export { type IdealShape, idealShapes } from "./ideal-shapes.ts";
export { invariantMetric } from "./invariant-metric.ts";
export { axesOf, changeAxes, type LatticeAxes } from "./lattice-axes.ts";
export type { LatticeStrain } from "./lattice-match.ts";
export { type LatticeSymmetry, latticeSymmetries } from "./lattice-symmetry.ts";
export { type ListedSite, type ListedStructure, listedStructure } from "./listed-sites.ts";
export { angle, distance, type Measure, torsion } from "./measure.ts";
export {
  type FiniteSymmetry,
  type LinearSymmetry,
  type MolecularSymmetry,
  type MolecularSymmetryOptions,
  molecularSymmetry,
  SHAPE_TOLERANCE,
  type ShapedUnit,
  STAR_TOLERANCE,
  shapeTolerance,
} from "./molecular-symmetry.ts";
export type { MolecularUnit, UnitAtom, UnitSite } from "./molecular-unit.ts";
export { type ExtendedUnit, type LoneAtom, molecularUnits, type UnitAnalysis } from "./molecular-units.ts";
export type { NeighbourChoice } from "./neighbour-choice.ts";
export type { Neighbour, NeighbourAngle, SiteNeighbours } from "./neighbour-description.ts";
export type { MeasuredQuantity } from "./neighbour-measures.ts";
export { type Contact, contactsWithin, type SearchResult } from "./neighbour-search.ts";
export {
  type CodedAtom,
  type HydrogenBond,
  type NeighboursAnswer,
  type NeighboursOptions,
  neighboursAnswer,
} from "./neighbours-answer.ts";
export { niggliReduction } from "./niggli-reduction.ts";
export { type Image, multiplicityOf, orbitOf, wrap } from "./orbit.ts";
export {
  type Configuration,
  type ConfigurationCount,
  type ConfigurationList,
  countConfigurations,
  orderedConfigurations,
} from "./ordered-configurations.ts";
export { type OrderedModel, orderedModel } from "./ordered-model.ts";
export { oxidationStates } from "./oxidation-states.ts";
export type { ComparedSite, SiteAlone, SitePair } from "./paired-sites.ts";
export { nearestDistance, PeriodicPoints } from "./periodic-points.ts";
export { type PointsAnswer, type PointsQuestion, pointsAnswer } from "./points-answer.ts";
export {
  modelPositions,
  type Position,
  type PositionOrbit,
  type PositionsAnswer,
  type PositionsCell,
  positionsAnswer,
} from "./positions-answer.ts";
export { type CoordinateRange, formatRange, parseRange } from "./range-text.ts";
export {
  type CellNumbers,
  LATTICE_TOLERANCE,
  type LatticeCell,
  type ReduceAnswer,
  reduceAnswer,
  type SymmetricCell,
} from "./reduce-answer.ts";
export {
  type ResiteAnswer,
  type Resited,
  type ResitedSite,
  type ResiteRequest,
  resited,
} from "./resite-answer.ts";
export { resitedOnto } from "./resited-onto.ts";
export { cross3, dot3, length3, minus3, unit3 } from "./rotation-fit.ts";
export { type ShapeMeasure, shapeMeasures } from "./shape-measure.ts";
export { shapeMisfit } from "./shape-misfit.ts";
export { formatShellPattern, parseShellPattern, type ShellPattern } from "./shell-text.ts";
export { type NearPair, type ShortDistances, shortDistances } from "./shortest-distance.ts";
export { countNear, type SiteSymmetry, siteSymmetry } from "./site-symmetry.ts";
export type { MeasuredNumber, PositionParameters, SiteTable, TableCoordinate, TableSite } from "./site-table.ts";
export { formatSiteTable, parseSiteTable } from "./site-table-text.ts";
export { type SiteAnswer, type SiteImage, type SitesAnswer, sitesAnswer } from "./sites-answer.ts";
export { type DescribedSite, type StandardDescription, standardDescription } from "./standard-description.ts";
export type { StandardisationAnswer } from "./standardisation-answer.ts";
export { type StandardisedCrystal, standardisedCrystal } from "./standardised-crystal.ts";
export { type EigenSystem, symmetricEigen } from "./symmetric-eigen.ts";
export {
  type DisplacingOperation,
  type FoundOperation,
  type SymmetriseAnswer,
  type SymmetrisedSite,
  type SymmetriseOptions,
  symmetriseAnswer,
} from "./symmetrise-answer.ts";
export { type CellChoice, type SymmetrisedCrystal, symmetrisedCrystal } from "./symmetrised-crystal.ts";
export { symmetryCode } from "./symmetry-code.ts";
export {
  FARTHEST_DISPLACEMENT,
  type HigherGroup,
  SEARCH_TOLERANCE,
  type SearchOptions,
  type SymmetrySearch,
  searchSymmetry,
} from "./symmetry-search.ts";
export type { TorsionRow } from "./torsion-rows.ts";
export { type AtomGroup, hillFormula, sequenceFormula, unitFormula } from "./unit-formula.ts";
export { type WrittenOperation, writtenOperations } from "./written-operations.ts";
