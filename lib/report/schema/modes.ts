import type {
  AngleLaw,
  GeometryAnswer,
  HyperRamanAnswer,
  ModesAnswer,
  PatternAnswer,
  PatternsAnswer,
  PolariseAnswer,
  RotationLaw,
  TensorIrrep,
  TensorModes,
} from "../../vibrations/index.ts";
import { vector, xyz } from "./common.ts";
import { letter } from "./group.ts";
import {
  amount,
  byName,
  choice,
  count,
  flag,
  list,
  number,
  object,
  orNull,
  pair,
  type Shape,
  text,
  textLike,
  triple,
  whole,
} from "./shape.ts";
import { type CrystalDocument, crystalHeading } from "./structure.ts";
import {
  factorGroup,
  labelAxes,
  polyhedraField,
  species,
  unitFields,
  type WithPolyhedra,
  type WithUnits,
} from "./units.ts";

export function modesSchema(): Shape<CrystalDocument<TensorModes & WithUnits & WithPolyhedra>> {
  const irrep = object<TensorIrrep>({
    label: text(),
    dimension: count("", 1),
    total: count(),
    acoustic: count(),
    optic: count(),
    infrared: flag("of the species; a band is there only if optic is not 0"),
    raman: flag(),
    hyperRaman: flag("totally symmetric third-rank tensor"),
    hyperRamanGeneral: flag("tensor symmetric in its last two indices"),
    silent: flag("neither infrared nor Raman"),
    characters: {
      schema: {
        type: "object",
        propertyNames: { pattern: /^-?\d+(,-?\d+){8}$/.source },
        additionalProperties: { type: "integer" },
        description: "by rotation matrix, row by row, in the basis of the file",
      },
    },
    sites: byName(count(), "modes that each site contributes"),
    ramanTensor: orNull(
      object<NonNullable<TensorIrrep["ramanTensor"]>>({
        letters: list(text()),
        tensor: list(list(list(text())), "partner, row, column; a dot is 0"),
      }),
      "null where the species has none",
    ),
  });
  const site = object<ModesAnswer["sites"][number]>({
    label: text(),
    wyckoff: letter(),
    referencePosition: textLike(/^\d+[a-zA]$/),
    siteSymmetry: text(),
    schoenflies: text(),
    order: count("", 1),
    atoms: count("in the primitive cell", 1),
    siteSpecies: species(),
    contributions: species(),
    infrared: flag(),
    raman: flag(),
  });
  return object<CrystalDocument<TensorModes & WithUnits & WithPolyhedra>>({
    ...crystalHeading("modes"),
    atomsInPrimitiveCell: count("places, partly occupied ones in full", 1),
    tensorFrame: text("Cartesian axes of the Raman tensors"),
    atomsByOccupancy: amount("the same, each place by its occupancy"),
    primitiveCellsInCell: count("", 1),
    centrings: list(xyz(), "centring translations but 0,0,0"),
    formulaUnits: orNull(
      object<NonNullable<ModesAnswer["formulaUnits"]>>({
        formula: text(),
        inPrimitiveCell: number(),
        source: choice({ file: true, atoms: true }),
      }),
    ),
    factorGroup: factorGroup(),
    labelAxes: labelAxes(),
    labelsInReference: byName(text(), "labels that differ in the axes of the reference setting"),
    classes: list(
      object<ModesAnswer["classes"][number]>({ name: text(), size: count("", 1), directions: list(text()) }),
    ),
    irreps: list(irrep),
    sites: list(site),
    totals: object<ModesAnswer["totals"]>({
      infraredBands: count(),
      ramanBands: count(),
      coincident: count(),
      silent: count(),
      silentHyperRaman: count(),
      opticModes: count(),
      mutualExclusion: flag(),
    }),
    polarSpecies: list(
      object<ModesAnswer["polarSpecies"][number]>({ label: text(), modes: count("", 1), raman: flag() }),
    ),
    ...unitFields(),
    ...polyhedraField(),
  });
}

const entries = () => list(text("a sum of letters, `b+sqrt3 c`; `.` for 0"));

export const hyperRaman = () =>
  object<HyperRamanAnswer>({
    irrep: text(),
    components: list(textLike(/^[xyz]{3}$/)),
    partners: list(entries()),
  });

