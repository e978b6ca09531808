import type { Criterion, Finding, VetAnswer } from "../audit/index.ts";
import { formatNumber } from "./format-number.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const INDENT = "    ";

/** Findings one below the other: what, where, the two statements, what to do. */
export function vetText({ findings, counts }: VetAnswer): string {
  return [countsText(counts), ...findings.map(findingText)].join("\n\n");
}

/** `1 contradiction, 2 doubts, no remarks` */
export function countsText({ contradiction, doubt, remark }: VetAnswer["counts"]): string {
  const part = (n: number, noun: string) => `${n === 0 ? "no" : n} ${noun}${n === 1 ? "" : "s"}`;
  return [part(contradiction, "contradiction"), part(doubt, "doubt"), part(remark, "remark")].join(", ");
}

function findingText({ id, severity, message, where, evidence, advice }: Finding): string {
  const place = where.line === undefined ? where.dataName : `line ${where.line}, ${where.dataName}`;
  const { stated, against, difference, tolerance, unit = "", also = [] } = evidence;
  const lines = [
    wrapText(`${severity.toUpperCase()} ${id}: ${message}`, WIDTH, INDENT),
    point("at", place),
    point("says", `${stated.what}: ${shown(stated.value)}`),
    point("but", `${against.what}: ${shown(against.value)}`),
  ];
  if (difference !== undefined) {
    const allowed = tolerance === undefined ? "" : `, allowed ${significant(tolerance, 3)}`;
    lines.push(point("differ", `${significant(difference, 4)}${allowed}${unit ? ` (${unit})` : ""}`));
  }
  if (also.length > 0) lines.push(point("also", list(also)));
  return [...lines, point("do", advice)].join("\n");
}

function point(word: string, text: string): string {
  const before = `${INDENT}${word.padEnd(7)}`;
  return before + wrapText(text, WIDTH - before.length, " ".repeat(before.length));
}

const MOST_LISTED = 12;

function list(names: readonly string[]): string {
  const rest = names.length - MOST_LISTED;
  return `${names.slice(0, MOST_LISTED).join("; ")}${rest > 0 ? `; and ${rest} more` : ""}`;
}

function shown(value: string | number): string {
  return typeof value === "string" ? value : significant(value, 6);
}

/** So many significant digits, without an exponent for the sizes met here; whole numbers are kept whole. */
function significant(x: number, digits: number): string {
  if (x === 0) return "0";
  const decimals = Math.max(0, Math.min(12, digits - 1 - Math.floor(Math.log10(Math.abs(x)))));
  const text = formatNumber(x, decimals);
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

/** One block of many in a table. */
export interface VettedBlock {
  readonly file: string;
  readonly block: string;
  /** Null where the file could not be read; `problem` says why. */
  readonly answer: VetAnswer | null;
  readonly problem: string | null;
}

/** A line for each block, the most serious ids beside it, then the sum over all. */
export function vetTable(blocks: readonly VettedBlock[]): string {
  const right = { align: "right" } as const;
  const columns: Column[] = [
    { heading: "file" },
    { heading: "block" },
    { heading: "contradictions", ...right },
    { heading: "doubts", ...right },
    { heading: "remarks", ...right },
    { heading: "contradictions and doubts, by id" },
  ];
  const rows = blocks.map(({ file, block, answer, problem }) => {
    if (!answer) return [file, block, "", "", "", `not read: ${problem ?? ""}`];
    const { contradiction, doubt, remark } = answer.counts;
    const ids = answer.findings.flatMap((f) => (f.severity === "remark" ? [] : [f.id]));
    return [file, block, String(contradiction), String(doubt), String(remark), [...new Set(ids)].join(", ")];
  });
  return `${textTable(columns, rows)}\n\n${sumText(blocks)}`;
}

function sumText(blocks: readonly VettedBlock[]): string {
  const read = blocks.filter((b) => b.answer !== null).length;
  const total = (severity: keyof VetAnswer["counts"]) =>
    blocks.reduce((s, b) => s + (b.answer?.counts[severity] ?? 0), 0);
  const counts = { contradiction: total("contradiction"), doubt: total("doubt"), remark: total("remark") };
  const unread = blocks.length - read;
  return `${read} block${read === 1 ? "" : "s"}${unread > 0 ? `, ${unread} not read` : ""}: ${countsText(counts)}`;
}

/** A criterion as `vet --explain` prints it. */
export function criterionText({ id, severity, criterion, source, advice }: Criterion): string {
  const part = (name: string, text: string) => wrapText(`${name.padEnd(10)}${text}`, WIDTH, " ".repeat(10));
  return [`${id} (${severity})`, part("reported", criterion), part("source", source), part("advice", advice)].join(
    "\n",
  );
}

/** All ids with their severity, by severity. */
export function criteriaText(criteria: readonly Criterion[]): string {
  return textTable(
    [{ heading: "id" }, { heading: "severity" }],
    criteria.map((c) => [c.id, c.severity]),
  );
}
