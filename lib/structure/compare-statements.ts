import { InputProblem } from "../problem.ts";
import {
  type IdentifiedGroup,
  identify,
  operationKey,
  operationsFromHall,
  readGroupName,
  type SpaceGroup,
  settingOperations,
  spaceGroup,
  spaceGroupType,
} from "../symmetry/index.ts";
import type { Declared, DeclaredSymmetry, SymmetrySource } from "./declared-symmetry.ts";

/** A statement of the file that means another group, or the same in another setting, than the one in use. */
export interface SymmetryDisagreement {
  readonly kind: "hall" | "name" | "number";
  readonly declared: Declared;
  /** `type`: another of the 230; `setting`: the same type in other axes or with another origin; `unreadable`. */
  readonly level: "type" | "setting" | "unreadable";
  readonly message: string;
}

/**
 * Compares what a file states with the group in use. A statement that is word for word that of the setting in use
 * agrees; only others are read and worked out.
 */
export function compareStatements(
  declared: DeclaredSymmetry,
  identified: IdentifiedGroup,
  source: SymmetrySource,
): SymmetryDisagreement[] {
  const { number, summary } = identified;
  const found: SymmetryDisagreement[] = [];
  const check = (
    kind: SymmetryDisagreement["kind"],
    statement: Declared | null,
    known: readonly string[],
    read: Reader,
  ) => {
    if (!statement || source === kind || known.some((k) => bare(k) === bare(statement.text))) return;
    const difference = differenceOf(statement, read, identified);
    if (difference) found.push({ kind, declared: statement, ...difference });
  };
  const { fullHermannMauguin, hermannMauguin } = spaceGroupType(number);
  const own = summary.settingName === "unconventional" ? [] : [summary.hermannMauguin];
  const names = [...own, ...(identified.isReference ? [hermannMauguin, fullHermannMauguin] : [])];
  check("hall", declared.hall, [summary.hall], (text) => meaningOfHall(text, number));
  check("name", declared.hermannMauguin, names, (text) => meaningOfName(text, number));
  check("number", declared.number, [String(number)], (text) => ({ numbers: [Number(text)], groups: null }));
  return found;
}

/** Letters, digits and signs of a symbol, for a comparison word for word; hexagonal axes need not be said. */
function bare(symbol: string): string {
  return symbol
    .replace(/[\s_()]/g, "")
    .replace(/:h$/i, "")
    .toLowerCase();
}

/** What a statement may mean: types, and all groups in the settings it allows (null: it says nothing of settings). */
interface Meaning {
  readonly numbers: readonly number[];
  readonly groups: (() => SpaceGroup[]) | null;
}

type Reader = (text: string) => Meaning;

function meaningOfHall(text: string, number: number): Meaning {
  const group = spaceGroup(operationsFromHall(text).operations);
  const own = identify(group.operations).number;
  return { numbers: [own], groups: own === number ? () => [group] : null };
}

function meaningOfName(text: string, number: number): Meaning {
  const { candidates } = readGroupName(text);
  const same = candidates.filter((c) => c.number === number);
  const groupOf = (c: (typeof same)[number]) =>
    spaceGroup(settingOperations({ number: c.number, toReference: c.transformation }));
  return { numbers: [...new Set(candidates.map((c) => c.number))], groups: () => same.map(groupOf) };
}

function differenceOf(
  statement: Declared,
  read: Reader,
  { number, group }: IdentifiedGroup,
): Pick<SymmetryDisagreement, "level" | "message"> | null {
  const what = `${statement.name} ${statement.text}`;
  try {
    const { numbers, groups } = read(statement.text);
    if (!numbers.includes(number)) {
      const stated = numbers.map((n) => `No. ${n}`).join(" or ");
      return { level: "type", message: `${what} is ${stated}, but the symmetry in use is No. ${number}` };
    }
    const keys = new Set(group.operations.map(operationKey));
    const inUse = (g: SpaceGroup) =>
      g.operations.length === keys.size && g.operations.every((a) => keys.has(operationKey(a)));
    if (groups === null || groups().some(inUse)) return null;
    const primitive = group.centrings.length === 1 && /^\s*['"]?[ABCFIR]/i.test(statement.text);
    const how = primitive
      ? "but the operations are those of a primitive cell"
      : "in another setting than the one in use";
    return { level: "setting", message: `${what} is the right type, No. ${number}, ${how}` };
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    return { level: "unreadable", message: `${what} could not be read: ${e.message}` };
  }
}
