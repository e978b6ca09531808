import type {
  ExtendedAnswer,
  InternalMode,
  KindAnswer,
  LoneAtomAnswer,
  NamedLibration,
  PolyhedraAnswer,
  PolyhedronAnswer,
  SpeciesContent,
  SpeciesCounts,
  SplitAnswer,
  UnitAnswer,
  UnitContent,
  UnitMotions,
  UnitSummaries,
  UnitSummary,
} from "../../vibrations/index.ts";
import { bondChoice } from "./bonds.ts";
import {
  amount,
  byName,
  choice,
  count,
  defined,
  type Fields,
  flag,
  list,
  object,
  optional,
  orNull,
  type Shape,
  text,
} from "./shape.ts";
import { type CrystalDocument, crystalHeading } from "./structure.ts";

export const species = (): Shape<SpeciesCounts> => defined("species");

export const factorGroup = () =>
  object<SplitAnswer["factorGroup"]>({
    hermannMauguin: text(),
    schoenflies: text(),
    axes: text("directions that the labels refer to, in the axes named by labelAxes"),
  });

export const labelAxes = () => choice({ file: true, reference: true });

const KINDS = { stretch: true, outOfPlane: true, bend: true } as const;
const deviation = () =>
  object<UnitAnswer["deviation"]>({ largest: amount("angstrom"), mean: amount("angstrom") }, "from the ideal shape");

function contentFields(): Fields<UnitContent> {
  const coordinate = object<UnitContent["coordinates"][number]>({
    kind: choice(KINDS),
    name: text("elements along it"),
    labels: list(text(), "atoms of the first"),
    count: count("", 1),
    species: species(),
  });
  return {
    content: byName(
      object<SpeciesContent>({ stretch: count(), outOfPlane: count(), bend: count(), torsion: count() }),
      "what the internal modes of each species are made of",
    ),
    coordinates: list(coordinate),
    kinds: list(
      object<KindAnswer>({
        kind: choice({ ...KINDS, torsion: true }),
        free: species(),
        redundant: species(),
        site: species(),
        factorGroup: species(),
      }),
    ),
  };
}

function unit(): Shape<UnitAnswer> {
  const split = { site: species(), factorGroup: species() };
  const motions = () => object<UnitMotions>({ free: species(), ...split });
  const internal = object<InternalMode>({
    species: text("of the free unit"),
    name: orNull(text(), "null where the unit is not among the known ones"),
    description: orNull(text()),
    freeWavenumber: orNull(amount(), "of the free unit, cm^-1"),
    count: count("", 1),
    free: object<InternalMode["free"]>({ infrared: flag(), raman: flag() }),
    ...split,
    infrared: count("bands in the crystal"),
    raman: count("bands in the crystal"),
    siteLevels: count("", 1),
    factorGroupLevels: count("", 1),
  });
  const libration = object<NamedLibration>({
    name: choice({ twist: true, rock: true, wag: true, libration: true }),
    species: text(),
    count: count("", 1),
    ...split,
  });
  return object<UnitAnswer>({
    formula: text(),
    freeName: orNull(text(), "free ion or molecule taken for comparison"),
    freeSource: orNull(text()),
    labels: list(text()),
    places: count("of atoms in one unit", 1),
    atomsByOccupancy: amount("atoms there on average"),
    count: count("in the primitive cell", 1),
    pointGroup: text("Schoenflies symbol of the free unit"),
    deviation: deviation(),
    shapeTolerance: amount("angstrom"),
    freeAxes: text("axes of the labels of the free unit; empty where none depends on them"),
    siteSymmetry: text(),
    schoenflies: text("of the site"),
    siteAxes: text("axes of the labels of the site; empty where none depends on them"),
    internal: list(internal),
    translations: motions(),
    librations: motions(),
    librationsBySpecies: list(libration),
    ...contentFields(),
    siteToFactorGroup: list(
      object<UnitAnswer["siteToFactorGroup"][number]>({ site: text(), factorGroup: species() }),
      "species of the factor group that each species of the site group gives",
    ),
  });
}

const loneAtoms = () =>
  list(
    object<LoneAtomAnswer>({
      label: text(),
      element: text(),
      count: count("in the primitive cell", 1),
      siteSymmetry: text(),
      factorGroup: species(),
    }),
  );

const extended = () =>
  list(
    object<ExtendedAnswer>({
      kind: choice({ chain: true, layer: true, framework: true }),
      formula: text(),
      count: count("in the primitive cell", 1),
      labels: list(text()),
      direction: orNull(text(), "[uvw] of a chain, (hkl) of a layer"),
      factorGroup: species(),
    }),
  );

function polyhedra(): Shape<PolyhedraAnswer> {
  const polyhedron = object<PolyhedronAnswer>({
    label: text("of the centre"),
    formula: text(),
    count: count("in the primitive cell", 1),
    shortest: amount("angstrom"),
    longest: amount("angstrom"),
    pointGroup: text("Schoenflies symbol of the ideal polyhedron"),
    deviation: deviation(),
    siteSymmetry: text(),
    schoenflies: text("of the site"),
    ...contentFields(),
  });
  return object<PolyhedraAnswer>({
    polyhedra: list(polyhedron),
    coordinates: contentFields().coordinates,
    kinds: list(
      object<PolyhedraAnswer["kinds"][number]>({
        kind: choice(KINDS),
        all: species(),
        independent: species(),
      }),
    ),
    rest: species(),
    polyhedraNotes: list(text()),
  });
}

/** What --polyhedron adds to an answer. */
export interface WithPolyhedra {
  readonly polyhedra?: PolyhedraAnswer;
}
export const polyhedraField = (): Fields<WithPolyhedra> => ({ polyhedra: optional(polyhedra()) });

/** What --units adds to `modes`. */
export type WithUnits = Partial<UnitSummaries>;
export function unitFields(): Fields<WithUnits> {
  const summary = object<UnitSummary>({
    formula: text(),
    name: orNull(text(), "of the free ion or molecule"),
    labels: list(text()),
    count: count("in the primitive cell", 1),
    pointGroup: text(),
    siteSymmetry: text(),
    schoenflies: text("of the site"),
    internal: species(),
    librations: species(),
    translations: species(),
  });
  return {
    units: optional(list(summary)),
    loneAtoms: optional(loneAtoms()),
    extended: optional(extended()),
    unitNotes: optional(list(text())),
  };
}

export function splitSchema(): Shape<CrystalDocument<SplitAnswer & WithPolyhedra>> {
  return object<CrystalDocument<SplitAnswer & WithPolyhedra>>({
    ...crystalHeading("split"),
    factorGroup: factorGroup(),
    labelAxes: labelAxes(),
    activity: list(object<SplitAnswer["activity"][number]>({ label: text(), infrared: flag(), raman: flag() })),
    bonds: bondChoice(),
    units: list(unit()),
    loneAtoms: loneAtoms(),
    extended: extended(),
    sums: object<SplitAnswer["sums"]>({
      internal: species(),
      librations: species(),
      translations: species(),
      extended: species(),
      acoustic: species(),
      optic: species(),
      total: species(),
    }),
    unitNotes: list(text()),
    ...polyhedraField(),
  });
}
