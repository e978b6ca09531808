import { InputProblem } from "../problem.ts";
import { operationsFromHall } from "./hall-symbol.ts";
import { readGroupName } from "./hermann-mauguin.ts";
import { identify } from "./identification.ts";
import { type Setting, settingsOf } from "./settings.ts";
import { spaceGroupType } from "./space-group-type.ts";
import type { IdentifiedGroup } from "./summary.ts";
import { chain, reverse, type Transformation } from "./transformation.ts";
import { parseTransformation } from "./transformation-text.ts";

/** A setting asked for, seen from the cell in use. */
export interface RequestedSetting {
  /** (a', b', c') = (a, b, c) P, x = P x' + p. */
  readonly transformation: Transformation;
  /** How the request was understood, where that is not plain; a sentence. */
  readonly note: string | null;
}

type Given = Pick<IdentifiedGroup, "number" | "toReference">;

/**
 * The way from the cell of a group to a setting of its type: `reference`, a name such as `cab`, `b2`, `:1`, `:R`, a
 * Hermann-Mauguin symbol such as `P b n m` or `R -3 m :R`, or axes and origin of the cell in use, `b,c,a;0,0,1/4`.
 * @throws InputProblem `setting-unknown`, and what `parseTransformation` throws
 */
export function requestedSetting(given: Given, text: string): RequestedSetting {
  const wanted = text.trim();
  const settings = settingsOf(given.number);
  const named = wanted === "reference" ? settings[0] : settings.find((s) => s.name !== "" && s.name === wanted);
  if (named) return { transformation: wayTo(given, named.toReference), note: null };
  if (wanted.includes(",") && /^[-+*/.,;\sabc\d]+$/.test(wanted)) {
    return { transformation: parseTransformation(wanted), note: null };
  }
  return bySymbol(given, wanted, settings);
}

/**
 * The way to the axes and origin of a Hall symbol.
 * @throws InputProblem `hall-unreadable`, `setting-unknown`
 */
export function requestedHall(given: Given, symbol: string): RequestedSetting {
  const { number, transformation } = identify(operationsFromHall(symbol).operations);
  if (number !== given.number) throw anotherGroup(symbol, number, given.number);
  return { transformation: wayTo(given, transformation), note: null };
}

function wayTo({ toReference }: Given, settingToReference: Transformation): Transformation {
  return chain(toReference, reverse(settingToReference));
}

function bySymbol(given: Given, wanted: string, settings: readonly Setting[]): RequestedSetting {
  let reading: ReturnType<typeof readGroupName>;
  try {
    reading = readGroupName(wanted);
  } catch (e) {
    throw e instanceof InputProblem ? unknownSetting(wanted, given.number, settings) : e;
  }
  const own = reading.candidates.filter((c) => c.number === given.number);
  const first = own[0];
  if (!first) throw anotherGroup(wanted, reading.candidates[0]!.number, given.number);
  const { ambiguity, understoodAs } = reading;
  const name = first.setting.name || "reference";
  const note =
    own.length > 1
      ? `"${wanted}" read as ${understoodAs}, setting ${name}; left open: ${ambiguity.join(", ")}, the most usual is taken`
      : null;
  return { transformation: wayTo(given, first.transformation), note };
}

function unknownSetting(wanted: string, number: number, settings: readonly Setting[]): InputProblem {
  const names = settings.map((s) => s.name || "reference").join(", ");
  return new InputProblem(
    "setting-unknown",
    `No. ${number} has no setting "${wanted}"`,
    null,
    `it has ${names}; or give a symbol such as "${settings[0]!.hermannMauguin.short}", or a change "b,c,a;0,0,0"`,
  );
}

function anotherGroup(wanted: string, meant: number, number: number): InputProblem {
  const { hermannMauguin } = spaceGroupType(number);
  return new InputProblem(
    "setting-unknown",
    `"${wanted}" is a setting of No. ${meant}, but the structure has No. ${number}, ${hermannMauguin}`,
    null,
    "a change of setting keeps the space-group type; ask for a setting of that type",
  );
}
