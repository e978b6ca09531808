import { InputProblem } from "../problem.ts";
import { operationsFromHall } from "./hall-symbol.ts";
import { type GroupNameCandidate, readGroupName } from "./hermann-mauguin.ts";
import { settingOperations } from "./setting-group.ts";
import { type SpaceGroup, spaceGroup } from "./space-group.ts";

/** One group that a text may mean. */
export interface NamedSetting {
  /** `P 1 21/c 1`, `I 41/a m d:2`, a Hall symbol. */
  readonly name: string;
  /** Name of the axes: equal for settings that differ in their origin only. */
  readonly axes: string;
  readonly group: SpaceGroup;
}

/** A space group given by name. */
export interface NamedGroup {
  /** The name in full, as it was understood. */
  readonly understoodAs: string;
  /** At least one; the most usual setting first. */
  readonly settings: readonly [NamedSetting, ...NamedSetting[]];
  /** What the name leaves open, in words: `origin choice`. */
  readonly ambiguity: readonly string[];
}

/**
 * The groups that a text may mean: a number, a Hermann-Mauguin or Schoenflies symbol as `readGroupName` reads it, or a
 * Hall symbol, which may have `Hall` in front where it could be either.
 * @throws InputProblem as `readGroupName`; that of the Hall symbol where the text can only be meant as one
 * @example
 * ```ts
 * const { settings, ambiguity } = namedGroup("F d -3 m");
 * settings.map((s) => s.name); // ["F 41/d -3 2/m:2", "F 41/d -3 2/m:1"]
 * ambiguity; // ["origin choice"]
 * identifyGroup(namedGroup("-P 2ac 2n").settings[0].group).number; // 62
 * ```
 */
export function namedGroup(text: string): NamedGroup {
  const asked = /^(\s*hall\b[\s:]*)(.*)$/is.exec(text);
  if (asked) return fromHall(text, asked[2]!, asked[1]!.length);
  const { name, number } = splitNumber(text);
  try {
    const { understoodAs, candidates, ambiguity } = readGroupName(name);
    const [first, ...others] = candidates.filter((c) => number === null || c.number === number).map(settingOf);
    if (!first) throw numberUnlike(text, name, number!);
    return { understoodAs, settings: [first, ...others], ambiguity };
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    return hallInstead(text, e);
  }
}

/** `P b n m (No. 62)`, `Pbnm, #62`, `R -3 c (167)`; 1 and 2 in brackets are origins. `No. 62` is a number alone. */
function splitNumber(text: string): { readonly name: string; readonly number: number | null } {
  const alone = /^\s*(?:no\.?|nr\.?|#)\s*(\d{1,3})\s*$/i.exec(text);
  if (alone) return { name: alone[1]!, number: null };
  const m = /^(.*[^\s,;(])[\s,;(]+(?:(?:no\.?|nr\.?|#)\s*(\d{1,3})\)?|(?<=\()([3-9]|\d{2,3})\))\s*$/i.exec(text);
  return m ? { name: m[1]!, number: Number(m[2] ?? m[3]) } : { name: text, number: null };
}

function numberUnlike(text: string, name: string, number: number): InputProblem {
  const start = text.lastIndexOf(String(number));
  return new InputProblem(
    "group-name-contradiction",
    `${name.trim()} is not No. ${number}`,
    { start, end: start + String(number).length },
    "correct the symbol or the number, or leave one of them out",
  );
}

function settingOf({ number, setting, transformation }: GroupNameCandidate): NamedSetting {
  const { hermannMauguin, choice, axes } = setting;
  return {
    axes: /^[12]?$/.test(choice) ? axes : `${axes}:${choice}`,
    name: `${hermannMauguin.full}${choice ? `:${choice}` : ""}`,
    group: spaceGroup(settingOperations({ number, toReference: transformation })),
  };
}

/** Hermann-Mauguin symbols have no minus before the lattice letter, no quotes, stars or equals signs. */
const ONLY_HALL = /^\s*-\s*[A-Z]|["'*=^]\s*\S/i;

function hallInstead(text: string, problem: InputProblem): NamedGroup {
  try {
    return fromHall(text, text, 0);
  } catch (e) {
    throw e instanceof InputProblem && ONLY_HALL.test(text) ? e : problem;
  }
}

function fromHall(text: string, symbol: string, offset: number): NamedGroup {
  try {
    const group = spaceGroup(operationsFromHall(symbol.trim()).operations);
    const understoodAs = `the Hall symbol ${symbol.trim()}`;
    return { understoodAs, settings: [{ name: symbol.trim(), axes: "", group }], ambiguity: [] };
  } catch (e) {
    if (!(e instanceof InputProblem) || !e.span) throw e;
    const start = Math.min(text.length, e.span.start + offset + (symbol.length - symbol.trimStart().length));
    const span = { start, end: Math.max(start, Math.min(text.length, e.span.end + start - e.span.start)) };
    throw new InputProblem(e.code, e.message, span, e.hint);
  }
}
