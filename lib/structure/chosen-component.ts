import { InputProblem } from "../problem.ts";
import type { AtomSite } from "./atom-site.ts";
import { cellAtoms } from "./cell-atoms.ts";
import { type Crystal, type CrystalSite, crystalOf } from "./crystal.ts";
import { chooseComponents, exclusiveContacts } from "./disorder.ts";
import { orderedModel } from "./ordered-model.ts";

/** A crystal in which some disorder was decided, and how, in plain sentences. */
export interface DecidedCrystal {
  readonly crystal: Crystal;
  readonly notes: readonly string[];
}

/** A disorder group: its assembly (empty where none is named) and its name. */
interface ComponentName {
  readonly assembly: string | null;
  readonly group: string;
}

/** Sites nearer to full than this are full: occupancies are rounded. */
const FULL = 0.98;

/**
 * The crystal with one disorder group of each assembly named, fully occupied, and the others of that assembly left out.
 * @param wanted `2` for every assembly that has a group 2, `A:1,B:2` for assemblies by name
 * @throws InputProblem `component-unknown` with the groups that there are
 * @example
 * ```ts
 * const document = requireClean(
 *   readCif(`data_split
 *     _cell_length_a 6  _cell_length_b 7  _cell_length_c 8
 *     _cell_angle_alpha 90  _cell_angle_beta 90  _cell_angle_gamma 90
 *     _space_group_name_H-M_alt "P 1"
 *     loop_ _atom_site_label _atom_site_fract_x _atom_site_fract_y _atom_site_fract_z
 *           _atom_site_occupancy _atom_site_disorder_group
 *     C1 0.1 0.1 0.1 1 .  O1A 0.3 0.1 0.1 0.6 1  O1B 0.25 0.2 0.1 0.4 2`),
 * );
 * const { crystal, notes } = chosenComponent(crystalFromBlock(document.blocks[0]!), "2");
 * crystal.sites.map((s) => [s.label, s.occupancy]); // [["C1", 1], ["O1B", 1]]
 * notes; // ["disorder groups 2 taken; left out: O1A"]
 * ```
 */
export function chosenComponent(crystal: Crystal, wanted: string): DecidedCrystal {
  const names = wanted.split(",").map((word): ComponentName => {
    const at = word.indexOf(":");
    return at < 0
      ? { assembly: null, group: word.trim() }
      : { assembly: word.slice(0, at).trim(), group: word.slice(at + 1).trim() };
  });
  const matches = (site: CrystalSite, n: ComponentName) => n.assembly === null || (site.assembly ?? "") === n.assembly;
  const grouped = crystal.sites.filter((s) => s.disorderGroup !== null);
  for (const n of names) {
    if (!grouped.some((s) => matches(s, n) && s.disorderGroup === n.group)) throw unknown(n, grouped);
  }
  const choiceFor = (site: CrystalSite): string | null => {
    if (site.disorderGroup === null) return null;
    const choices = names.filter((n) => matches(site, n));
    const own = grouped.filter((s) => s.assembly === site.assembly);
    return choices.find((n) => own.some((s) => s.disorderGroup === n.group))?.group ?? null;
  };
  const contested = new Set(chooseComponents(crystal).contested.map((i) => crystal.sites[i]!.label));
  const left: string[] = [];
  const sites = crystal.sites.flatMap((site): AtomSite[] => {
    const choice = choiceFor(site);
    if (choice === null) return [site];
    if (site.disorderGroup === choice) return [contested.has(site.label) ? site : { ...site, occupancy: 1 }];
    left.push(site.label);
    return [];
  });
  const notes = [`disorder groups ${wanted} taken; left out: ${left.length > 0 ? left.join(", ") : "nothing"}`];
  return { crystal: withSites(crystal, sites), notes };
}

function unknown({ assembly, group }: ComponentName, grouped: readonly CrystalSite[]): InputProblem {
  const there = [
    ...new Set(grouped.map((s) => (s.assembly === null ? s.disorderGroup! : `${s.assembly}:${s.disorderGroup}`))),
  ];
  return new InputProblem(
    "component-unknown",
    `the atom list has no disorder group ${assembly === null ? "" : `${assembly}:`}${group}`,
    null,
    there.length > 0 ? `there are ${there.join(", ")}` : "its atoms belong to no disorder groups at all",
  );
}

/**
 * One ordered structure for a disordered one: of alternatives the one of largest occupancy, fully occupied; where images
 * of a site exclude each other the space group is lowered, as `orderedModel` does. Partly occupied sites without an
 * alternative stay as they are and are named.
 * @example
 * ```ts
 * const list = "group P m -3 m\ncell a=3.876\nN 1b\nCl 1a\nH 8g x=0.347 occ=0.5";
 * const { crystal } = orderedCrystal(composedCrystal(parseSiteTable(list)));
 * crystal.identified.summary.hermannMauguin; // "P -4 3 m"
 * crystal.sites.map((s) => s.occupancy); // [1, 1, 1]
 * ```
 */
export function orderedCrystal(crystal: Crystal): DecidedCrystal {
  const { chosen, contested, notes } = chooseComponents(crystal);
  const decided = decidedSites(crystal, chosen);
  const sites = crystal.sites.flatMap((site, i): AtomSite[] => {
    if (!chosen[i]) return [];
    return [decided.has(i) && !contested.includes(i) ? { ...site, occupancy: 1 } : site];
  });
  const base = notes.length > 0 ? withSites(crystal, sites) : crystal;
  const model = orderedModel(base);
  const ordered = model?.crystal ?? base;
  const open = ordered.sites.filter((s) => s.occupancy < FULL).map((s) => s.label);
  const told = [...notes, ...(model?.crystal.notes.filter((n) => !base.notes.includes(n)) ?? [])];
  if (open.length > 0) told.push(`partly occupied without an alternative, so not decided: ${open.join(", ")}`);
  return { crystal: ordered, notes: [...new Set(told)] };
}

/** Sites that were chosen against another one: of their assembly, at their position, or too near to it. */
function decidedSites(crystal: Crystal, chosen: readonly boolean[]): Set<number> {
  const { sites } = crystal;
  const place = (i: number) => sites[i]!.sharesPositionOf ?? i;
  const decided = new Set<number>();
  sites.forEach((left, j) => {
    if (chosen[j]) return;
    sites.forEach((site, i) => {
      if (!chosen[i]) return;
      const sameAssembly =
        left.disorderGroup !== null && site.disorderGroup !== null && left.assembly === site.assembly;
      if (sameAssembly || place(i) === place(j)) decided.add(i);
    });
  });
  const atoms = cellAtoms(crystal);
  for (const { first, second } of exclusiveContacts(crystal, atoms)) {
    const [a, b] = [atoms[first]!.site, atoms[second]!.site];
    if (chosen[a] && !chosen[b]) decided.add(a);
    if (chosen[b] && !chosen[a]) decided.add(b);
  }
  return decided;
}

function withSites(crystal: Crystal, sites: readonly AtomSite[]): Crystal {
  const { name, metric, group, identified, tolerance } = crystal;
  return crystalOf({ name, metric, group, identified, tolerance, sites });
}
