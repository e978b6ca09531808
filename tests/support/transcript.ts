import { type Outcome, runCommand, wordsOf } from "./run-command.ts";

/**
 * What a terminal shows of a command line: the line, the output, lines of standard error after `! `, and the status unless
 * it is 0. JSON is laid out for reading, with the last digits of its numbers, which rest on the machine, rounded away.
 */
export async function transcript(line: string): Promise<string> {
  const [, name = "", ...words] = wordsOf(line);
  return shown(line, await runCommand(name, words));
}

export function shown(line: string, { status, out, err }: Outcome): string {
  const answer = out.startsWith("{\n") ? readableJson({ ...JSON.parse(out), sitefold: "VERSION" }) : out;
  const told = err.replace(/^(?=.)/gm, "! ");
  return `$ ${line}\n${told}${answer.trimEnd()}${status === 0 ? "" : `\n[status ${status}]`}\n`.replace(
    /\n{2,}\[/,
    "\n[",
  );
}

const WIDTH = 120;
const DIGITS = 10;

/** One line for everything that fits on it. */
function readableJson(value: unknown, indent = ""): string {
  const flat = onOneLine(value);
  if (indent.length + flat.length <= WIDTH || typeof value !== "object" || value === null) return flat;
  const inner = `${indent}  `;
  const [open, close] = Array.isArray(value) ? "[]" : "{}";
  const parts = partsOf(value).map(([key, part]) => `${inner}${key}${readableJson(part, inner)}`);
  return `${open}\n${parts.join(",\n")}\n${indent}${close}`;
}

function onOneLine(value: unknown): string {
  if (typeof value === "number") return JSON.stringify(Number(value.toPrecision(DIGITS)));
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const parts = partsOf(value).map(([key, part]) => `${key}${onOneLine(part)}`);
  return Array.isArray(value) ? `[${parts.join(", ")}]` : `{${parts.join(", ")}}`;
}

/** Values with what stands before them. */
function partsOf(value: object): (readonly [string, unknown])[] {
  if (Array.isArray(value)) return value.map((part) => ["", part]);
  return Object.entries(value).map(([key, part]) => [`${JSON.stringify(key)}: `, part]);
}
