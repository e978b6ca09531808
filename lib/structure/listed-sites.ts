import { inverseRatMat } from "../algebra/index.ts";
import { assignWyckoff, type SpaceGroupSummary } from "../symmetry/index.ts";
import type { AtomModel } from "./atom-model.ts";
import { listedAtoms } from "./atom-model.ts";
import { floatMatrix } from "./atom-set.ts";
import type { AtomSite } from "./atom-site.ts";
import { carriedAtom } from "./carried-atom.ts";
import { equivalentDisplacement } from "./coordinate-list.ts";
import type { Crystal } from "./crystal.ts";
import { FreeLabels } from "./free-labels.ts";
import { type CellNumbers, cellNumbers } from "./reduce-answer.ts";

/** A row of an atom list. */
export interface ListedSite extends Omit<AtomSite, "span"> {
  /** Images in the cell. */
  readonly multiplicity: number;
  /** Letter of the Wyckoff position, null where the list has no symmetry. */
  readonly wyckoff: string | null;
  /** Order of the site-symmetry group; 1 where the list has no symmetry. */
  readonly order: number;
  /** Equivalent isotropic U, square angstrom, the same in every setting; null where the site has no displacement. */
  readonly equivalent: number | null;
}

/** A structure as an atom list with its symmetry: what a CIF holds. Plain data. */
export interface ListedStructure {
  readonly name: string;
  readonly cell: CellNumbers;
  /** Cubic angstrom. */
  readonly volume: number;
  /** Null for P 1. */
  readonly spaceGroup: SpaceGroupSummary | null;
  readonly sites: readonly ListedSite[];
}

/**
 * The atom list of a model: one row for each site and the operations if the symmetry is kept and the atoms were not
 * gathered otherwise, else every atom of the cell. S.u. and displacement parameters go with the atoms.
 * @example
 * ```ts
 * const halite = composedCrystal(parseSiteTable("group 225\ncell a=5.64\nNa 4a\nCl 4b"));
 * const { sites, spaceGroup } = listedStructure(atomModel(halite));
 * sites.map((s) => `${s.label} ${s.multiplicity}${s.wyckoff}`); // ["Na 4a", "Cl 4b"]
 * spaceGroup!.number; // 225
 * listedStructure(atomModel(halite, { symmetry: "none" })).sites.length; // 8
 * ```
 */
export function listedStructure(model: AtomModel): ListedStructure {
  const { crystal, symmetry, metric, content, fromCrystal } = model;
  const isKept = symmetry === "kept";
  const atoms = isKept && content === "cell" ? listedAtoms(crystal) : model.atoms;
  const M = floatMatrix(inverseRatMat(fromCrystal.P));
  const labels = new FreeLabels([]);
  const letters = isKept ? wyckoffLetters(crystal) : [];
  const carried = new Map<number, Omit<ListedSite, "label">>(); // by site and operation: all but the place is the same
  const sites = atoms.map(({ site, operation, position }): ListedSite => {
    const key = site * crystal.group.operations.length + operation;
    let row = carried.get(key);
    if (!row) {
      const { W } = crystal.group.operations[operation]!;
      const { span: _, ...atom } = carriedAtom(crystal.sites[site]!, position, {
        W,
        M,
        from: crystal.metric,
        to: metric,
      });
      const { images, symmetry: own, displacement } = crystal.sites[site]!;
      const multiplicity = isKept ? images.length : 1;
      const equivalent = equivalentDisplacement(displacement, crystal.metric);
      const order = isKept ? own.operations.length : 1;
      row = { ...atom, multiplicity, wyckoff: letters[site] ?? null, order, equivalent };
      carried.set(key, row);
    }
    return { ...row, position, label: labels.claim(crystal.sites[site]!.label) };
  });
  return {
    name: model.name,
    cell: cellNumbers(metric.cell),
    volume: metric.volume,
    spaceGroup: isKept ? crystal.identified.summary : null,
    sites,
  };
}

function wyckoffLetters({ sites, identified }: Crystal): string[] {
  return sites.map((site) => assignWyckoff(identified, site.symmetry.operations).letter);
}
