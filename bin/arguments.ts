import parser from "yargs-parser";
import { UsageProblem } from "./problems.ts";

/** One option of a command. */
export interface OptionSpec {
  readonly type: "boolean" | "string" | "number";
  readonly describe: string;
  readonly alias?: string;
  /** What stands for the value in the help: `--tolerance ANGSTROM`. */
  readonly value?: string;
  /** May be given several times. */
  readonly many?: boolean;
}

/** What a command is called, takes and answers; the help is made from it. */
export interface CommandSpec {
  readonly name: string;
  readonly operands: string;
  readonly summary: string;
  readonly options: Readonly<Record<string, OptionSpec>>;
  readonly example: CommandExample;
}

/** A command line and what it prints, from a real run; whole lines left out are marked by a line `...`. */
export interface CommandExample {
  readonly line: string;
  readonly output: string;
}

/** Options that every command takes. */
export const COMMON_OPTIONS = {
  block: { type: "string", value: "NAME", describe: "data block to use, by name or by number from 1" },
  tolerance: {
    type: "number",
    value: "ANGSTROM",
    describe: "positions closer than this are one position (default 0.05)",
  },
  strict: { type: "boolean", describe: "refuse a file with any syntax error instead of reading around it" },
  json: { type: "boolean", describe: "print one JSON document" },
  output: { type: "string", value: "FILE", alias: "o", describe: "write to FILE instead of the terminal" },
} as const satisfies Record<string, OptionSpec>;

/** For commands that write species. */
export const SPECIES_OPTIONS = {
  f: { type: "boolean", describe: "write F for triply degenerate species instead of T (JSON keeps T)" },
} as const satisfies Record<string, OptionSpec>;

/** For commands that tell what modes are made of. */
export const POLYHEDRON_OPTION = {
  polyhedron: {
    type: "string",
    many: true,
    value: "CENTRE",
    describe: 'stretches and bends of the first shell about an element or label, "Ti", "K<3.2"; may be repeated',
  },
} as const satisfies Record<string, OptionSpec>;

export interface Arguments {
  readonly operands: readonly string[];
  readonly text: (name: string) => string | null;
  readonly texts: (name: string) => readonly string[];
  readonly flag: (name: string) => boolean;
  readonly number: (name: string) => number | null;
}

/**
 * Parses the words after the command's name.
 * @throws UsageProblem for options that are unknown, lack a value, or have one that is no number
 */
export function parseArguments(words: readonly string[], spec: CommandSpec): Arguments {
  const parsed: Parsed = words.some((word) => word.startsWith("-")) ? withOptions(words, spec) : { _: [...words] };
  const texts = (name: string): string[] => {
    const value: unknown = parsed[name];
    const list = value === undefined ? [] : Array.isArray(value) ? value : [value];
    if (list.some((v) => typeof v !== "string" || v === "")) throw new UsageProblem(`--${name} needs a value`);
    return list as string[];
  };
  const text = (name: string): string | null => {
    const list = texts(name);
    if (list.length > 1) throw new UsageProblem(`--${name} is given ${list.length} times; give it once`);
    return list[0] ?? null;
  };
  const number = (name: string): number | null => {
    const written = text(name);
    if (written === null) return null;
    const value = Number(written);
    if (!Number.isFinite(value)) throw new UsageProblem(`--${name} takes a number, not "${written}"`);
    return value;
  };
  return { operands: parsed._.map(String), text, texts, flag: (name) => parsed[name] === true, number };
}

interface Parsed {
  readonly _: readonly (string | number)[];
  readonly [option: string]: unknown;
}

function withOptions(words: readonly string[], spec: CommandSpec): Parsed {
  const names = Object.keys(spec.options);
  const ofType = (types: readonly string[]) => names.filter((n) => types.includes(spec.options[n]!.type));
  const alias = Object.fromEntries(
    names.flatMap((n) => (spec.options[n]!.alias ? [[n, spec.options[n]!.alias!]] : [])),
  );
  const parsed = parser(withValues(words, spec), {
    boolean: ofType(["boolean"]),
    string: [...ofType(["string", "number"]), "_"],
    alias,
    configuration: {
      "camel-case-expansion": false,
      "dot-notation": false,
      "parse-positional-numbers": false,
      "short-option-groups": false,
      "boolean-negation": false,
    },
  });
  const known = new Set(["_", ...names, ...Object.values(alias)]);
  for (const key of Object.keys(parsed)) if (!known.has(key)) throw unknownOption(key, names, spec);
  return parsed;
}

/** Values may begin with a minus, `--at -0.1,0,0`, or be one, `--to -`, which the parser would take for options. */
function withValues(words: readonly string[], spec: CommandSpec): string[] {
  const joined: string[] = [];
  for (let i = 0; i < words.length; i++) {
    const [word, next] = [words[i]!, words[i + 1]];
    const takesValue = word.startsWith("--") && (spec.options[word.slice(2)]?.type ?? "boolean") !== "boolean";
    if (takesValue && next !== undefined && /^-([^-]|$)/.test(next) && !isOption(next, spec)) {
      joined.push(`${word}=${next}`);
      i++;
    } else joined.push(word);
  }
  return joined;
}

function isOption(word: string, { options }: CommandSpec): boolean {
  const name = word.slice(1);
  return name in options || Object.values(options).some((o) => o.alias === name);
}

function unknownOption(key: string, names: readonly string[], spec: CommandSpec): UsageProblem {
  const near = names.find((n) => n.startsWith(key.slice(0, 3)) || key.startsWith(n));
  const dashes = key.length === 1 ? "-" : "--";
  return new UsageProblem(`${spec.name} has no option ${dashes}${key}${near ? `; did you mean --${near}?` : ""}`);
}

/** The single operand of a command. @throws UsageProblem */
export function onlyOperand(args: Arguments, what: string): string {
  const [first, ...others] = args.operands;
  if (first === undefined) throw new UsageProblem(`${what} is missing`);
  if (others.length > 0) throw new UsageProblem(`${what} is wanted, and only one: ${args.operands.join(" ")}`);
  return first;
}
