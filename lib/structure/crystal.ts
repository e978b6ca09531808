import { type CifBlock, findValue } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import { type IdentifiedGroup, identifyGroup, type SpaceGroup } from "../symmetry/index.ts";
import { type AtomSite, readAtomSites, readNumber } from "./atom-site.ts";
import { type Cell, METRIC_TOLERANCE, type Metric, metricOf } from "./cell.ts";
import type { SymmetryDisagreement } from "./compare-statements.ts";
import { cellContents, contentsMisfit } from "./composition.ts";
import { type Arbiter, resolveSymmetry } from "./declared-group.ts";
import { declaredSymmetry, type SymmetrySource } from "./declared-symmetry.ts";
import { parseFormula } from "./formula-text.ts";
import { type Image, orbitOf } from "./orbit.ts";
import { PeriodicPoints } from "./periodic-points.ts";
import { shapeMisfit } from "./shape-misfit.ts";
import { type SiteSymmetry, siteSymmetry } from "./site-symmetry.ts";

/** Positions closer than this are one position unless the user says otherwise; angstrom. */
export const POSITION_TOLERANCE = 0.05;

/** An atom site placed in the crystal: its site symmetry and its images in the cell. */
export interface CrystalSite extends AtomSite {
  readonly symmetry: SiteSymmetry;
  readonly images: readonly Image[];
  /** Labels of further rows of the list that turned out to be images of this site. */
  readonly alsoListedAs: readonly string[];
  /** Index of the first site at the same position (mixed occupancy), null where this is the first. */
  readonly sharesPositionOf: number | null;
}

/** A structure as a file gives it: cell, exact symmetry, sites. Plain data. */
export interface Crystal {
  readonly name: string;
  readonly metric: Metric;
  readonly group: SpaceGroup;
  /** The group's type, setting and frames. */
  readonly identified: IdentifiedGroup;
  readonly sites: readonly CrystalSite[];
  /** How the answer was obtained, assumptions included; plain sentences. */
  readonly notes: readonly string[];
  /** angstrom */
  readonly tolerance: number;
  /** Which statement of the file the group was taken from; `given` where it came from the caller. */
  readonly symmetrySource: SymmetrySource | "given";
  /** Statements of the file that mean another group or setting. */
  readonly disagreements: readonly SymmetryDisagreement[];
}

export interface CrystalOptions {
  /** Positions closer than this are one position; angstrom. */
  readonly tolerance?: number;
}

/** What a crystal is made from. */
export interface CrystalParts {
  readonly name: string;
  readonly metric: Metric;
  readonly group: SpaceGroup;
  readonly sites: readonly AtomSite[];
  readonly notes?: readonly string[];
  /** angstrom; default POSITION_TOLERANCE */
  readonly tolerance?: number;
  /** Saves identifying the group once more. */
  readonly identified?: IdentifiedGroup;
  readonly symmetrySource?: SymmetrySource;
  readonly disagreements?: readonly SymmetryDisagreement[];
}

/**
 * A crystal from its parts: sites are snapped onto special positions, expanded, and merged where they coincide.
 * @throws InputProblem `tolerance-impossible`, or `operations-no-space-group`
 */
export function crystalOf(parts: CrystalParts): Crystal {
  const { name, metric, group } = parts;
  const tolerance = checkedTolerance(parts.tolerance ?? POSITION_TOLERANCE);
  const placed = placeSites(group, metric, parts.sites, tolerance);
  const notes = [...(parts.notes ?? []), ...shapeNotes(metric, group), ...placed.notes];
  const { symmetrySource = "given", disagreements = [], identified = identifyGroup(group) } = parts;
  return { name, metric, group, identified, sites: placed.sites, notes, tolerance, symmetrySource, disagreements };
}

/**
 * Builds the crystal from a CIF block.
 * @throws InputProblem for a missing or impossible cell, symmetry or atom list
 * @example
 * ```ts
 * const document = requireClean(readCif(text));
 * const calcite = crystalFromBlock(document.blocks[0]!);
 * calcite.identified.summary.hermannMauguin; // "R -3 c"
 * calcite.sites.map((s) => s.images.length); // [6, 6, 18]
 * ```
 */
export function crystalFromBlock(block: CifBlock, options: CrystalOptions = {}): Crystal {
  const metric = metricOf(readCell(block));
  const list = readAtomSites(block, metric);
  const arbiter = contentsArbiter(block, metric, list.sites, options.tolerance ?? POSITION_TOLERANCE);
  const symmetry = placedInBlock(block, () => resolveSymmetry(declaredSymmetry(block), metric, arbiter));
  return crystalOf({
    name: block.name,
    metric,
    group: symmetry.identified.group,
    identified: symmetry.identified,
    sites: list.sites,
    notes: [...symmetry.notes, ...list.notes],
    symmetrySource: symmetry.source,
    disagreements: symmetry.disagreements,
    ...options,
  });
}

function placedInBlock<T>(block: CifBlock, work: () => T): T {
  try {
    return work();
  } catch (e) {
    throw e instanceof InputProblem ? e.at(block.span) : e;
  }
}

/**
 * Settles what a name leaves open (an origin, say) by the contents of the cell: the setting in which the
 * expanded sites give the stated formula is meant, if it is the only one.
 */
