import type { BravaisType, GroupAnswer } from "../../symmetry/index.ts";
import { type Heading, heading, positionTolerance, spaceGroupFields, xyz } from "./common.ts";
import { byName, choice, count, flag, list, object, orNull, type Shape, text, textLike } from "./shape.ts";

/** The eleven crystal classes with an inversion. */
export const laueClass = (): Shape<GroupAnswer["spaceGroup"]["laueClass"]> => ({
  schema: { enum: ["-1", "2/m", "mmm", "4/m", "4/mmm", "-3", "-3m", "6/m", "6/mmm", "m-3", "m-3m"] },
});

export const letter = () => textLike(/^[a-zA]$/, "letter of the Wyckoff position; A stands for alpha of P m m m");

export const bravaisType = (): Shape<BravaisType> =>
  choice({
    aP: true,
    mP: true,
    mS: true,
    oP: true,
    oS: true,
    oI: true,
    oF: true,
    tP: true,
    tI: true,
    hP: true,
    hR: true,
    cP: true,
    cI: true,
    cF: true,
  });

export function groupSchema(): Shape<Heading & GroupAnswer> {
  type Group = GroupAnswer["spaceGroup"];
  const wyckoff = object<Group["wyckoff"][number]>({
    letter: letter(),
    multiplicity: count("points in the cell in use", 1),
    siteSymmetry: text("oriented symbol"),
    schoenflies: text(),
    coordinates: list(xyz(), "modulo the centring translations"),
    conditions: list(text(), "extra conditions, `hkl: h+k=2n`"),
  });
  const condition = object<Group["conditions"][number]>({
    reflections: text(),
    condition: text(),
    cause: text(),
    implied: flag("follows from the conditions on wider classes of reflections"),
  });
  const group = object<Group>({
    ...spaceGroupFields(),
    crystalFamily: choice({
      triclinic: true,
      monoclinic: true,
      orthorhombic: true,
      tetragonal: true,
      hexagonal: true,
      cubic: true,
    }),
    bravaisType: bravaisType(),
    laueClass: laueClass(),
    arithmeticClass: text(),
    enantiomorph: orNull(count("", 1), "number of the enantiomorphic type, null where there is none"),
    symmorphic: flag(),
    polar: flag(),
    polarDirections: list({ schema: { type: "array", items: { type: "integer" }, minItems: 3, maxItems: 3 } }),
    symbols: orNull(
      object<NonNullable<Group["symbols"]>>({ short: text(), full: text(), extended: text() }),
      "Hermann-Mauguin symbols of the setting, null where it is in no table",
    ),
    conditions: list(condition),
    wyckoff: list(wyckoff),
  });
  return object<Heading & GroupAnswer>({
    ...heading("group"),
    tolerance: positionTolerance(),
    spaceGroup: group,
    meanings: list(
      object<GroupAnswer["meanings"][number]>({ xyz: xyz(), meaning: text("as International Tables print it") }),
      "operations modulo the centring translations",
    ),
    letterExchanges: list(
      object<GroupAnswer["letterExchanges"][number]>({
        change: text("new axes, then the new origin"),
        letters: byName(letter(), "new letter by old one, those that change"),
        anyCell: flag("false where only a cell of special shape allows it"),
      }),
    ),
  });
}
