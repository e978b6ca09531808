import { type FoldedAtoms, type GivenAtom, wholeCell } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import { lengthOf, type Vec3 } from "./cell.ts";
import { type Crystal, type CrystalSite, crystalOf } from "./crystal.ts";
import { foldTranslations } from "./folded-translations.ts";

/** Translations that displace atoms by less make the cell smaller before two structures are compared; angstrom. */
const FOLD_TOLERANCE = 0.02;
/** Sites of one element nearer than this are one position; angstrom. */
const SAME_POSITION = 0.02;

/** A crystal made ready for comparison: one atom for each element at a position, folded into its smallest cell. */
export interface ComparedAtoms {
  /** Sites of one element at one position are one site; label and occupancy are theirs together. */
  readonly crystal: Crystal;
  readonly given: readonly GivenAtom[];
  readonly folded: FoldedAtoms;
  /** Kind of each folded atom: its element, D and T as H. */
  readonly kinds: readonly string[];
}

/**
 * @param rename what a kind is to be called, for comparing structures of other elements
 * @throws InputProblem `atoms-missing`
 */
export function comparedAtoms(crystal: Crystal, rename: (kind: string) => string = (kind) => kind): ComparedAtoms {
  const { name, metric, group, identified, tolerance } = crystal;
  const sites = mergedSites(crystal);
  const merged = crystalOf({ name, metric, group, identified, sites, tolerance });
  const { given, folded: whole } = wholeCell(merged);
  const { folded } = foldTranslations(whole, FOLD_TOLERANCE);
  const kinds: string[] = new Array(folded.atoms.species.length).fill("");
  folded.owner.forEach((k, i) => {
    kinds[k] = rename(kindOf(merged.sites[given[i]!.site]!));
  });
  return { crystal: merged, given, folded, kinds };
}

/** What atoms are alike by: the element, D and T as H; else the type symbol, else the letters of the label. */
export function kindOf({ element, typeSymbol, label }: AtomSite): string {
  if (element === "D" || element === "T") return "H";
  return element ?? typeSymbol ?? /^[A-Za-z]*/.exec(label)![0];
}

function mergedSites(crystal: Crystal): AtomSite[] {
  const merged: { site: CrystalSite; label: string; occupancy: number }[] = [];
  for (const site of crystal.sites) {
    const twin =
      site.sharesPositionOf === null
        ? undefined
        : merged.find((m) => kindOf(m.site) === kindOf(site) && coincide(crystal, m.site, site));
    if (twin) {
      twin.label += `+${site.label}`;
      twin.occupancy += site.occupancy;
    } else merged.push({ site, label: site.label, occupancy: site.occupancy });
  }
  return merged.map(({ site, label, occupancy }) => {
    const { images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...rest } = site;
    return { ...rest, charge: null, position: symmetry.point, label, occupancy };
  });
}

function coincide({ metric }: Crystal, a: CrystalSite, b: CrystalSite): boolean {
  return a.images.some(({ position }) => {
    const d = position.map((e, i) => e - b.symmetry.point[i]! - Math.round(e - b.symmetry.point[i]!));
    return lengthOf(metric, d as unknown as Vec3) < SAME_POSITION;
  });
}

/** Numbers of atoms by kind. */
export function countsOf(kinds: readonly string[]): Map<string, number> {
  const counts = new Map<string, number>();
  for (const kind of kinds) counts.set(kind, (counts.get(kind) ?? 0) + 1);
  return counts;
}
