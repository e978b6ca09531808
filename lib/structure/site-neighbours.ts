import { bondClasses, isHydrogen } from "./bond-class.ts";
import type { BondValences } from "./bond-valence-sums.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import { radiusSum } from "./contact-table.ts";
import { effectiveCoordination } from "./effective-coordination.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";
import type { ChosenNeighbour, ShellEnd } from "./neighbour-choice.ts";
import type { Neighbour, NeighbourAngle, ShellGap, SiteNeighbours } from "./neighbour-description.ts";
import type { MeasuredQuantity, NeighbourMeasures } from "./neighbour-measures.ts";
import { neighbourPermutations, orbitsOf } from "./neighbour-orbits.ts";
import type { NearAtom } from "./neighbour-search.ts";
import { polyhedronDistortion } from "./polyhedron-distortion.ts";
import { EXHAUSTIVE_CORNERS, shapeMeasures } from "./shape-measure.ts";
import { sequenceFormula } from "./unit-formula.ts";
import type { CodeList } from "./written-operations.ts";

/** What one site is described from. */
export interface SiteContext {
  readonly source: NeighbourAtoms;
  readonly measures: NeighbourMeasures;
  readonly codes: CodeList;
  readonly valences: BondValences;
  readonly formatOperation: (there: LatticeAtom) => string;
  readonly withAngles: boolean;
}

/** What is known of the surroundings of a site. */
export interface SiteSurroundings {
  readonly chosen: readonly ChosenNeighbour[];
  readonly bonds: number;
  readonly end: ShellEnd | null;
  /** Shares of the sphere by the key of the neighbour; null where the domain is not closed. */
  readonly shares: ((n: LatticeAtom) => number) | null;
  readonly solidAngleNumber: number | null;
  /** All atoms within some distance, nearest first. */
  readonly near: readonly NearAtom[];
}

/** Everything about the neighbours of a site. */
export function siteNeighbours(context: SiteContext, site: number, around: SiteSurroundings): SiteNeighbours {
  const { source, measures, valences } = context;
  const { crystal } = source;
  const { label, element, occupancy, images, symmetry } = crystal.sites[site]!;
  const representative = source.sharing[site]![0]!;
  const listed = source.listed(representative);
  const permutations = neighbourPermutations(source, representative, around.chosen);
  const orbits = classesOf(around.chosen.length, permutations);
  const neighbours = around.chosen.map((n, i) => neighbourOf(context, site, listed, n, orbits[i]!, around.shares));
  const alternatives = around.chosen.some((a, i) => around.chosen.slice(0, i).some((b) => source.excludes(a, b)));
  const places = around.chosen.map((n) => measures.between(listed, n));
  const shapes = alternatives ? [] : shapeMeasures(places);
  return {
    label,
    element,
    kind: isHydrogen(element) ? "hydrogen" : bondClasses().nonMetal.has(element ?? "") ? "non-metal" : "metal",
    occupancy,
    multiplicity: images.length,
    order: symmetry.operations.length,
    position: symmetry.point,
    alsoHere: source.sharing[site]!.filter((i) => i !== site).map((i) => crystal.sites[i]!.label),
    coordination: neighbours.length,
    occupied: around.chosen.reduce((s, n) => s + source.presence(site, source.atoms[n.atom]!.site), 0),
    formula: formulaOf(element ?? "?", neighbours),
    numbers: {
      bonds: around.bonds,
      gap: around.end?.count ?? null,
      effective: around.end ? (effectiveCoordination(around.end.candidates.map((c) => c.share))?.number ?? null) : null,
      solidAngle: around.solidAngleNumber,
    },
    gap: gapOf(context, around.end),
    next: nextOf(context, around),
    meanDistance: meanDistance(context, listed, around.chosen),
    valence: valences.sum(site, measures, listed),
    shapes: shapes.map(({ name, symbol, measure }) => ({ name, symbol, measure })),
    shapeSearch: places.length <= EXHAUSTIVE_CORNERS ? "exhaustive" : "turns",
    distortion: alternatives ? null : polyhedronDistortion(places, shapes),
    alternatives,
    neighbours,
    angles: context.withAngles || neighbours.length === 2 ? anglesOf(context, listed, around.chosen, permutations) : [],
  };
}

