import { InputProblem } from "../problem.ts";
import { SPACE_GROUP_TYPES } from "./tables/space-group-types.ts";

/** One of the 230 space-group types in its reference setting. */
export interface SpaceGroupType {
  /** 1 to 230. */
  readonly number: number;
  /** `D2h^16`. */
  readonly schoenflies: string;
  /** Short symbol with blanks, all directions named for unique axis b: `P 1 21/c 1`, `P n m a`, `F d -3 m`. */
  readonly hermannMauguin: string;
  /** Full symbol with blanks: `P 21/n 21/m 21/a`, `F 41/d -3 2/m`. */
  readonly fullHermannMauguin: string;
  /** Hall symbol of the reference setting. */
  readonly hall: string;
  /** What the reference setting chooses: origin `2`, hexagonal axes `H`, or nothing to choose. */
  readonly choice: "" | "2" | "H";
}

let lines: readonly string[] | null = null;
const decoded: (SpaceGroupType | undefined)[] = [];

/** The 230 types in the order of their numbers; each decoded once, on first use. */
export function spaceGroupTypes(): readonly SpaceGroupType[] {
  return tableLines().map((_, i) => typeAt(i)!);
}

function tableLines(): readonly string[] {
  lines ??= SPACE_GROUP_TYPES.trim().split("\n");
  return lines;
}

function typeAt(index: number): SpaceGroupType | undefined {
  const line = tableLines()[index];
  if (line !== undefined) decoded[index] ??= decode(line, index + 1);
  return decoded[index];
}

function decode(line: string, number: number): SpaceGroupType {
  const [schoenflies = "", symbol = "", hall = "", full] = line.split("|");
  const [hermannMauguin = "", choice = ""] = symbol.split(":");
  return {
    number,
    schoenflies,
    hermannMauguin,
    fullHermannMauguin: full ?? hermannMauguin,
    hall,
    choice: choice.toUpperCase() as SpaceGroupType["choice"],
  };
}

/**
 * The type of a number.
 * @throws InputProblem `space-group-number` outside 1 to 230
 */
export function spaceGroupType(number: number): SpaceGroupType {
  const type = typeAt(number - 1);
  if (type) return type;
  throw new InputProblem(
    "space-group-number",
    `there is no space-group type ${number}`,
    null,
    "space-group types are numbered from 1 to 230",
  );
}
