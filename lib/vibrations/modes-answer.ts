import { type PointGroup, pointGroup } from "../representation/index.ts";
import { type Crystal, type Formula, type FormulaUnits, formulaUnits } from "../structure/index.ts";
import { formatVector, type IdentifiedGroup, nameSite } from "../symmetry/index.ts";
import {
  type FactorGroupModes,
  factorGroupModes,
  type ModeSpecies,
  type ModeTotals,
  type SiteModes,
} from "./factor-group.ts";
import { vibratingSites, wholeAtoms } from "./vibrating-sites.ts";

/** A species of the factor group as the JSON contract lays it out. */
export interface IrrepAnswer {
  readonly label: string;
  readonly dimension: number;
  readonly total: number;
  readonly acoustic: number;
  readonly optic: number;
  readonly infrared: boolean;
  readonly raman: boolean;
  readonly hyperRaman: boolean;
  readonly hyperRamanGeneral: boolean;
  readonly silent: boolean;
  /** Character by rotation matrix, row-major in the basis of the file. */
  readonly characters: Readonly<Record<string, number>>;
  /** Number of modes from each site. */
  readonly sites: Readonly<Record<string, number>>;
}

export interface SiteModesAnswer {
  readonly label: string;
  /** Letter of the Wyckoff position. */
  readonly wyckoff: string;
  /** Multiplicity and letter in the reference setting: `18e`. */
  readonly referencePosition: string;
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  readonly order: number;
  readonly atoms: number;
  /** Species of the displacement in the site group. */
  readonly siteSpecies: Readonly<Record<string, number>>;
  readonly contributions: Readonly<Record<string, number>>;
  /** Whether the atoms of the site move in any infrared active, in any Raman active species. */
  readonly infrared: boolean;
  readonly raman: boolean;
}

/** An infrared species with optic modes: its longitudinal and transverse parts have different wavenumbers. */
export interface PolarSpecies {
  readonly label: string;
  readonly modes: number;
  /** Seen by Raman too, LO or TO as the geometry has it. */
  readonly raman: boolean;
}

export interface ModesAnswer {
  /** Places of vibrating atoms; partly occupied ones count in full. */
  readonly atomsInPrimitiveCell: number;
  /** The same, each place by its occupancy. */
  readonly atomsByOccupancy: number;
  /** How many primitive cells the cell of the file holds. */
  readonly primitiveCellsInCell: number;
  /** Translations that make the cell of the file larger than the primitive one, `2/3,1/3,1/3`. */
  readonly centrings: readonly string[];
  readonly formulaUnits: FormulaUnits | null;
  readonly factorGroup: { readonly hermannMauguin: string; readonly schoenflies: string; readonly axes: string };
  /** Which axes the labels refer to: those of the file's cell, or of the reference setting if the cell is skew. */
  readonly labelAxes: "file" | "reference";
  /** Labels in the axes of the reference setting, by label used here; empty where none differs. */
  readonly labelsInReference: Readonly<Record<string, string>>;
  readonly classes: readonly { readonly name: string; readonly size: number; readonly directions: readonly string[] }[];
  readonly irreps: readonly IrrepAnswer[];
  readonly sites: readonly SiteModesAnswer[];
  readonly totals: ModeTotals;
  readonly polarSpecies: readonly PolarSpecies[];
}

/**
 * Species, activities and counts of the modes of a crystal at k = 0, as plain data.
 * @param formula the formula that the file states, for counting formula units
 * @example
 * ```ts
 * const rutile = composedCrystal(parseSiteTable("group 136\ncell a=4.59 c=2.96\nTi 2a\nO 4f x=0.305"));
 * const { irreps, totals } = modesAnswer(rutile);
 * irreps.filter((s) => s.raman).map((s) => `${s.optic}${s.label}`); // ["1A1g", "1B1g", "1B2g", "1Eg"]
 * totals.ramanBands; // 4
 * ```
 */
