import { InputProblem, type Span } from "../problem.ts";
import { formatCellParameters, parseCellParameters, type WrittenCell } from "./cell-parameters-text.ts";
import type { SiteTable, TableSite } from "./site-table.ts";
import { formatSite, siteLine } from "./table-site-text.ts";

const KEYWORD = /^(name|group|cell)\b\s*[:=]?\s*/;

/** A line without its comment and the blanks about it. */
interface Line {
  readonly text: string;
  readonly start: number;
}

/**
 * Reads a structure as papers tabulate it, one statement a line, comments after `#`:
 *
 *     name  thenardite
 *     group F d d d :2
 *     cell  a=9.829 b=12.302 c=5.868
 *     Na 16f y=0.4414(2)
 *     S  8a
 *     O  32h 0.2137,0.0556,0.2855 U=0.012
 *
 * `group` takes a number, a Hermann-Mauguin or a Hall symbol, `cell` the parameters that symmetry leaves free or all
 * six. Every other line is a site: its label; the element, with a charge if wanted, where the label does not begin with
 * it; the Wyckoff position; the coordinates, or the values of the free ones, or both; `occ=`; `U=` or `B=`, or `U11=` to
 * `U23=`. Position or coordinates may be left out, not both.
 * @throws InputProblem `table-unreadable`, `cell-unreadable`, `group-missing`, `cell-missing`, `sites-missing`, with the
 * place
 * @example
 * ```ts
 * const { group, cell, sites } = parseSiteTable(`
 *   group R -3 c
 *   cell  a=5.070 c=16.82     # nitratine, Paul & Pryor 1971
 *   Na 6b
 *   N  6a
 *   O  18e x=0.2450(2)
 * `);
 * group.text; // "R -3 c"
 * cell.values; // { a: 5.07, c: 16.82 }
 * sites.map((s) => s.letter); // ["b", "a", "e"]
 * sites[2]!.parameters; // { x: { value: 0.245, su: 0.0002 } }
 * ```
 */
export function parseSiteTable(text: string): SiteTable {
  refuseCif(text);
  const read: { name: string; group: SiteTable["group"] | null; cell: WrittenCell | null } = {
    name: "",
    group: null,
    cell: null,
  };
  const sites: TableSite[] = [];
  for (const line of linesOf(text)) {
    const keyword = KEYWORD.exec(line.text);
    if (!keyword) {
      sites.push(readSite(line));
      continue;
    }
    const rest = { text: line.text.slice(keyword[0].length), start: line.start + keyword[0].length };
    if (keyword[1] === "name") read.name = rest.text;
    else if (keyword[1] === "group") read.group = { text: requireOnce(rest, read.group, "group"), span: spanOf(rest) };
    else {
      requireOnce(rest, read.cell, "cell");
      read.cell = readCell(rest);
    }
  }
  const { name, group, cell } = read;
  if (!group) throw missing("group", "group R -3 c", text);
  if (!cell) throw missing("cell", "cell a=4.99 c=17.06", text);
  if (sites.length === 0) throw missing("sites", "Ca 6b", text);
  return { name, group, cell, sites };
}

function refuseCif(text: string): void {
  const m = /^[ \t]*data_\S*/im.exec(text);
  if (!m) return;
  const hint = "give a table of group, cell and sites; positions writes what a CIF holds in other formats";
  const span = { start: m.index, end: m.index + m[0].length };
  throw new InputProblem("table-unreadable", "this is a CIF and no table of sites", span, hint);
}

function* linesOf(text: string): Generator<Line> {
  for (const m of text.matchAll(/[^\r\n]+/g)) {
    const content = m[0].replace(/#.*$/, "");
    const trimmed = content.trim();
    if (trimmed !== "") yield { text: trimmed, start: m.index + content.indexOf(trimmed) };
  }
}

const spanOf = (line: Line): Span => ({ start: line.start, end: line.start + Math.max(1, line.text.length) });

function requireOnce(line: Line, before: unknown, what: string): string {
  if (line.text !== "" && before === null) return line.text;
  const why = before === null ? `the ${what} is left empty` : `a second ${what}`;
  throw new InputProblem("table-unreadable", why, spanOf(line), `give the ${what} once`);
}

function readSite(line: Line): TableSite {
  const result = placedIn(line, () => siteLine().parse(line.text));
  if (!result.status) throw unreadable(line, result.index.offset, result.expected);
  const { spans, ...site } = result.value;
  const moved = Object.entries(spans).map(([part, span]) => [part, movedBy(line.start, span)]);
  return { ...site, spans: Object.fromEntries(moved) as TableSite["spans"] };
}

function readCell(line: Line): WrittenCell {
  const { values, spans, inOrder } = placedIn(line, () => parseCellParameters(line.text));
  if (inOrder) {
    const moved = inOrder.map(({ value, span }) => ({ value, span: movedBy(line.start, span) }));
    return { values, spans, inOrder: moved };
  }
  const moved = Object.entries(spans).map(([p, span]) => [p, movedBy(line.start, span)]);
  return { values, spans: Object.fromEntries(moved) };
}

function movedBy(by: number, { start, end }: Span): Span {
  return { start: start + by, end: end + by };
}

function unreadable({ text, start }: Line, at: number, expected: readonly string[]): InputProblem {
  const number = /^[+-]?[\d.]/.test(text.slice(at));
  const wanted = expected.filter((e) => e.includes(" ")).join(", or ");
  const found = at >= text.length ? "the line ends too early" : `"${text.slice(at).split(/\s/)[0]}" does not fit`;
  return new InputProblem(
    "table-unreadable",
    `${found}${wanted ? `; expected ${wanted}` : ""}`,
    { start: start + at, end: start + Math.min(at + 1, text.length) + (at >= text.length ? 1 : 0) },
    number
      ? "a site has three coordinates; further numbers are named, such as occ=0.5, U=0.012 or B=0.9"
      : 'write a site like "O1 18e x=0.2568" or "O1 0.2568,0,1/4 occ=0.5"; put # before what is no part of the table',
  );
}

/** Faults found in a piece of text are placed in the whole. */
function placedIn<T>({ start }: Line, read: () => T): T {
  try {
    return read();
  } catch (e) {
    if (!(e instanceof InputProblem) || !e.span) throw e;
    throw new InputProblem(e.code, e.message, movedBy(start, e.span), e.hint);
  }
}

function missing(what: string, example: string, text: string): InputProblem {
  const verb = what === "sites" ? "are" : "is";
  return new InputProblem(
    `${what}-missing`,
    `no ${what} ${verb} given`,
    { start: text.length, end: text.length },
    `add a line such as "${example}"`,
  );
}

/**
 * Inverse of `parseSiteTable`.
 * @example
 * ```ts
 * const table = parseSiteTable("group 136; cell a=4.59".replace("; ", "\n") + "\nO O2- 4(f) (x, x, 0) x=.305 occ=1/2");
 * formatSiteTable(table).split("\n")[2]; // "O O2- 4f x,x,0 x=0.305 occ=0.5"
 * ```
 */
export function formatSiteTable({ name, group, cell, sites }: SiteTable): string {
  const lines = [
    ...(name === "" ? [] : [`name ${name}`]),
    `group ${group.text}`,
    `cell ${cell.inOrder?.map((e) => e.value).join(" ") ?? formatCellParameters(cell.values)}`,
    ...sites.map(formatSite),
  ];
  return `${lines.join("\n")}\n`;
}
