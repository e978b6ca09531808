/** Atoms at rest: cell and metric, the crystal built from a CIF block, site symmetry and orbits. */
export { type AtomSite, readAtomSites, readNumber } from "./atom-site.ts";
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
  type Vec3,
} from "./cell.ts";
export type { SymmetryDisagreement } from "./compare-statements.ts";
export { cellContents, contentsMisfit } from "./composition.ts";
export {
  type Crystal,
  type CrystalOptions,
  type CrystalParts,
  type CrystalSite,
  crystalFromBlock,
  crystalOf,
  POSITION_TOLERANCE,
  placeSites,
  readCell,
} from "./crystal.ts";
export {
  type Arbiter,
  type ResolvedSymmetry,
  resolveSymmetry,
  type SymmetrySource,
  shapeMisfit,
} from "./declared-group.ts";
export {
  type Declared,
  type DeclaredOperation,
  type DeclaredSymmetry,
  declaredSymmetry,
  listedGroup,
} from "./declared-symmetry.ts";
export type { DisplacementTensor } from "./displacement.ts";
export { type Element, element, readLabel, readTypeSymbol, type SpeciesReading } from "./elements.ts";
export { type Formula, formatFormula, hillOrder, parseFormula } from "./formula-text.ts";
export { type Image, multiplicityOf, orbitOf, wrap } from "./orbit.ts";
export { nearestDistance, PeriodicPoints } from "./periodic-points.ts";
export { type Position, type PositionsAnswer, positionsAnswer } from "./positions-answer.ts";
export { type SiteSymmetry, siteSymmetry } from "./site-symmetry.ts";
export { type SiteAnswer, type SitesAnswer, sitesAnswer } from "./sites-answer.ts";
