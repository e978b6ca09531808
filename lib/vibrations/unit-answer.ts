import type { Crystal, MolecularSymmetry, MolecularUnit } from "../structure/index.ts";
import { assignWyckoff } from "../symmetry/index.ts";
import { activities } from "./activity.ts";
import type { CoordinateSetAnswer } from "./coordinate-content.ts";
import type { FactorGroupModes } from "./factor-group.ts";
import { freeUnitsLike } from "./free-unit-names.ts";
import { rigidModes } from "./rigid-modes.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import type { FreeMode, FreeUnit } from "./tables/free-units.ts";
import { type KindAnswer, type SpeciesContent, unitContent } from "./unit-content.ts";
import type { FreeSpeciesCorrelation, UnitCorrelation } from "./unit-correlation.ts";
import { wholeAtoms } from "./vibrating-sites.ts";

/** One internal mode of the free unit (or several of one species) and what the crystal makes of it. */
export interface InternalMode {
  /** Species of the free unit. */
  readonly species: string;
  /** `nu3`; null where the unit is not in the table of free units. */
  readonly name: string | null;
  readonly description: string | null;
  /** cm^-1 of the free unit, null where unknown. */
  readonly freeWavenumber: number | null;
  /** Modes meant: 1 for a named mode. */
  readonly count: number;
  /** Activity of the free unit. */
  readonly free: { readonly infrared: boolean; readonly raman: boolean };
  readonly site: SpeciesCounts;
  readonly factorGroup: SpeciesCounts;
  /** Bands in the crystal: species of the factor group that are infrared or Raman active. */
  readonly infrared: number;
  readonly raman: number;
  /** Levels into which the site splits the mode, and into which the coupling of units splits those. */
  readonly siteLevels: number;
  readonly factorGroupLevels: number;
}

export interface UnitMotions {
  /** Species of the free unit. */
  readonly free: SpeciesCounts;
  readonly site: SpeciesCounts;
  readonly factorGroup: SpeciesCounts;
}

/** Librations of one species. */
export interface NamedLibration {
  /** `twist`, `rock` and `wag` of water: about its twofold axis, in its plane, out of it; else `libration`. */
  readonly name: "twist" | "rock" | "wag" | "libration";
  readonly species: string;
  readonly count: number;
  readonly site: SpeciesCounts;
  readonly factorGroup: SpeciesCounts;
}

export interface UnitAnswer {
  readonly formula: string;
  /** Name of the free ion or molecule taken for comparison, null for none. */
  readonly freeName: string | null;
  readonly freeSource: string | null;
  readonly labels: readonly string[];
  /** Units in the primitive cell. */
  readonly count: number;
  /** Places of atoms in one unit, and atoms there on average; the former are more where alternatives are averaged. */
  readonly places: number;
  readonly atomsByOccupancy: number;
  readonly pointGroup: string;
  /** Distance of the atoms from the idealised unit, angstrom. */
  readonly deviation: { readonly largest: number; readonly mean: number };
  readonly shapeTolerance: number;
  /** Axes that the species of the free unit refer to; empty where no label depends on them. */
  readonly freeAxes: string;
  readonly siteSymmetry: string;
  readonly schoenflies: string;
  /** Axes that the species of the site refer to; empty where no label depends on them. */
  readonly siteAxes: string;
  readonly internal: readonly InternalMode[];
  readonly translations: UnitMotions;
  readonly librations: UnitMotions;
  /** The librations one species of the free unit at a time; those of water by name. */
  readonly librationsBySpecies: readonly NamedLibration[];
  /** What the internal modes of each species of the free unit are made of. */
  readonly content: Readonly<Record<string, SpeciesContent>>;
  /** Stretches, bends and so on with their species; redundant ones told. */
  readonly kinds: readonly KindAnswer[];
  readonly coordinates: readonly CoordinateSetAnswer[];
  /** For every species of the site group, the species of the factor group that it gives. */
  readonly siteToFactorGroup: readonly { readonly site: string; readonly factorGroup: SpeciesCounts }[];
}

/** A kind of unit with its shape and its correlation. */
export interface CorrelatedUnit {
  readonly unit: MolecularUnit;
  readonly symmetry: MolecularSymmetry;
  readonly correlation: UnitCorrelation;
}

