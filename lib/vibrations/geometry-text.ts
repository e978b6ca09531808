import P from "parsimmon";
import { InputProblem } from "../problem.ts";

/**
 * A direction as it is written: a Cartesian axis of the crystal's frame, a lattice direction [uvw], or the normal of
 * the planes (hkl) of the file's cell.
 */
export type WrittenDirection =
  | { readonly kind: "axis"; readonly axis: "x" | "y" | "z"; readonly negative: boolean }
  | {
      readonly kind: "direction" | "normal";
      readonly indices: readonly [number, number, number];
      readonly negative: boolean;
    };

/**
 * A scattering geometry in Porto's notation, ki(ei es)ks: direction of the incident light, its polarisation, that of
 * the scattered light, its direction.
 * Source: T. C. Damen, S. P. S. Porto and B. Tell, Phys. Rev. 142 (1966) 570.
 */
export interface WrittenGeometry {
  readonly incident: WrittenDirection;
  readonly incidentPolarisation: WrittenDirection;
  readonly scatteredPolarisation: WrittenDirection;
  readonly scattered: WrittenDirection;
}

function blank(): P.Parser<string> {
  return P.regexp(/\s*/);
}

/** A parser and the blanks after it. */
function token<T>(p: P.Parser<T>): P.Parser<T> {
  return p.skip(blank());
}

function axisGrammar(): P.Parser<WrittenDirection> {
  const bar = P.regexp(/[\u0304\u0305\u00af]?/);

  return token(P.seq(P.regexp(/[xyz]/i), bar)).map(
    ([letter, over]): WrittenDirection => ({
      kind: "axis",
      axis: letter.toLowerCase() as "x" | "y" | "z",
      negative: over !== "",
    }),
  );
}

/** Three indices run together, `1-10`, or apart, `1 -1 0` and `1,-1,0`. */
function indexGrammar(): P.Parser<[number, number, number]> {
  const index = token(P.regexp(/[-\u2212]?\d+/)).map((t) => Number(t.replace("\u2212", "-")));
  const apart = token(P.regexp(/[,\s]/)).atMost(1);
  const spaced = P.seqMap(index, apart, index, apart, index, (u, _, v, __, w): [number, number, number] => [u, v, w]);
  const digit = P.regexp(/[-\u2212]?\d/).map((t) => Number(t.replace("\u2212", "-")));
  const compact = token(P.seq(digit, digit, digit));
  return P.alt(compact.skip(P.lookahead(/[\])]/)), spaced);
}

function written(kind: "direction" | "normal") {
  return (triple: readonly [number, number, number]): WrittenDirection => ({ kind, indices: triple, negative: false });
}

function directionGrammar(): P.Parser<WrittenDirection> {
  const indices = indexGrammar();
  const direction = indices.wrap(token(P.string("[")), token(P.string("]"))).map(written("direction"));
  const normal = indices.wrap(token(P.string("(")), token(P.string(")"))).map(written("normal"));
  const minus = token(P.regexp(/[-\u2212]/)).atMost(1);
  return P.seqMap(minus, P.alt(axisGrammar(), direction, normal), (m, d) =>
    m.length > 0 ? { ...d, negative: !d.negative } : d,
  );
}

function geometryGrammar(): P.Parser<WrittenGeometry> {
  const anyDirection = directionGrammar();
  return P.seqMap(
    anyDirection,
    token(P.string("(")),
    anyDirection,
    token(P.string(",")).atMost(1).then(anyDirection),
    token(P.string(")")),
    anyDirection,
    (incident, _, incidentPolarisation, scatteredPolarisation, __, scattered): WrittenGeometry => ({
      incident,
      incidentPolarisation,
      scatteredPolarisation,
      scattered,
    }),
  );
}

interface Grammar {
  readonly geometry: P.Parser<WrittenGeometry>;
  readonly direction: P.Parser<WrittenDirection>;
}

let built: Grammar | null = null; // when the first text is read

function grammar(): Grammar {
  const whole = <T>(p: P.Parser<T>) => blank().then(p).skip(P.eof);
  built ??= { geometry: whole(geometryGrammar()), direction: whole(directionGrammar()) };
  return built;
}

/**
 * Reads a geometry: `z(xy)-z`, `x(zz)y`, `[110]([1-10]z)-[110]`, `(104)(x[010])-(104)`.
 * @throws InputProblem `geometry-unreadable` with the span of the first character that does not fit
 */
export function parseGeometry(text: string): WrittenGeometry {
  return read(grammar().geometry, text, "a scattering geometry", "write it like z(xy)-z or [110](zz)-[110]");
}

/** Reads one direction: `x`, `-z`, `[110]`, `(104)`. @throws InputProblem `geometry-unreadable` */
export function parseDirection(text: string): WrittenDirection {
  return read(grammar().direction, text, "a direction", "write x, -z, [110] for a row or (104) for a face normal");
}

function read<T>(parser: P.Parser<T>, text: string, what: string, hint: string): T {
  const result = parser.parse(text);
  if (result.status) return result.value;
  const at = result.index.offset;
  const why = at >= text.length ? "it ends too early" : `character ${at + 1}, "${text[at]}", does not fit`;
  const span = { start: at, end: Math.min(at + 1, text.length) };
  throw new InputProblem("geometry-unreadable", `"${text}" is not ${what}: ${why}`, span, hint);
}

/** Inverse of parseDirection. */
export function formatDirection(d: WrittenDirection): string {
  const sign = d.negative ? "-" : "";
  if (d.kind === "axis") return sign + d.axis;
  const apart = d.indices.some((i) => Math.abs(i) > 9) ? " " : "";
  const inner = d.indices.join(apart);
  return sign + (d.kind === "direction" ? `[${inner}]` : `(${inner})`);
}

/** Inverse of parseGeometry. */
export function formatGeometry(g: WrittenGeometry): string {
  const [ki, ei, es, ks] = [g.incident, g.incidentPolarisation, g.scatteredPolarisation, g.scattered].map(
    formatDirection,
  );
  return `${ki}(${ei}${es})${ks}`;
}