export function modesAnswer(crystal: Crystal, formula: Formula | null = null): ModesAnswer {
  const { identified } = crystal;
  const { frames } = identified;
  const modes = factorGroupModes(crystal, frames.own ?? frames.reference);
  const { group } = modes;
  return {
    atomsInPrimitiveCell: modes.atomsInPrimitiveCell,
    atomsByOccupancy: wholeAtoms(
      vibratingSites(crystal).reduce(
        (n, { sites, count }) => n + count * sites.reduce((s, a) => s + a.occupancy, 0),
        0,
      ),
    ),
    primitiveCellsInCell: crystal.group.centrings.length,
    centrings: crystal.group.centrings.filter(({ n }) => n.some((e) => e !== 0)).map(formatVector),
    formulaUnits: formulaUnits(crystal, formula),
    factorGroup: {
      hermannMauguin: group.hermannMauguin,
      schoenflies: group.schoenflies,
      axes: group.axes.text,
    },
    labelAxes: frames.own ? "file" : "reference",
    labelsInReference: identified.isReference ? {} : changedLabels(group, pointGroup(group.elements, frames.reference)),
    classes: group.classes.map(({ name, size, directions }) => ({ name, size, directions })),
    irreps: modes.species.map((s, i) => ({
      label: s.label,
      dimension: s.dimension,
      total: s.total,
      acoustic: s.acoustic,
      optic: s.optic,
      infrared: s.infrared,
      raman: s.raman,
      hyperRaman: s.hyperRaman,
      hyperRamanGeneral: s.hyperRamanGeneral,
      silent: s.silent,
      characters: charactersByMatrix(modes, i),
      sites: Object.fromEntries(modes.sites.map((site) => [site.label, site.contributions[i]!])),
    })),
    sites: modes.sites.map((site) => siteModes(site, identified, modes)),
    totals: modes.totals,
    polarSpecies: modes.species
      .filter((s) => s.infrared && s.optic > 0)
      .map((s) => ({ label: s.label, modes: s.optic, raman: s.raman })),
  };
}

function siteModes(
  modes: SiteModes,
  identified: IdentifiedGroup,
  { group, species }: FactorGroupModes,
): SiteModesAnswer {
  const assigned = nameSite(identified, modes.site.symmetry.operations);
  const reaches = (isActive: (s: ModeSpecies) => boolean) =>
    species.some((s, i) => isActive(s) && modes.contributions[i]! > 0);
  return {
    label: modes.label,
    wyckoff: assigned.letter,
    referencePosition: `${assigned.referenceMultiplicity}${assigned.letter}`,
    siteSymmetry: assigned.siteSymmetry,
    schoenflies: modes.group.schoenflies,
    order: assigned.order,
    atoms: modes.count,
    siteSpecies: byLabel(modes.group.irreps, modes.siteSpecies),
    contributions: byLabel(group.irreps, modes.contributions),
    infrared: reaches((s) => s.infrared),
    raman: reaches((s) => s.raman),
  };
}

function byLabel(irreps: readonly { readonly label: string }[], numbers: readonly number[]): Record<string, number> {
  return Object.fromEntries(irreps.flatMap((irrep, i) => (numbers[i]! > 0 ? [[irrep.label, numbers[i]!]] : [])));
}

function charactersByMatrix({ group }: FactorGroupModes, irrep: number): Record<string, number> {
  return Object.fromEntries(
    group.elements.map((W, e) => [W.join(), group.irreps[irrep]!.characters[group.classOf[e]!]!]),
  );
}

/** Labels of the same species in another frame, where they differ: species are matched by their characters. */
function changedLabels(group: PointGroup, other: PointGroup): Record<string, string> {
  const row = (g: PointGroup, irrep: number) => g.classOf.map((k) => g.irreps[irrep]!.characters[k]!).join();
  const labels = new Map(other.irreps.map((irrep, i) => [row(other, i), irrep.label]));
  return Object.fromEntries(
    group.irreps.flatMap(({ label }, i) => {
      const there = labels.get(row(group, i))!;
      return there === label ? [] : [[label, there]];
    }),
  );
}
