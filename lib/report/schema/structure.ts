import type {
  ComposeAnswer,
  ConfigurationRow,
  ConfigurationsAnswer,
  HigherGroup,
  Position,
  PositionOrbit,
  PositionsAnswer,
  PositionsCell,
  ReduceAnswer,
  SiteAnswer,
  SiteImage,
  SitesAnswer,
  SymmetriseAnswer,
} from "../../structure/index.ts";
import type { SpaceGroupSummary } from "../../symmetry/index.ts";
import { cellNumbers, type Heading, heading, positionTolerance, spaceGroup, vector, xyz } from "./common.ts";
import { bravaisType, letter } from "./group.ts";
import {
  amount,
  choice,
  count,
  type Fields,
  flag,
  list,
  number,
  object,
  optional,
  orNull,
  type Shape,
  text,
  textLike,
  pair as twoOf,
} from "./shape.ts";

/** An answer about a crystal, as it is printed. */
export type CrystalDocument<T> = Heading & { readonly spaceGroup: SpaceGroupSummary } & T;

/** Fields in front of every answer about a crystal. */
export const crystalHeading = (command: string): Fields<Heading & { readonly spaceGroup: SpaceGroupSummary }> => ({
  ...heading(command),
  tolerance: positionTolerance(),
  spaceGroup: spaceGroup(),
});

const occupancy = () => amount("share of cells in which the atom is there");
const element = () => orNull(text(), "null where neither type symbol nor label tells");

/** Of `sites`, and of the sites that `compose` places. */
function siteShape(): Shape<SiteAnswer> {
  const image = object<SiteImage>({
    coordinates: xyz("exact where no cell was given, else rounded"),
    position: vector("fractional"),
    operation: xyz("makes it from the point given, up to whole cells"),
  });
  return object<SiteAnswer>({
    label: text(),
    element: element(),
    occupancy: occupancy(),
    multiplicity: count("images in the cell of the file", 1),
    wyckoff: letter(),
    referencePosition: textLike(/^\d+[a-zA]$/, "multiplicity and letter in the reference setting"),
    siteSymmetry: text("oriented symbol"),
    schoenflies: text(),
    order: count("operations that leave the site where it is", 1),
    position: vector("fractional, as the file gives it"),
    snapped: vector("fractional, on the special position"),
    shift: amount("distance between the two, angstrom"),
    constraint: xyz("where the site may move, `x,1/4,z`"),
    referenceConstraint: xyz("the same in the reference setting"),
    adp: textLike(/^[^,]+(,[^,]+){5}$/, "u11,u22,u33,u12,u13,u23 as far as they are independent"),
    adpHoldsFor: choice({ U: true, beta: true }, "form of the tensor in which this holds in any cell"),
    images: optional(list(image, "all equivalent positions in the cell, where they were asked for")),
  });
}

export function sitesSchema(): Shape<CrystalDocument<SitesAnswer>> {
  return object<CrystalDocument<SitesAnswer>>({ ...crystalHeading("sites"), sites: list(siteShape()) });
}

export function composeSchema(): Shape<CrystalDocument<ComposeAnswer>> {
  const contents = object<ComposeAnswer["contents"]>({
    sum: text("of one formula unit, Hill order"),
    formula: text("as chemists write it"),
    z: count("formula units in the cell", 1),
    weight: orNull(amount("of one formula unit, dalton"), "null where an element has no standard mass"),
    density: orNull(amount("g cm^-3"), "null where an element has no standard mass"),
  });
  const pair = object<NonNullable<ComposeAnswer["shortest"]>>({
    labels: twoOf(text()),
    distance: amount("angstrom"),
  });
  const higher = object<NonNullable<ComposeAnswer["higher"]>>({
    number: count("", 1),
    hermannMauguin: text(),
    index: number("how many times as many operations as the group named, by volume"),
  });
  return object<CrystalDocument<ComposeAnswer>>({
    ...crystalHeading("compose"),
    cell: cellNumbers(),
    volume: amount("cubic angstrom"),
    sites: list(siteShape()),
    contents,
    shortest: orNull(pair, "between atoms that can be there together"),
    higher: orNull(
      higher,
      "symmetry that the sites have beyond the group; null if none, or not looked for in large cells",
    ),
  });
}

