import P from "parsimmon";
import type { Span } from "../problem.ts";

export type HallLattice = "P" | "A" | "B" | "C" | "I" | "R" | "S" | "T" | "F" | "H";

/** One rotation part as written, its axis empty where it is left out. */
export interface WrittenRotation {
  readonly improper: boolean;
  readonly order: number;
  readonly axis: string;
  readonly tail: string;
}

export interface Placed<T> {
  readonly value: T;
  readonly span: Span;
}

/** A Hall symbol by its parts; the change of basis is the text in its brackets, which it includes. */
export interface WrittenSymbol {
  readonly lattice: Placed<{ readonly centrosymmetric: boolean; readonly letter: HallLattice }>;
  readonly rotations: readonly Placed<WrittenRotation>[];
  readonly change: Placed<string> | null;
}

/** The parts, or where reading ended and what could have stood there. */
export type Reading =
  | { readonly ok: true; readonly symbol: WrittenSymbol }
  | { readonly ok: false; readonly at: number; readonly expected: readonly string[] };

const AXIS_SPELLINGS = new Map([
  ["''", '"'],
  ["\u2032", "'"],
  ["\u2033", '"'],
]);

/** The grammar of a Hall symbol as people write it: what stands where, without the meaning of defaults. */
function symbolGrammar() {
  const gap = P.regexp(/[\s_]*/);
  const separator = P.regexp(/[\s_]+/);
  const minus = P.regexp(/[-\u2212]?/).map((s) => s !== "");

  const lattice = P.seqMap(minus.skip(gap), P.regexp(/[PABCIRSTFH]/i), (centrosymmetric, letter) => ({
    centrosymmetric,
    letter: letter.toUpperCase() as HallLattice,
  }))
    .mark()
    .desc("a lattice letter P, A, B, C, I, F, R, S, T or H, with a minus sign for an inversion centre");

  const axis = P.regexp(/''|[xyz'"*\u2032\u2033]|/i).map((s) => AXIS_SPELLINGS.get(s) ?? s.toLowerCase());
  const rotation = P.seqMap(
    minus,
    P.regexp(/[12346]/).desc("a rotation 1, 2, 3, 4 or 6"),
    axis,
    P.regexp(/[1-5]?[abcnuvwd]*[1-5]?[abcnuvwd]*/i).map((s) => s.toLowerCase()),
    (improper, order, ax, tail): WrittenRotation => ({ improper, order: Number(order), axis: ax, tail }),
  ).mark();

  const bracket = P.regexp(/\([^()]*\)/).desc("an origin shift (0 0 1) or a change of basis (x-y,x+y,z)");
  return P.seqMap(
    gap.then(lattice),
    gap.then(rotation),
    P.seqMap(separator, rotation, (_, r) => r).many(),
    gap.then(bracket.mark().times(0, 1)),
    gap,
    (l, first, rest, change) => ({ lattice: l, rotations: [first, ...rest], change: change[0] ?? null }),
  ).skip(P.eof.desc("a blank before the next rotation, or the end"));
}

let grammar: ReturnType<typeof symbolGrammar> | undefined; // built when the first symbol is read

export function readHallSymbol(text: string): Reading {
  grammar ??= symbolGrammar();
  const result = grammar.parse(text);
  if (!result.status) return { ok: false, at: result.index.offset, expected: result.expected };
  const { lattice, rotations, change } = result.value;
  const symbol = { lattice: placed(lattice), rotations: rotations.map(placed), change: change && placed(change) };
  return { ok: true, symbol };
}

function placed<T>(m: P.Mark<T>): Placed<T> {
  return { value: m.value, span: { start: m.start.offset, end: m.end.offset } };
}
