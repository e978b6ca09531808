import { InputProblem, type Span } from "../problem.ts";
import { formatSymbol, type SymbolPart } from "./hermann-mauguin-symbol.ts";
import { partitions, readSymbolUnits, type WrittenSymbol } from "./hermann-mauguin-text.ts";
import { ambiguities } from "./name-ambiguity.ts";
import { type NameExtension, readExtension } from "./name-extension.ts";
import { settingsHolding, settingsNamed } from "./name-matching.ts";
import { nearestNames } from "./nearest-names.ts";
import { numberOfSchoenflies } from "./schoenflies-name.ts";
import { type Setting, settingsOf } from "./settings.ts";
import { spaceGroupType } from "./space-group-type.ts";
import { chain, reverse, type Transformation } from "./transformation.ts";

/** One group, in one setting, that a name may mean. */
export interface GroupNameCandidate {
  readonly number: number;
  readonly setting: Setting;
  /** From the axes and origin meant to the reference setting, a change written behind the symbol included. */
  readonly transformation: Transformation;
}

/** What the name of a space group says. */
export interface GroupNameReading {
  readonly text: string;
  readonly kind: "hermann-mauguin" | "schoenflies" | "number";
  /** The name in full, as it was understood: `P 1 21/c 1`, `I 41/a m d, origin choice 2`. */
  readonly understoodAs: string;
  /** At least one; the most usual setting first. */
  readonly candidates: readonly GroupNameCandidate[];
  /** What the name leaves open or what is unusual about it, in words: `origin choice`, `unique axis`. */
  readonly ambiguity: readonly string[];
}

/**
 * Reads the name of a space group as people write it: Hermann-Mauguin symbols short, full or old, in any conventional
 * setting, with or without blanks, with a code for setting or origin or a change of basis behind; Schoenflies symbols;
 * numbers. What the name leaves open is listed, not guessed.
 * @throws InputProblem `group-name-unreadable`, `group-name-unknown` or `group-name-extension`, with span and hint
 */