export function positionsSchema(): Shape<CrystalDocument<PositionsAnswer>> {
  const position = object<Position>({
    label: text(),
    element: element(),
    occupancy: occupancy(),
    x: number("fractional"),
    y: number("fractional"),
    z: number("fractional"),
    operation: xyz("makes the atom from its site, up to whole cells"),
    code: orNull(
      textLike(/^\d+_\d{3}$/, "number of the operation and whole cells, 3_655"),
      "null where no digit holds the cells",
    ),
    meaning: text("of the operation with its whole cells"),
  });
  const orbit = object<PositionOrbit>({
    label: text(),
    element: element(),
    occupancy: occupancy(),
    multiplicity: count("images in the cell of the operations", 1),
    order: count("operations that leave the site where it is", 1),
    members: list(count(), "indices into the positions"),
  });
  const cell = object<PositionsCell>({
    cell: cellNumbers(),
    P: xyz("(a',b',c') = (a,b,c) P in terms of the cell of the file"),
    p: text("origin, x = P x' + p"),
    volume: amount("cubic angstrom"),
    symmetry: choice({ kept: true, none: true }, "whether the operations are those of this cell or of the file"),
  });
  const row = object<ConfigurationRow>({
    number: count("place in the list", 1),
    degeneracy: count("equivalent arrangements", 1),
    spaceGroup: object<ConfigurationRow["spaceGroup"]>({ number: count("", 1), hermannMauguin: text() }),
    sites: list(object<ConfigurationRow["sites"][number]>({ label: text(), multiplicity: count("", 1) })),
  });
  const configurations = object<ConfigurationsAnswer>({
    arrangements: textLike(/^\d+$/, "a whole number, which may be very large"),
    inequivalent: textLike(/^\d+$/, "up to symmetry, by Burnside's lemma"),
    excluded: count("left out since atoms in them are too near each other"),
    places: list(object<ConfigurationsAnswer["places"][number]>({ names: list(text()), counts: list(count()) })),
    list: list(row),
  });
  return object<CrystalDocument<PositionsAnswer>>({
    ...crystalHeading("positions"),
    positions: list(position),
    count: count(),
    cell,
    orbits: list(orbit),
    configurations: optional(configurations),
  });
}

export function reduceSchema(): Shape<Heading & ReduceAnswer> {
  const plain: Fields<ReduceAnswer["niggli"]> = {
    cell: cellNumbers(),
    P: xyz("(a',b',c') = (a,b,c) P"),
    volume: amount("cubic angstrom"),
  };
  const symmetric = object<ReduceAnswer["conventional"]>({
    ...plain,
    lattice: bravaisType(),
    deviation: amount("angle by which the lattice misses this symmetry, degrees"),
  });
  return object<Heading & ReduceAnswer>({
    ...heading("reduce"),
    tolerance: positionTolerance(),
    cell: cellNumbers(),
    volume: amount("cubic angstrom"),
    centring: orNull(text(), "null where the translations have no letter"),
    centrings: list(xyz()),
    niggli: object<ReduceAnswer["niggli"]>(plain),
    delaunay: object<ReduceAnswer["delaunay"]>(plain),
    conventional: symmetric,
    lattices: list(symmetric, "lattices of higher symmetry that this one comes near to, and its own"),
    angleTolerance: amount("degrees"),
  });
}

export function symmetriseSchema(): Shape<CrystalDocument<SymmetriseAnswer>> {
  const displaced = { largest: amount("angstrom"), mean: amount("angstrom") };
  const higher = object<HigherGroup>({
    tolerance: amount("displacement by its worst operation, angstrom"),
    strain: amount("of the cell under its worst rotation, dimensionless"),
    number: count("", 1),
    hermannMauguin: text(),
    index: number("how many times as many operations it has"),
  });
  const site = object<SymmetriseAnswer["sites"][number]>({
    label: text(),
    element: element(),
    occupancy: occupancy(),
    multiplicity: count("", 1),
    wyckoff: letter(),
    siteSymmetry: text(),
    position: vector("fractional"),
    labels: list(text(), "sites of the file that became this one"),
    moved: amount("angstrom"),
  });
  return object<CrystalDocument<SymmetriseAnswer>>({
    ...crystalHeading("symmetrise"),
    tolerance: object<SymmetriseAnswer["tolerance"]>({
      position: amount("angstrom"),
      displacement: amount("angstrom"),
      strain: amount("dimensionless"),
    }),
    declared: spaceGroup(),
    found: spaceGroup(),
    index: number("how many times as many operations the group found has as the one declared, by volume"),
    operations: list(
      object<SymmetriseAnswer["operations"][number]>({
        xyz: xyz(),
        inGivenCell: text("the same in the cell of the file"),
        declared: flag(),
        ...displaced,
      }),
    ),
    translations: list(object<SymmetriseAnswer["translations"][number]>({ vector: xyz(), ...displaced })),
    notKept: list(xyz(), "declared operations that strain the cell"),
    additional: list(
      object<SymmetriseAnswer["additional"][number]>({ xyz: xyz(), ...displaced, strain: amount() }),
      "operations that a larger tolerance lets pass",
    ),
    additionalComplete: flag(),
    higher: list(higher),
    cellChoice: choice({ given: true, conventional: true }),
    cell: cellNumbers(),
    transformation: object<SymmetriseAnswer["transformation"]>({ P: xyz(), p: xyz() }),
    originShift: vector("fractional"),
    moved: object<SymmetriseAnswer["moved"]>(displaced),
    sites: list(site),
  });
}