export function polariseSchema(): Shape<CrystalDocument<PolariseAnswer>> {
  const geometry = object<GeometryAnswer>({
    geometry: text("Porto notation"),
    allowed: list(
      object<GeometryAnswer["allowed"][number]>({
        irrep: text(),
        modes: count("", 1),
        element: text(),
        tensor: list(text(), "element of the tensor of each partner"),
        part: orNull(choice({ LO: true, TO: true, oblique: true, undetermined: true })),
      }),
    ),
  });
  const rotation = object<NonNullable<PolariseAnswer["rotation"]>>({
    about: text(),
    zero: text(),
    letters: text(),
    angles: list(number("degrees")),
    curves: list(
      object<NonNullable<PolariseAnswer["rotation"]>["curves"][number]>({
        label: text(),
        parallel: list(number()),
        crossed: list(number()),
      }),
    ),
    laws: list(
      object<RotationLaw>({
        label: text(),
        partners: list(
          object<AngleLaw>({
            parallel: triple(text(), "amplitude: of cos^2 phi, sin 2 phi, sin^2 phi"),
            crossed: pair(text(), "amplitude: of cos 2 phi, sin 2 phi"),
          }),
        ),
      }),
      "the same in letters; intensities are sums of squares over the partners",
    ),
  });
  return object<CrystalDocument<PolariseAnswer>>({
    ...crystalHeading("polarise"),
    frame: text("Cartesian axes of the tensors"),
    labelAxes: text(),
    factorGroup: object<PolariseAnswer["factorGroup"]>({ hermannMauguin: text(), schoenflies: text() }),
    tensors: list(
      object<PolariseAnswer["tensors"][number]>({
        irrep: text(),
        modes: count("optic; 0 where no mode shows it"),
        letters: list(text()),
        tensor: list(list(entries()), "partner, row, column"),
      }),
    ),
    dipoles: list(
      object<PolariseAnswer["dipoles"][number]>({
        irrep: text(),
        modes: count("optic; 0 where no mode shows it"),
        directions: list(entries(), "of each partner along x, y, z"),
        raman: flag(),
      }),
    ),
    hyperRaman: list(hyperRaman()),
    piezoelectric: flag(),
    geometries: list(geometry, "those asked for, or a standard set"),
    faces: list(geometry, "in backscattering from the faces"),
    naturalFaces: list(geometry, "backscattering from (100), (010), (001) of a monoclinic crystal"),
    separating: orNull(list(geometry), "geometries that tell the species apart; null where none do"),
    rotation: orNull(rotation),
  });
}

export function patternsSchema(): Shape<CrystalDocument<PatternsAnswer>> {
  type Exact = NonNullable<PatternAnswer["exact"]>;
  type Acoustic = PatternsAnswer["acoustic"][number];
  const pattern = object<PatternAnswer>({
    irrep: text(),
    sites: list(text(), "sites that move"),
    repeat: count("number among the patterns of this species and these sites", 1),
    repeats: count("", 1),
    atoms: list(count(), "numbers in the list of atoms, from 0"),
    partners: list(list(vector()), "displacements of the atoms, Cartesian, of unit length in all"),
    exact: orNull(
      object<Exact>({ norm: number(), coefficients: list(list(list(text()))) }),
      "displacements = coefficients / sqrt(norm), null where they have no short form",
    ),
  });
  const acoustic = object<Acoustic>({
    irrep: text(),
    directions: list(list(number())),
    terms: list(
      object<Acoustic["terms"][number]>({ site: text(), repeat: count("", 1), factor: number(), turned: number() }),
    ),
    exact: orNull(object<NonNullable<Acoustic["exact"]>>({ norm: number(), coefficients: list(list(text())) })),
  });
  return object<CrystalDocument<PatternsAnswer>>({
    ...crystalHeading("patterns"),
    frame: text("Cartesian axes of the displacements"),
    factorGroup: factorGroup(),
    opticOnly: flag(),
    atoms: list(
      object<PatternsAnswer["atoms"][number]>({
        label: text(),
        element: orNull(text()),
        position: vector("fractional"),
        operation: xyz("makes the atom from its site"),
      }),
    ),
    species: list(
      object<PatternsAnswer["species"][number]>({
        label: text(),
        dimension: whole(),
        infrared: flag(),
        raman: flag(),
        partnersLike: text("functions that transform as the partners do"),
      }),
    ),
    patterns: list(pattern),
    acoustic: list(acoustic),
  });
}