/** Number of the class of each neighbour under the site symmetry. */
function classesOf(count: number, permutations: readonly (readonly number[])[]): number[] {
  const singles = Array.from({ length: count }, (_, i) => [i]);
  const classes = new Array<number>(count).fill(0);
  orbitsOf(singles, permutations, String).forEach((members, k) => {
    for (const i of members) classes[i] = k;
  });
  return classes;
}

function formulaOf(centre: string, neighbours: readonly Neighbour[]): string {
  const elements = neighbours.map((n) => n.element ?? "?");
  const formula = sequenceFormula(elements);
  return elements.includes(centre) ? `${centre}(${formula})` : centre + formula;
}

function neighbourOf(
  { source, measures, codes, valences, formatOperation }: SiteContext,
  site: number,
  listed: LatticeAtom,
  there: ChosenNeighbour,
  orbit: number,
  shares: SiteSurroundings["shares"],
): Neighbour {
  const { sites } = source.crystal;
  const other = source.atoms[there.atom]!.site;
  const { label, element } = sites[other]!;
  const { operation, cells } = source.origin(there);
  const sum = radiusSum(sites[site]!.element, element);
  return {
    label,
    element,
    occupancy: source.occupancyAt(other),
    alsoThere: source.sharing[other]!.filter((i) => i !== other).map((i) => sites[i]!.label),
    code: codes.code(operation, cells),
    operation: formatOperation(there),
    distance: there.distance,
    su: measures.distance(listed, there).su,
    bond: there.rule,
    radiiShare: sum === null ? null : there.distance / sum,
    valence: valences.valence(site, there.atom, there.distance),
    solidAngle: shares ? shares(there) : null,
    orbit,
  };
}

function gapOf({ source }: SiteContext, end: ShellEnd | null): ShellGap | null {
  if (end === null) return null;
  return { count: end.count, last: end.last.distance, next: end.next && named(source, end.next) };
}

function nextOf({ source }: SiteContext, { chosen, near }: SiteSurroundings): SiteNeighbours["next"] {
  const taken = new Set(chosen.map(latticeKey));
  const next = near.find((n) => !taken.has(latticeKey(n)));
  return next ? named(source, next) : null;
}

function named({ crystal, atoms }: NeighbourAtoms, { atom, distance }: NearAtom) {
  return { label: crystal.sites[atoms[atom]!.site]!.label, distance };
}

function meanDistance(
  { measures }: SiteContext,
  listed: LatticeAtom,
  chosen: readonly ChosenNeighbour[],
): MeasuredQuantity | null {
  if (chosen.length === 0) return null;
  const value = chosen.reduce((s, n) => s + n.distance, 0) / chosen.length;
  return { value, su: measures.ofDistances(listed, chosen, () => 1 / chosen.length) };
}

function anglesOf(
  { source, measures }: SiteContext,
  listed: LatticeAtom,
  chosen: readonly ChosenNeighbour[],
  permutations: readonly (readonly number[])[],
): NeighbourAngle[] {
  const pairs = chosen
    .flatMap((_, i) => chosen.slice(i + 1).map((__, k) => [i, i + k + 1] as const))
    .filter(([i, j]) => !source.excludes(chosen[i]!, chosen[j]!));
  const orbits = orbitsOf(pairs, permutations, ([a = 0, b = 0]) => (a < b ? `${a} ${b}` : `${b} ${a}`));
  return orbits.map((members) => {
    const ends = pairs[members[0]!]!;
    const { value, su } = measures.angle(chosen[ends[0]]!, listed, chosen[ends[1]]!);
    return { ends, angle: value, su, count: members.length };
  });
}
