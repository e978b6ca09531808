import type {
  HydrogenBond,
  MeasuredQuantity,
  Neighbour,
  NeighboursAnswer,
  SiteNeighbours,
  TorsionRow,
} from "../../structure/index.ts";
import { vector, xyz } from "./common.ts";
import {
  amount,
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
} from "./shape.ts";
import { type CrystalDocument, crystalHeading } from "./structure.ts";

const code = () =>
  orNull(textLike(/^\S+_\d\d\d$/), "symmetry code `3_655`; null where a digit does not hold the cells");
const su = () =>
  orNull(amount(), "standard uncertainty; 0 where symmetry fixes the value, null where the file does not tell");
const quantity = (description = "") => object<MeasuredQuantity>({ value: number(), su: su() }, description);
const element = () => orNull(text(), "symbol, null where the file gives none");

const neighbour = () =>
  object<Neighbour>({
    label: text(),
    element: element(),
    occupancy: amount("of all sites at the position"),
    alsoThere: list(text(), "labels of further sites at its position"),
    code: code(),
    operation: xyz("carries the listed atom there, whole cells included"),
    distance: amount("angstrom"),
    su: su(),
    bond: orNull(text(), "rule by which it is bonded"),
    radiiShare: orNull(amount(), "distance over the sum of the covalent radii"),
    valence: orNull(amount(), "bond valence; null without parameters"),
    solidAngle: orNull(
      amount(),
      "share of the sphere that its face of the domain of the site covers; null where that is open",
    ),
    orbit: count("neighbours of one number are equivalent under the site symmetry"),
  });

const site = () =>
  object<SiteNeighbours>({
    label: text(),
    element: element(),
    kind: choice({ hydrogen: true, "non-metal": true, metal: true }),
    occupancy: amount(),
    multiplicity: count("images in the cell", 1),
    order: count("of the site-symmetry group", 1),
    position: vector("fractional"),
    alsoHere: list(text(), "labels of further sites at the position"),
    coordination: count("number of the neighbours listed"),
    occupied: amount("how many of them are there on average when the site is occupied"),
    formula: text(),
    numbers: object<SiteNeighbours["numbers"]>(
      {
        bonds: count(),
        gap: orNull(count(), "neighbours before the widest gap"),
        effective: orNull(amount(), "effective number of Hoppe"),
        solidAngle: orNull(amount(), "sum of solid angles over the largest"),
      },
      "numbers of neighbours by different definitions",
    ),
    gap: orNull(
      object<NonNullable<SiteNeighbours["gap"]>>({
        count: count("", 1),
        last: amount("angstrom"),
        next: orNull(
          object<{ readonly label: string; readonly distance: number }>({ label: text(), distance: amount() }),
        ),
      }),
      "where the first shell ends by the widest gap",
    ),
    next: orNull(
      object<{ readonly label: string; readonly distance: number }>({ label: text(), distance: amount() }),
      "the nearest atom that is no neighbour, angstrom",
    ),
    meanDistance: orNull(quantity("angstrom")),
    valence: orNull(
      object<NonNullable<SiteNeighbours["valence"]>>({
        value: amount(),
        su: su(),
        charge: orNull(number(), "oxidation state of a cation that the parameters are for"),
        stated: flag("whether the file states it"),
        hydrogens: count("bonded to the site, and not in the sum"),
      }),
    ),
    alternatives: flag("whether some neighbours are never there at the same time; there is no shape then"),
    shapes: list(
      object<SiteNeighbours["shapes"][number]>({ name: text(), symbol: orNull(text()), measure: amount("0 to 100") }),
      "continuous shape measures, best first",
    ),
    shapeSearch: choice({ exhaustive: true, turns: true }),
    distortion: orNull(
      object<NonNullable<SiteNeighbours["distortion"]>>({
        volume: orNull(amount(), "of the convex hull of the neighbours, cubic angstrom"),
        lengthDistortion: amount("Baur 1974"),
        quadraticElongation: orNull(amount(), "Robinson, Gibbs, Ribbe 1971"),
        angleVariance: orNull(amount(), "square degrees"),
        tau4: orNull(number(), "Yang, Powell, Houser 2007"),
        tau5: orNull(number(), "Addison et al. 1984"),
      }),
    ),
    neighbours: list(neighbour(), "nearest first"),
    angles: list(
      object<SiteNeighbours["angles"][number]>({
        ends: pair(count(), "indices into the neighbours"),
        angle: amount("degrees"),
        su: su(),
        count: count("equivalent angles", 1),
      }),
    ),
  });

const codedAtom = () => object<HydrogenBond["donor"]>({ label: text(), code: code() });

const hydrogenBond = () =>
  object<HydrogenBond>({
    donor: codedAtom(),
    hydrogen: orNull(codedAtom(), "null where the file does not place it"),
    acceptor: codedAtom(),
    donorHydrogen: orNull(quantity("angstrom")),
    hydrogenAcceptor: orNull(quantity("angstrom")),
    donorAcceptor: quantity("angstrom"),
    angle: orNull(quantity("degrees")),
    count: count("equivalent bonds of the donor", 1),
  });

export function neighboursSchema(): Shape<CrystalDocument<NeighboursAnswer>> {
  return object<CrystalDocument<NeighboursAnswer>>({
    ...crystalHeading("neighbours"),
    choice: object<NeighboursAnswer["choice"]>(
      {
        kind: choice({ shell: true, bonds: true, within: true, nearest: true, contacts: true }),
        distance: orNull(amount(), "angstrom"),
        count: orNull(count()),
      },
      "which atoms count as neighbours",
    ),
    numbering: choice({ file: true, here: true }, "whose numbers of operations the codes have"),
    operations: list(
      object<NeighboursAnswer["operations"][number]>({ number: text(), xyz: xyz() }),
      "what the numbers in codes mean",
    ),
    uncertainties: object<NeighboursAnswer["uncertainties"]>({ cell: flag(), coordinates: flag() }),
    sites: list(site()),
    hydrogenBonds: list(hydrogenBond()),
    hydrogenMissing: flag("whether the file lacks hydrogen of its formula"),
    torsions: list(
      object<TorsionRow>({ atoms: list(codedAtom()), angle: number("degrees, clockwise positive"), su: su() }),
    ),
  });
}
