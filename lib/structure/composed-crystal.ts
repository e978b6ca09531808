import { InputProblem } from "../problem.ts";
import { identifyGroup, type NamedGroup, type NamedSetting, namedGroup, positionsInCell } from "../symmetry/index.ts";
import type { AtomSite } from "./atom-site.ts";
import { cellInOrder, completedCell } from "./completed-cell.ts";
import { type Crystal, type CrystalOptions, checkedTolerance, crystalOf, POSITION_TOLERANCE } from "./crystal.ts";
import { readLabel, readTypeSymbol } from "./elements.ts";
import { FreeLabels } from "./free-labels.ts";
import { type PlacingGroup, placedSite } from "./placed-site.ts";
import { shortDistances } from "./shortest-distance.ts";
import type { SiteTable, TableSite } from "./site-table.ts";

/** Sites stand on their positions exactly; what is left is rounding; angstrom. */
const ON_POSITION = 1e-3;

/** Occupancies of one position may add up to this; papers round them. */
const FULL = 1.005;

/** A shift below this is rounding of a coordinate, and not told; angstrom. */
const TOLD_SHIFT = 1e-3;

/**
 * The crystal that a table of Wyckoff sites means. Where the group's name leaves origin or axes open, the most usual
 * setting is taken in which the cell and every site fit; of two origins one where atoms are no nearer than they come.
 * The tolerance tells how far coordinates may be off their position.
 * @throws InputProblem with the place in the table: what `namedGroup`, `completedCell` and `placedSite` throw,
 * `element-unknown`, `occupancy-impossible`, `position-overfull`, `tolerance-impossible`
 * @example
 * ```ts
 * const table = parseSiteTable("group R -3 c\ncell a=5.07 c=16.82\nNa 6b\nN 6a\nO 0.245,0,1/4");
 * const nitratine = composedCrystal(table);
 * nitratine.metric.cell.gamma; // 120
 * nitratine.sites.map((s) => s.images.length); // [6, 6, 18]
 * nitratine.notes[0]!.includes("cell and sites fit no other"); // true
 * ```
 */
export function composedCrystal(table: SiteTable, options: CrystalOptions = {}): Crystal {
  const tolerance = checkedTolerance(options.tolerance ?? POSITION_TOLERANCE);
  const named = groupOf(table);
  const tried = named.settings.map((setting) => ({ setting, ...composedOrNot(setting, table, tolerance) }));
  const fitting = tried.flatMap(({ setting, crystal }) => (crystal ? [{ setting, crystal }] : []));
  if (fitting.length === 0) throw telling(tried.map((t) => t.problem!));
  const origins = fitting.filter((f) => f.setting.axes === fitting[0]!.setting.axes);
  const roomy = origins.length > 1 ? origins.filter((f) => shortDistances(f.crystal).tooNear.length === 0) : origins;
  const { setting, crystal } = roomy[0] ?? fitting[0]!;
  const byDistance = roomy.length > 0 && roomy.length < origins.length;
  const note = groupNote(table.group.text, named, setting, { fitting: fitting.length, byDistance });
  return { ...crystal, notes: [note, ...crystal.notes] };
}

/** Of the faults in all settings that of the most usual one whose axes the cell fits. */
function telling(problems: readonly InputProblem[]): InputProblem {
  return problems.find((p) => !p.code.startsWith("cell-")) ?? problems[0]!;
}

function composedOrNot(setting: NamedSetting, table: SiteTable, tolerance: number) {
  try {
    const crystal = composedIn(setting, table, tolerance);
    requireRoom(crystal, table);
    return { crystal, problem: null };
  } catch (problem) {
    if (problem instanceof InputProblem) return { crystal: null, problem };
    throw problem;
  }
}

function groupOf({ group }: SiteTable): NamedGroup {
  try {
    return namedGroup(group.text);
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    const { start } = group.span;
    const span = e.span ? { start: start + e.span.start, end: start + e.span.end } : group.span;
    throw new InputProblem(e.code, e.message, span, e.hint);
  }
}

