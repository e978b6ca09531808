import P from "parsimmon";
import { parseNumb } from "../cif/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import type { Cell } from "./cell.ts";

export type CellParameter = keyof Cell;
export const CELL_PARAMETERS: readonly CellParameter[] = ["a", "b", "c", "alpha", "beta", "gamma"];

/** Some of the parameters of a cell; angstrom and degrees. */
export type CellParameters = Readonly<Partial<Record<CellParameter, number>>>;

/** Parameters as they were read, with their places in the text. */
export interface WrittenCell {
  readonly values: CellParameters;
  readonly spans: Readonly<Partial<Record<CellParameter, Span>>>;
  /** Fewer than six numbers without names: `cellInOrder` names them once the group is known. */
  readonly inOrder?: readonly PlainNumber[];
}

/** A number without a name, with its place in the text. */
export interface PlainNumber {
  readonly value: number;
  readonly span: Span;
}

interface Entry {
  readonly name: CellParameter;
  readonly value: number;
  readonly span: Span;
}

const NAMES: Readonly<Record<string, CellParameter>> = {
  a: "a",
  b: "b",
  c: "c",
  alpha: "alpha",
  beta: "beta",
  gamma: "gamma",
  al: "alpha",
  be: "beta",
  ga: "gamma",
  "\u03b1": "alpha",
  "\u03b2": "beta",
  "\u03b3": "gamma",
};

let built: P.Parser<Entry[] | PlainNumber[]> | null = null;

function grammar(): P.Parser<Entry[] | PlainNumber[]> {
  if (built) return built;
  const blank = P.regexp(/\s*/);
  const separator = P.regexp(/\s*[,;]\s*|\s*/);
  const unit = P.regexp(/\s*(?:\u00c5|\u00b0)?/);
  const number = P.regexp(/\d+\.?\d*(?:\(\d+\))?|\.\d+(?:\(\d+\))?/)
    .skip(unit)
    .map((text) => parseNumb(text.replace(/\.(?=\(|$)/, ""))!.value)
    .desc("a number");
  const name = P.regexp(/alpha|beta|gamma|al|be|ga|[abc\u03b1\u03b2\u03b3]/i)
    .map((text) => NAMES[text.toLowerCase()]!)
    .desc("a, b, c, alpha, beta or gamma");
  const entry = P.seqMap(
    P.index,
    name,
    P.regexp(/\s*=?\s*/).desc("an equals sign"),
    number,
    P.index,
    (from, parameter, _, value, to) => ({
      name: parameter,
      value,
      span: { start: from.offset, end: to.offset },
    }),
  );
  const plain = P.seqMap(P.index, number, P.index, (from, value, to) => ({
    value,
    span: { start: from.offset, end: to.offset },
  }))
    .skip(separator)
    .times(1, 6)
    .map((list) => (list.length < 6 ? list : list.map((e, i) => ({ ...e, name: CELL_PARAMETERS[i]! }))));
  const entries: P.Parser<Entry[] | PlainNumber[]> = entry.skip(separator).atLeast(1);
  built = blank.then(entries.or(plain)).skip(P.eof);
  return built;
}

/**
 * Reads the parameters of a cell: `a=4.99 c=17.06` with those that symmetry leaves free, or all six numbers in the order
 * a b c alpha beta gamma; fewer numbers wait for the group (`cellInOrder`). S.u. are read over.
 * @throws InputProblem `cell-unreadable` with the span of the first character that does not fit, or of a name given twice
 */
export function parseCellParameters(text: string): WrittenCell {
  const result = grammar().parse(text);
  if (!result.status) throw unreadable(text, result.index.offset);
  const read: readonly (Entry | PlainNumber)[] = result.value;
  const entries = read.filter((e): e is Entry => "name" in e);
  if (entries.length === 0) return { values: {}, spans: {}, inOrder: read };
  const twice = entries.find((e, i) => entries.findIndex((f) => f.name === e.name) < i);
  if (twice) {
    throw new InputProblem("cell-unreadable", `${twice.name} is given twice`, twice.span, "give each parameter once");
  }
  return {
    values: Object.fromEntries(entries.map((e) => [e.name, e.value])),
    spans: Object.fromEntries(entries.map((e) => [e.name, e.span])),
  };
}

function unreadable(text: string, at: number): InputProblem {
  const why = at >= text.length ? "it ends too early" : `character ${at + 1}, "${text[at]}", does not fit`;
  return new InputProblem(
    "cell-unreadable",
    `"${text}" is no cell: ${why}`,
    { start: at, end: Math.min(at + 1, text.length) },
    "give the parameters that symmetry leaves free, such as a=4.99 c=17.06, or six numbers a b c alpha beta gamma",
  );
}

/** Inverse of `parseCellParameters`. */
export function formatCellParameters(values: CellParameters): string {
  return CELL_PARAMETERS.flatMap((name) => (values[name] === undefined ? [] : [`${name}=${values[name]}`])).join(" ");
}