/** Everything that is printed of one kind of unit. @param occupancies of the places of all sites, `placeOccupancies` */
export function unitAnswer(
  crystal: Crystal,
  modes: FactorGroupModes,
  { unit, symmetry, correlation }: CorrelatedUnit,
  occupancies: readonly number[],
): UnitAnswer {
  const free = freeUnitsLike(unit, symmetry.schoenflies)[0] ?? null;
  const names = { site: correlation.siteGroup.irreps, factorGroup: modes.group.irreps };
  const counts = (m: UnitCorrelation["translations"]) => ({
    site: countsOf(names.site, m.site),
    factorGroup: countsOf(names.factorGroup, m.factorGroup),
  });
  const rigid = rigidModes(unit, symmetry, correlation);
  const fits = free !== null && namesFit(free, correlation.species);
  return {
    formula: unit.formula,
    freeName: fits ? free.name : null,
    freeSource: fits ? [free.source, free.note].filter(Boolean).join("; ") : null,
    labels: unit.labels,
    count: unit.count,
    places: unit.atoms.length,
    atomsByOccupancy: wholeAtoms(unit.atoms.reduce((n, a) => n + occupancies[a.site]!, 0)),
    pointGroup: symmetry.schoenflies,
    deviation: { largest: symmetry.deviation.largest, mean: symmetry.deviation.mean },
    shapeTolerance: symmetry.tolerance,
    freeAxes: (fits && free.axes) || freeAxes(symmetry.schoenflies),
    siteSymmetry: assignWyckoff(crystal.identified, unit.site.operations).siteSymmetry,
    schoenflies: correlation.siteGroup.schoenflies,
    siteAxes: hasNumberedB(correlation.siteGroup.irreps) ? correlation.siteGroup.axes.text : "",
    internal: correlation.species.flatMap((s) => internalModes(s, fits ? free : null, correlation, modes)),
    translations: { free: rigid.translations, ...counts(correlation.translations) },
    librations: { free: rigid.rotations, ...counts(correlation.librations) },
    librationsBySpecies: rigid.librations.map((l) => ({ ...l, ...counts(l) })),
    ...unitContent(unit, symmetry, correlation, names),
    siteToFactorGroup: correlation.siteGroup.irreps.map((r, i) => ({
      site: r.label,
      factorGroup: countsOf(modes.group.irreps, correlation.siteToFactorGroup[i]!),
    })),
  };
}

/** True of groups whose labels B1, B2 (B3) change places with the axes. */
function hasNumberedB(irreps: readonly { readonly label: string }[]): boolean {
  return irreps.some(({ label }) => label.startsWith("B1"));
}

/** The rule by which units without handbook axes are set up, see fitToStandard; empty where no label depends on it. */
function freeAxes(schoenflies: string): string {
  if (schoenflies === "C2v") return "z along C2, x normal to the plane of most atoms";
  if (schoenflies === "D2" || schoenflies === "D2h") return "x normal to the plane of most atoms, z through most atoms";
  const isEven = /^[CD](\d+)[vh]?$/.exec(schoenflies);
  const hasTwoKinds = isEven !== null && Number(isEven[1]) > 2 && Number(isEven[1]) % 2 === 0;
  if (!hasTwoKinds || /^C\d+h?$/.test(schoenflies)) return "";
  return schoenflies.startsWith("D") ? "C2' through most atoms" : "sigma_v through most atoms";
}

/** The table names every internal mode of the unit and no other. */
function namesFit(free: FreeUnit, species: readonly FreeSpeciesCorrelation[]): boolean {
  const known = species.reduce((n, s) => n + s.count, 0);
  const named = (label: string) => free.modes.filter((m) => m.species === label).length;
  return free.modes.length === known && species.every((s) => named(s.label) === s.count);
}

function internalModes(
  s: FreeSpeciesCorrelation,
  free: FreeUnit | null,
  correlation: UnitCorrelation,
  modes: FactorGroupModes,
): InternalMode[] {
  const activity = activities(modes.group);
  const bands = (pick: (i: number) => boolean) => s.factorGroup.reduce((n, count, i) => n + (pick(i) ? count : 0), 0);
  const common = {
    species: s.label,
    free: { infrared: s.infrared, raman: s.raman },
    site: countsOf(correlation.siteGroup.irreps, s.site),
    factorGroup: countsOf(modes.group.irreps, s.factorGroup),
    infrared: bands((i) => activity[i]!.infrared),
    raman: bands((i) => activity[i]!.raman),
    siteLevels: s.site.reduce((a, b) => a + b, 0),
    factorGroupLevels: s.factorGroup.reduce((a, b) => a + b, 0),
  };
  const named = free?.modes.filter((m) => m.species === s.label) ?? [];
  if (named.length === 0) return [{ ...common, name: null, description: null, freeWavenumber: null, count: s.count }];
  return named.map((m: FreeMode) => ({
    ...common,
    name: m.name,
    description: m.description,
    freeWavenumber: m.wavenumber,
    count: 1,
  }));
}
