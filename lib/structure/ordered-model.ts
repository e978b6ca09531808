import { correlations, pointGroup } from "../representation/index.ts";
import { type Operation, rotationParts, spaceGroup } from "../symmetry/index.ts";
import type { AtomSite } from "./atom-site.ts";
import { type CellAtom, cellAtoms } from "./cell-atoms.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { chooseComponents } from "./disorder.ts";
import { DisorderedCopies } from "./disordered-copies.ts";

/** An ordered structure that stands for a disordered one. */
export interface OrderedModel {
  readonly crystal: Crystal;
  /** Index of its space group in that of the disordered crystal. */
  readonly index: number;
}

/**
 * One ordered component of a crystal in which images of a site (or of a disorder group) exclude each other, as hydrogen
 * of NH4Cl and KH2PO4, or a molecule that lies in two ways about a centre. The choice breaks symmetry, so the space group
 * is lowered: to the largest group of the same lattice under which a union of orbits holds the right number of images,
 * none of them excluding another, and shares hydrogen evenly. Null where nothing is contested, or no such group exists.
 */
export function orderedModel(crystal: Crystal): OrderedModel | null {
  const components = chooseComponents(crystal);
  const atoms = cellAtoms(crystal, (site) => components.chosen[site]!);
  const copies = new DisorderedCopies(crystal, atoms);
  if (copies.blocks.length === 0) return null;
  const { representatives, operations } = crystal.group;
  for (const { embedded } of correlations(pointGroup(rotationParts(crystal.group)))) {
    const rotations = new Set(embedded.map((i) => representatives[i]!.W.join()));
    const kept = operations.filter((a) => rotations.has(a.W.join()));
    const taken = copies.choose(kept);
    if (!taken) continue;
    const contested = new Set(copies.blocks.flatMap((b) => b.sites));
    const present = (a: CellAtom, index: number) => !contested.has(a.site) || taken.has(index);
    const sites = splitSites(crystal, atoms, copies, kept, present, contested);
    const index = representatives.length / rotations.size;
    const { name, metric, tolerance } = crystal;
    const notes = [...crystal.notes, ...components.notes, note(crystal, contested, index)];
    return { crystal: crystalOf({ name, metric, tolerance, group: spaceGroup(kept), sites, notes }), index };
  }
  return null;
}

function note(crystal: Crystal, contested: ReadonlySet<number>, index: number): string {
  const labels = [...contested].map((i) => crystal.sites[i]!.label).join(", ");
  return `ordered model: one of ${index} equivalent sets of the images of ${labels} was taken, which leaves a subgroup of index ${index}`;
}

/** The atoms that are present, sorted into orbits of the smaller group; one site for each. */
function splitSites(
  crystal: Crystal,
  atoms: readonly CellAtom[],
  { action }: DisorderedCopies,
  operations: readonly Operation[],
  present: (atom: CellAtom, index: number) => boolean,
  contested: ReadonlySet<number>,
): AtomSite[] {
  const labels = new Set(crystal.sites.map((s) => s.label));
  const used = new Set<number>(); // sites whose own label is taken
  const seen = new Set<number>();
  const sites: AtomSite[] = [];
  atoms.forEach((atom, index) => {
    if (seen.has(index) || !present(atom, index)) return;
    for (const g of operations) seen.add(action.image(g, { atom: index, shift: [0, 0, 0] }).atom);
    const site = crystal.sites[atom.site]!;
    const isListed = atom.image === 0;
    sites.push({
      ...site,
      label: used.has(atom.site) ? freeLabel(site.label, labels) : site.label,
      position: isListed ? site.symmetry.point : atom.position,
      su: isListed ? site.su : [null, null, null],
      displacement: isListed ? site.displacement : null,
      ...(contested.has(atom.site) ? { occupancy: 1, assembly: null, disorderGroup: null } : {}),
    });
    used.add(atom.site);
  });
  return sites;
}

function freeLabel(label: string, labels: Set<string>): string {
  for (let k = 2; ; k++) {
    const candidate = `${label}_${k}`;
    if (labels.has(candidate)) continue;
    labels.add(candidate);
    return candidate;
  }
}