function contentsArbiter(block: CifBlock, metric: Metric, sites: readonly AtomSite[], tolerance: number): Arbiter {
  const stated = findValue(block, "_chemical_formula.sum")?.value;
  if (stated?.kind !== "text") return () => null;
  return (groups) => {
    try {
      const formula = parseFormula(stated.text.trim());
      const misfits = groups.map((g) =>
        contentsMisfit(cellContents(placeSites(g, metric, sites, tolerance).sites), formula),
      );
      const least = Math.min(...misfits);
      const best = misfits.flatMap((m, i) => (m <= least + 1e-3 ? [i] : []));
      if (best.length > 1 || least > 0.1) return null;
      return {
        index: best[0]!,
        why: `since only there the cell contents agree with the formula ${stated.text.trim()}`,
      };
    } catch (e) {
      if (e instanceof InputProblem) return null; // a formula that cannot be read decides nothing
      throw e;
    }
  };
}

/** The tolerance itself, angstrom. @throws InputProblem `tolerance-impossible` */
export function checkedTolerance(tolerance: number): number {
  if (Number.isFinite(tolerance) && tolerance >= 0 && tolerance <= 1) return tolerance;
  throw new InputProblem(
    "tolerance-impossible",
    `a tolerance of ${tolerance} angstrom cannot tell atoms apart`,
    null,
    "give a length between 0 and 1 angstrom",
  );
}

const CELL_ITEMS = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"] as const;

/** @throws InputProblem `cell-missing` naming the items that are absent or unknown */
export function readCell(block: CifBlock): Cell {
  const values = CELL_ITEMS.map((item) => readNumber(block, `_cell.${item}`)?.value ?? null);
  const absent = CELL_ITEMS.filter((_, i) => values[i] === null);
  if (absent.length > 0) {
    throw new InputProblem(
      "cell-missing",
      `block "${block.name}" has no value for ${absent.map((item) => `_cell_${item}`).join(", ")}`,
      block.span,
      "the whole cell is needed; choose another block with --block if the file has several",
    );
  }
  const [a, b, c, alpha, beta, gamma] = values as [number, number, number, number, number, number];
  return { a, b, c, alpha, beta, gamma };
}

function shapeNotes(metric: Metric, group: SpaceGroup): string[] {
  const worst = shapeMisfit(metric, group);
  if (worst <= METRIC_TOLERANCE) return [];
  return [`the cell is not invariant under its own operations: they strain it by ${(100 * worst).toFixed(1)} %`];
}

/** Sites with symmetry and images; rows that repeat an image of an earlier site are folded into it. */
export function placeSites(
  group: SpaceGroup,
  metric: Metric,
  list: readonly AtomSite[],
  tolerance: number,
): { sites: CrystalSite[]; notes: string[] } {
  const points = new PeriodicPoints(metric, tolerance);
  const owner: number[] = []; // site of each point
  const sites: (CrystalSite & { alsoListedAs: string[] })[] = [];
  for (const atom of list) {
    const symmetry = siteSymmetry(group.operations, metric, atom.position, tolerance);
    const here = [...new Set(points.near(symmetry.point).map((p) => owner[p]!))];
    const twin = here.find((i) => isSameAtom(sites[i]!, atom));
    if (twin !== undefined) {
      sites[twin]!.alsoListedAs.push(atom.label);
      continue;
    }
    const images = orbitOf(group, symmetry);
    for (const image of images) owner[points.add(image.position)] = sites.length;
    const first = here.length > 0 ? Math.min(...here) : null;
    const root = first === null ? null : (sites[first]!.sharesPositionOf ?? first);
    sites.push({ ...atom, symmetry, images, alsoListedAs: [], sharesPositionOf: root });
  }
  return { sites, notes: placementNotes(sites, tolerance) };
}

/** Two rows at one position are one atom listed twice unless their species differ or their occupancies share it. */
function isSameAtom(site: CrystalSite, atom: AtomSite): boolean {
  if (site.element !== atom.element || site.charge !== atom.charge) return false;
  if (site.assembly !== atom.assembly || site.disorderGroup !== atom.disorderGroup) return false;
  return Math.abs(site.occupancy - atom.occupancy) < 1e-3;
}

function placementNotes(sites: readonly CrystalSite[], tolerance: number): string[] {
  const notes: string[] = [];
  const repeated = sites.filter((s) => s.alsoListedAs.length > 0);
  if (repeated.length > 0) {
    const shown = repeated.slice(0, 4).map((s) => `${s.label} (also ${some(s.alsoListedAs)})`);
    notes.push(`rows that repeat an image of another were folded into it: ${some(shown)}${more(repeated.length - 4)}`);
  }
  const moved = sites.filter((s) => s.symmetry.shift > 1e-3);
  if (moved.length > 0) {
    const shown = moved.slice(0, 6).map((s) => `${s.label} by ${s.symmetry.shift.toFixed(3)} A`);
    notes.push(`moved onto a special position within ${tolerance} A: ${shown.join(", ")}${more(moved.length - 6)}`);
  }
  const shared = sites.filter((s) => s.sharesPositionOf !== null);
  if (shared.length > 0) {
    const shown = shared.slice(0, 6).map((s) => `${s.label} with ${sites[s.sharesPositionOf!]!.label}`);
    notes.push(`sites that share a position: ${shown.join(", ")}${more(shared.length - 6)}`);
  }
  return notes;
}

function some(labels: readonly string[]): string {
  return labels.slice(0, 4).join(", ") + (labels.length > 4 ? ` and ${labels.length - 4} more` : "");
}

function more(count: number): string {
  return count > 0 ? ` and ${count} more` : "";
}