export function readGroupName(text: string): GroupNameReading {
  const bare = text.replace(/^[\s'"]+|[\s'"]+$/g, "");
  const byNumber = /^(\d{1,3})(?:\s*:\s*(.+))?$/.exec(bare);
  if (byNumber) return readNumber(text, Number(byNumber[1]), byNumber[2]);
  const schoenflies = numberOfSchoenflies(bare);
  if (schoenflies !== null)
    return reading(text, "schoenflies", spaceGroupType(schoenflies).schoenflies, usual(schoenflies), []);
  return readSymbol(text);
}

function readNumber(text: string, number: number, code: string | undefined): GroupNameReading {
  if (number < 1 || number > 230) {
    const span = spanOf(text, String(number));
    throw new InputProblem(
      "group-name-unknown",
      `there is no space group ${number}`,
      span,
      "numbers run from 1 to 230",
    );
  }
  const extensions = code ? [readExtension(code, spanOf(text, code))] : [];
  const settings = code ? choose(text, settingsOf(number), extensions, spanOf(text, code)) : usual(number);
  return reading(text, "number", `No. ${number}`, settings, extensions);
}

function spanOf(text: string, part: string): Span {
  const start = Math.max(0, text.indexOf(part));
  return { start, end: start + part.length };
}

/** The settings of a type without larger cells and without reverse hexagonal axes. */
function usual(number: number): Setting[] {
  return settingsOf(number).filter((s) => !/^[A-IH]/.test(s.axes) && s.choice !== "H-reverse");
}

function readSymbol(text: string): GroupNameReading {
  const written = readSymbolUnits(text);
  const extensions = written.extensions.map((e) => readExtension(e.text, e.span));
  const { settings, remarks } = findSettings(text, written);
  const last = written.extensions.at(-1)?.span ?? { start: 0, end: text.length };
  const reverseAsked = extensions.some((e) => e.kind === "choice" && e.meaning.endsWith("reverse"));
  const kept = reverseAsked ? settings : settings.filter((s) => s.choice !== "H-reverse");
  const chosen = choose(text, kept, extensions, last);
  const first = chosen[0]!;
  const meaning = extensions.flatMap((e) => (e.kind === "choice" && e.fits(first) ? [e.meaning] : []));
  return reading(
    text,
    "hermann-mauguin",
    [first.hermannMauguin.full, ...meaning].join(", "),
    chosen,
    extensions,
    remarks,
  );
}

function findSettings(text: string, written: WrittenSymbol): { settings: Setting[]; remarks: string[] } {
  const strict = partitions(written.units, false);
  const loose = partitions(written.units, true);
  const named = (ways: readonly SymbolPart[][], open: boolean) =>
    search(ways, (parts) => settingsNamed(written.lattice, parts, open));
  for (const [ways, open] of [
    [strict, false],
    [strict, true],
    [loose, false],
  ] as const) {
    const settings = named(ways, open);
    if (settings.length > 0) return { settings, remarks: [] };
  }
  const holding = search(strict, (parts) => settingsHolding(written.lattice, parts));
  if (holding.length > 0) {
    return {
      settings: holding,
      remarks: ["elements that the conventional symbol does not name, so the origin is open"],
    };
  }
  throw unknownSymbol(text, written, strict);
}

/** Settings found for any way to cut the symbol, those of the same symbol once. */
function search(ways: readonly SymbolPart[][], find: (parts: readonly SymbolPart[]) => Setting[]): Setting[] {
  const found = new Map<string, Setting>();
  for (const parts of ways) {
    for (const s of find(parts)) {
      const key = `${s.number} ${s.hermannMauguin.full}:${s.choice}`;
      if (!found.has(key)) found.set(key, s);
    }
  }
  return [...found.values()];
}

function unknownSymbol(text: string, written: WrittenSymbol, ways: readonly SymbolPart[][]): InputProblem {
  const shown = ways[0] ? formatSymbol({ lattice: written.lattice, parts: ways[0] }) : text.trim();
  const near = nearestNames(text.replace(/[:({].*$/s, ""));
  const end = written.extensions[0]?.span.start ?? text.length;
  return new InputProblem(
    "group-name-unknown",
    `"${text}", read as ${shown}, names no space group in a conventional setting`,
    { start: 0, end },
    `did you mean ${near.join(", ")}?`,
  );
}

function choose(
  text: string,
  settings: readonly Setting[],
  extensions: readonly NameExtension[],
  span: Span,
): Setting[] {
  let kept = [...settings];
  for (const e of extensions) {
    if (e.kind !== "choice") continue;
    const fitting = kept.filter(e.fits);
    // `P n m a Z` and `P -3 m 1 :H` name a choice where there is none to make
    if (fitting.length === 0 && e.needsChoice && kept.every((s) => s.choice === "")) continue;
    if (fitting.length === 0) {
      const names = [...new Set(kept.map((s) => s.name).filter(Boolean))];
      throw new InputProblem(
        "group-name-extension",
        `"${text}": this group has no setting with ${e.meaning}`,
        span,
        names.length > 0 ? `it has ${names.join(", ")}` : "leave the code out",
      );
    }
    kept = fitting;
  }
  return kept;
}

function reading(
  text: string,
  kind: GroupNameReading["kind"],
  understoodAs: string,
  settings: readonly Setting[],
  extensions: readonly NameExtension[],
  remarks: readonly string[] = [],
): GroupNameReading {
  const candidates = settings.map((setting): GroupNameCandidate => {
    let { toReference } = setting;
    for (const e of extensions) if (e.kind === "change") toReference = chain(reverse(e.change), toReference);
    return { number: setting.number, setting, transformation: toReference };
  });
  return { text, kind, understoodAs, candidates, ambiguity: [...remarks, ...ambiguities(settings)] };
}
