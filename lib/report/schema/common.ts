import type { CellNumbers } from "../../structure/index.ts";
import type { SpaceGroupSummary } from "../../symmetry/index.ts";
import {
  amount,
  choice,
  count,
  defined,
  type Fields,
  flag,
  list,
  number,
  object,
  type Shape,
  text,
  textLike,
  triple,
} from "./shape.ts";

/** What every document begins with. */
export interface Heading {
  readonly sitefold: string;
  readonly command: string;
  readonly source: { readonly file: string; readonly block: string };
  readonly notes: readonly string[];
  readonly tolerance: { readonly position: number };
}

/** Fields of the heading of one command. */
export function heading(command: string): Fields<Omit<Heading, "tolerance">> {
  return {
    sitefold: textLike(/^\d+\.\d+\.\d+/, "version of the program"),
    command: { schema: { const: command } },
    source: object<Heading["source"]>({
      file: text("path as given, `standard input`, or what was given in place of a file"),
      block: text("name of the data block; empty if it has none or no file was read"),
    }),
    notes: list(text(), "how the file was read, and what to bear in mind"),
  };
}

export const positionTolerance = (): Shape<Heading["tolerance"]> =>
  object<Heading["tolerance"]>({
    position: amount("positions closer than this are one position, angstrom; 0 where no positions are compared"),
  });

/** `-y+1/2,x,z+1/4` */
export const xyz = (description = "") => textLike(/^[^,]+,[^,]+,[^,]+$/, description);

export const vector = (description = "") => triple(number(), description);

export const cellNumbers = (): Shape<CellNumbers> => defined("cell");
export const spaceGroup = (): Shape<SpaceGroupSummary> => defined("spaceGroup");

export const pointGroupNames = () =>
  object<{ readonly hermannMauguin: string; readonly schoenflies: string }>({
    hermannMauguin: text(),
    schoenflies: text(),
  });

/** Fields of a space group that every command gives. */
export function spaceGroupFields(): Fields<SpaceGroupSummary> {
  return {
    number: { schema: { type: "integer", minimum: 1, maximum: 230 } },
    hermannMauguin: text("of the setting in use; of the reference setting where the one in use has no name"),
    hall: text("generates the operations of the setting in use"),
    schoenflies: text(),
    crystalSystem: choice({
      triclinic: true,
      monoclinic: true,
      orthorhombic: true,
      tetragonal: true,
      trigonal: true,
      hexagonal: true,
      cubic: true,
    }),
    pointGroup: pointGroupNames(),
    settingName: text("`reference`, a name such as cab or :1, or `unconventional`"),
    referenceSymbol: text("Hermann-Mauguin symbol of the reference setting"),
    toReference: object<SpaceGroupSummary["toReference"]>(
      { P: xyz(), p: xyz() },
      "(a,b,c) of the reference setting = (a,b,c) P, x = P x' + p",
    ),
    operations: list(xyz(), "all operations of the cell in use, modulo its translations"),
    centrings: list(xyz(), "centring translations of the cell in use, 0,0,0 among them"),
    centrosymmetric: flag(),
    sohncke: flag("only rotations and screw rotations"),
  };
}

/** What other schemas refer to, by name. */
export function definitions(): Readonly<Record<string, Shape<never>>> {
  return {
    cell: {
      schema: {
        type: "array",
        items: { type: "number", exclusiveMinimum: 0 },
        minItems: 6,
        maxItems: 6,
        description: "a, b, c in angstrom, alpha, beta, gamma in degrees",
      },
    },
    spaceGroup: { schema: object<SpaceGroupSummary>(spaceGroupFields(), "a space group in the cell in use").schema },
    species: {
      schema: {
        type: "object",
        additionalProperties: count("", 1).schema,
        description: "numbers by species; species that do not occur are left out",
      },
    },
  };
}