function composedIn(setting: NamedSetting, table: SiteTable, tolerance: number): Crystal {
  const { group } = setting;
  const { values, spans } = cellInOrder(table.cell, group, setting.name);
  const metric = completedCell(values, group, { groupName: setting.name, spans });
  const identified = identifyGroup(group);
  const at: PlacingGroup = { identified, positions: positionsInCell(identified), metric, tolerance };
  const labels = new FreeLabels([]);
  const moved: string[] = [];
  const sites = table.sites.map((site): AtomSite => {
    const { element, charge } = speciesOf(site);
    const { point, su, shift } = placedSite(site, at);
    const label = labels.claim(site.label);
    if (shift > TOLD_SHIFT) moved.push(`${label} by ${shift.toFixed(3)} Å`);
    return {
      label,
      typeSymbol: site.species ?? element,
      element,
      charge,
      position: point,
      su,
      occupancy: occupancyOf(site),
      assembly: null,
      disorderGroup: null,
      displacement: site.displacement,
      span: site.spans.line,
    };
  });
  const notes = moved.length > 0 ? [`moved onto their positions: ${moved.join(", ")}`] : [];
  return crystalOf({ name: table.name, metric, group, identified, sites, notes, tolerance: ON_POSITION });
}

/** How many settings cell and sites fit, and whether distances decided between two origins. */
interface Choice {
  readonly fitting: number;
  readonly byDistance: boolean;
}

/** How the group was read, and what settled what its name leaves open. */
function groupNote(text: string, named: NamedGroup, taken: NamedSetting, choice: Choice): string {
  const { understoodAs, settings, ambiguity } = named;
  const read = `space group ${text} read as ${understoodAs}`;
  if (settings.length === 1) return read;
  const open = ambiguity.join(", ") || "the setting";
  return `${read}, which leaves open: ${open}; ${taken.name} is used, ${settledBy(choice)}`;
}

function settledBy({ fitting, byDistance }: Choice): string {
  if (fitting === 1) return "cell and sites fit no other";
  const hint = "write the setting behind the group if another is meant";
  if (byDistance) return `since about the other origin atoms are too near; ${hint}`;
  return `the most usual of ${fitting} that cell and sites fit; ${hint}`;
}

function speciesOf({ label, species, spans }: TableSite): { element: string; charge: number | null } {
  const read = species === null ? readLabel(label) : readTypeSymbol(species);
  if (read) return read;
  const why = species === null ? `the label ${label} begins with no element` : `${species} is no element`;
  const hint = `write the element behind the label, as in "${label} Mg ..." or "${label} Fe3+ ..."`;
  throw new InputProblem("element-unknown", why, spans.species, hint);
}

function occupancyOf({ label, occupancy, spans }: TableSite): number {
  if (occupancy > 0 && occupancy <= FULL) return Math.min(1, occupancy);
  const why = `${label} has the occupancy ${occupancy}`;
  throw new InputProblem("occupancy-impossible", why, spans.occupancy, "give a number above 0 and up to 1");
}

/** No position may hold more than one atom at a time. */
function requireRoom({ sites }: Crystal, table: SiteTable): void {
  const twice = sites.find((s) => s.alsoListedAs.length > 0);
  if (twice) {
    throw new InputProblem(
      "position-overfull",
      `${twice.label} and ${twice.alsoListedAs.join(", ")} are the same atoms, up to symmetry`,
      table.sites.find((s) => s.label === twice.alsoListedAs[0])?.spans.line ?? twice.span,
      "list one atom of each site; sum up occupancies of one kind of atom",
    );
  }
  sites.forEach((_, i) => {
    const sharing = sites.filter((s, k) => k === i || s.sharesPositionOf === i);
    const total = sharing.reduce((sum, s) => sum + s.occupancy, 0);
    if (sharing.length < 2 || total <= FULL) return;
    const labels = sharing.map((s) => `${s.label} (${s.occupancy})`).join(", ");
    throw new InputProblem(
      "position-overfull",
      `one position holds ${labels}: ${Number(total.toFixed(3))} atoms in place of one`,
      sharing.at(-1)!.span,
      "give occupancies with occ= that add up to 1 at most, or correct a letter or coordinate",
    );
  });
}
