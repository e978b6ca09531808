import type {
  ComparedSite,
  ComparedStructure,
  ComparisonAnswer,
  DisplacementTensor,
  LatticeStrain,
  ResiteAnswer,
  ResitedSite,
  SiteAlone,
  SitePair,
  StandardisationAnswer,
} from "../../structure/index.ts";
import { cellNumbers, type Heading, heading, positionTolerance, spaceGroup, vector, xyz } from "./common.ts";
import {
  amount,
  choice,
  count,
  either,
  flag,
  list,
  number,
  object,
  optional,
  orNull,
  type Shape,
  text,
  textLike,
  triple,
} from "./shape.ts";

const letter = () => textLike(/^[a-zA]$/, "letter of the Wyckoff position, A for alpha");
const element = () => orNull(text(), "null where neither type symbol nor label tells");
const origin = () => textLike(/^[^,]+,[^,]+,[^,]+$/, "x = P x' + p; decimals where the origin is free");

export function resiteSchema(): Shape<Heading & ResiteAnswer> {
  return object<Heading & ResiteAnswer>({
    ...heading("resite"),
    tolerance: positionTolerance(),
    given: spaceGroup(),
    spaceGroup: spaceGroup(),
    P: xyz("(a',b',c') = (a,b,c) P in terms of the cell of the file"),
    p: origin(),
    origin: vector("p as numbers"),
    cell: cellNumbers(),
    volume: amount("cubic angstrom"),
    sites: list(site()),
    standardisation: optional(standardisation()),
    comparison: optional(comparison()),
  });
}

function site(): Shape<ResitedSite> {
  return object<ResitedSite>({
    label: text(),
    from: text("label in the file"),
    element: element(),
    occupancy: amount(),
    multiplicity: count("images in the new cell", 1),
    wyckoff: letter(),
    siteSymmetry: text(),
    constraint: xyz("where the site may move"),
    position: vector("fractional, on the special position"),
    su: list(orNull(amount())),
    displacement: orNull(displacement()),
  });
}

function displacement(): Shape<DisplacementTensor> {
  type Kind<K extends DisplacementTensor["kind"]> = Extract<DisplacementTensor, { kind: K }>;
  const six = { schema: { type: "array", items: { type: "number" }, minItems: 6, maxItems: 6 } };
  return either(
    object<Kind<"isotropic">>({
      kind: choice({ isotropic: true }),
      iso: number("square angstrom"),
      su: orNull(amount()),
    }),
    object<Kind<"anisotropic">>({
      kind: choice({ anisotropic: true }),
      u: { schema: { ...six.schema, description: "U11 U22 U33 U12 U13 U23, square angstrom" } },
      su: list(orNull(amount())),
    }),
  );
}

function standardisation(): Shape<StandardisationAnswer> {
  return object<StandardisationAnswer>({
    gamma: amount("standardisation parameter"),
    centre: amount("distance of the mean position from the origin, in fractions of the axes"),
    pearsonSymbol: textLike(/^[a-z][A-Z]\d+(\.\d+)?$/, "Bravais type and atoms of the conventional cell"),
    wyckoffSequence: text("letters of the occupied positions from the last, with their numbers"),
    axes: count("choices of axes with the standard cell", 1),
    shifts: count("origins that the group fixes, for each", 1),
    origins: count("origins tried along free directions", 1),
    free: list(textLike(/^[abc]$/), "axes along which the origin is free"),
    compared: count("descriptions", 1),
    tied: count("descriptions with the smallest gamma", 1),
    hand: choice({ kept: true, either: true }),
    mirrored: flag("whether the mirror image is described"),
  });
}

function comparison(): Shape<ComparisonAnswer> {
  const compared = () =>
    object<ComparedStructure>({
      spaceGroup: object<ComparedStructure["spaceGroup"]>({ number: count("", 1), hermannMauguin: text() }),
      cell: cellNumbers(),
      volume: amount("cubic angstrom"),
      contents: text("atoms of the cell"),
      multiple: amount("volume over that of the smallest cell the atoms have"),
    });
  const alone = () => list(object<SiteAlone>({ site: comparedSite(), atoms: count("", 1) }));
  return object<ComparisonAnswer>({
    asked: choice({ same: true, isotypic: true }, "whether elements may stand for others"),
    verdict: choice({ same: true, isotypic: true, incomplete: true, different: true }),
    disagreement: orNull(
      choice({
        composition: true,
        lattice: true,
        positions: true,
        elements: true,
        occupancy: true,
        "space group": true,
      }),
      "null unless they are different",
    ),
    first: compared(),
    second: compared(),
    transformation: orNull(
      object<NonNullable<ComparisonAnswer["transformation"]>>({ P: xyz(), p: origin(), origin: vector() }),
      "x(first) = P x(second) + p",
    ),
    hand: orNull(choice({ same: true, other: true }), "other: the second is like the mirror image of the first"),
    cell: orNull(cellNumbers(), "of the first on the axes of the second"),
    strain: orNull(strain()),
    displacement: orNull(
      object<NonNullable<ComparisonAnswer["displacement"]>>({
        largest: amount("angstrom"),
        rootMeanSquare: amount("angstrom"),
        atoms: count("paired atoms in the cell of the first"),
      }),
    ),
    pairs: list(
      object<SitePair>({
        first: comparedSite(),
        second: comparedSite(),
        atoms: count("in the cell of the first"),
        largest: amount("angstrom"),
      }),
    ),
    alone: object<ComparisonAnswer["alone"]>({ first: alone(), second: alone() }),
    largestOccupancyDifference: amount(),
    elements: orNull(
      list(object<{ readonly first: string; readonly second: string }>({ first: text(), second: text() })),
    ),
    scale: amount("by which the axes of the second were multiplied"),
    nearest: orNull(
      object<NonNullable<ComparisonAnswer["nearest"]>>({ largest: amount(), rootMeanSquare: amount() }),
      "best match beyond the limit, angstrom",
    ),
    limits: object<ComparisonAnswer["limits"]>({
      displacement: amount("angstrom"),
      strain: amount("dimensionless"),
      occupancy: amount(),
    }),
  });
}

function comparedSite(): Shape<ComparedSite> {
  return object<ComparedSite>({
    label: text("of all rows at the position, joined by +"),
    element: element(),
    occupancy: amount(),
    wyckoff: letter(),
    multiplicity: count("", 1),
  });
}

function strain(): Shape<LatticeStrain> {
  return object<LatticeStrain>({
    principal: triple(number(), "elongations, dimensionless"),
    largest: amount(),
    volumeRatio: amount(),
  });
}
