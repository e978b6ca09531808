import P from "parsimmon";
import { parseNumb } from "../cif/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import { type DisplacementTensor, EIGHT_PI_SQUARED } from "./displacement.ts";
import { type MeasuredNumber, PARAMETERS, type TableCoordinate, type TableSite } from "./site-table.ts";
import { type CoordinateTerm, coordinateOf, formatCoordinate, formatMeasured } from "./table-coordinate.ts";

const TENSOR = ["U11", "U22", "U33", "U12", "U13", "U23"] as const;

/** What a line says besides label, position and coordinates. */
interface Field {
  readonly key: string;
  readonly number: MeasuredNumber;
  readonly span: Span;
}

interface Spanned<T> {
  readonly value: T;
  readonly span: Span;
}

interface Position {
  readonly multiplicity: number | null;
  readonly letter: string;
}

let built: P.Parser<TableSite> | null = null;

/** One line of a table: label, and as far as given element, position, coordinates, and named values. */
export function siteLine(): P.Parser<TableSite> {
  built ??= P.seqMap(
    P.index,
    token(P.regexp(/[A-Za-z][^\s,;=]*/)).desc("a label"),
    optional(spanned(token(P.regexp(/[A-Z][a-z]?(?:\d*[+\-\u2212]|[+\-\u2212]\d+)?(?=\s|$)/)))),
    optional(spanned(position()).desc("a position such as 18e")),
    optional(spanned(coordinates()).desc("three coordinates")),
    field().desc("occ=, U=, B=, U11=, x=, y= or z=").many(),
    P.index,
    (from, label, species, at, coordinates, fields, to) => {
      const line = { start: from.offset, end: to.offset };
      return {
        label,
        species: species?.value.replace("\u2212", "-") ?? null,
        multiplicity: at?.value.multiplicity ?? null,
        letter: at?.value.letter ?? null,
        coordinates: coordinates?.value ?? null,
        ...valuesOf(fields),
        spans: {
          line,
          species: species?.span ?? line,
          position: at?.span ?? line,
          coordinates: coordinates?.span ?? parameterSpan(fields) ?? line,
          occupancy: fields.find((f) => f.key === "occ")?.span ?? line,
        },
      };
    },
  );
  return built;
}

function token<T>(p: P.Parser<T>): P.Parser<T> {
  return p.skip(P.regexp(/\s*/));
}

function spanned<T>(p: P.Parser<T>): P.Parser<Spanned<T>> {
  return P.seqMap(P.index, p, P.index, (from, value, to) => ({ value, span: { start: from.offset, end: to.offset } }));
}

function optional<T>(p: P.Parser<T>): P.Parser<T | null> {
  return p.or(P.succeed(null));
}

/** `18e`, `18(e)`, `e`, `8alpha`. The letters x, y, z without a number are coordinates. */
function position(): P.Parser<Position> {
  const end = "(?=[\\s;]|$)";
  const numbered = new RegExp(`(\\d+)\\s*\\(?(alpha|\u03b1|[a-zA])\\)?${end}`);
  const bare = new RegExp(`()(alpha|\u03b1|[a-w])${end}`);
  return token(P.alt(P.regexp(numbered), P.regexp(bare))).map((text) => {
    const m = /^(\d*)\s*\(?(alpha|\u03b1|[a-zA])/.exec(text)!;
    const letter = m[2]!.length > 1 || m[2] === "\u03b1" ? "A" : m[2]!;
    return { multiplicity: m[1] === "" ? null : Number(m[1]), letter };
  });
}

const NUMBER = "(?:\\d+/[1-9]\\d*|(?:\\d+\\.?\\d*|\\.\\d+)(?:\\(\\d+\\))?(?:[eE][+-]?\\d+)?)";

function measured(text: string): MeasuredNumber {
  const fraction = /^(\d+)\/(\d+)$/.exec(text);
  if (fraction) return { value: Number(fraction[1]) / Number(fraction[2]), su: null };
  const { value, su } = parseNumb(text.replace(/\.(?=\(|e|$)/i, ""))!;
  return { value, su };
}

/** Sums of terms such as `x`, `-2x`, `x/2`, `1/4`, `0.2568(3)`; commas or blanks between the three, brackets or not. */
function coordinates(): P.Parser<readonly [TableCoordinate, TableCoordinate, TableCoordinate]> {
  const term = (sign: string) =>
    P.regexp(new RegExp(`([+\\-\u2212]${sign})(?:(${NUMBER})?([xyz])(?:/([1-9]\\d*))?|(${NUMBER}))(?!\\s*=)`)).map(
      (text): CoordinateTerm => {
        const m = new RegExp(`^([+\\-\u2212]?)(?:(${NUMBER})?([xyz])(?:/(\\d+))?|(${NUMBER}))$`).exec(text)!;
        const sizes = measured(m[2] ?? m[5] ?? "1");
        const sign = m[1] === "" || m[1] === "+" ? 1 : -1;
        const letter = m[3] === undefined ? null : "xyz".indexOf(m[3]);
        return { letter, value: (sign * sizes.value) / Number(m[4] ?? 1), su: sizes.su };
      },
    );
  const one = P.seqMap(term("?"), term("").many(), (first, rest) => coordinateOf([first, ...rest])).desc(
    "a coordinate",
  );
  const comma = P.alt(P.regexp(/\s*[,;]\s*/), P.regexp(/\s+/)).desc("a comma");
  const three = P.seqMap(one, comma, one, comma, one, (x, _, y, __, z) => [x, y, z] as const);
  const wrapped = P.regexp(/\(\s*/).then(three).skip(P.regexp(/\s*\)/));
  return token(P.alt(wrapped, three)).skip(P.regexp(/(?:[,;]\s*)?/));
}

/** `occ=0.5`, `U=0.012(1)`, `x = 1/4`. */
function field(): P.Parser<Field> {
  const key = token(P.regexp(/occ(?:upancy)?|U(?:iso|11|22|33|12|13|23)?|B(?:iso)?|[xyz]/));
  const number = P.regexp(new RegExp(`[+\\-\u2212]?${NUMBER}`)).map((text) => {
    const { value, su } = measured(text.replace(/^[+\-\u2212]/, ""));
    return { value: /^[-\u2212]/.test(text) ? -value + 0 : value, su };
  });
  const entry = P.seqMap(
    P.index,
    key,
    token(P.string("=")).desc("an equals sign"),
    number.desc("a number"),
    P.index,
    (from, name, _, value, to) => ({
      key: name.replace(/^occ.*/, "occ").replace("iso", ""),
      number: value,
      span: { start: from.offset, end: to.offset },
    }),
  );
  return entry.skip(P.regexp(/\s*(?:[,;]\s*)?/));
}

function parameterSpan(fields: readonly Field[]): Span | null {
  return fields.find((f) => PARAMETERS.some((p) => p === f.key))?.span ?? null;
}

/** @throws InputProblem `table-unreadable` for a name given twice, two kinds of displacement, or part of a tensor */
function valuesOf(fields: readonly Field[]): Pick<TableSite, "parameters" | "occupancy" | "displacement"> {
  requireClear(fields);
  const of = (key: string) => fields.find((f) => f.key === key)?.number ?? null;
  const named = PARAMETERS.flatMap((p) => {
    const number = of(p);
    return number ? [[p, number]] : [];
  });
  return {
    parameters: Object.fromEntries(named),
    occupancy: of("occ")?.value ?? 1,
    displacement: displacementOf(of),
  };
}

function requireClear(fields: readonly Field[]): void {
  const twice = fields.find((f, i) => fields.findIndex((g) => g.key === f.key) < i);
  if (twice) throw unclear(`${twice.key} is given twice`, twice.span, "give each value once");
  const isotropic = fields.filter((f) => f.key === "U" || f.key === "B");
  const tensor = fields.filter((f) => /^U\d/.test(f.key));
  const last = [...isotropic, ...tensor].at(-1);
  if (isotropic.length > 1 || (isotropic.length > 0 && tensor.length > 0)) {
    throw unclear("the displacement is given in two ways", last!.span, "give one of U=, B= and U11= to U23=");
  }
  const missing = TENSOR.filter((name) => tensor.every((f) => f.key !== name));
  if (tensor.length === 0 || missing.length === 0) return;
  throw unclear(`${missing.join(", ")} of the displacement tensor are missing`, last!.span, "give all six, or U=");
}

function unclear(message: string, span: Span, hint: string): InputProblem {
  return new InputProblem("table-unreadable", message, span, hint);
}

function displacementOf(of: (key: string) => MeasuredNumber | null): DisplacementTensor | null {
  const tensor = TENSOR.map(of);
  if (tensor.every((u) => u !== null)) {
    const u = tensor.map((e) => e.value) as unknown as readonly [number, number, number, number, number, number];
    return { kind: "anisotropic", u, su: tensor.map((e) => e.su) };
  }
  const [u, b] = [of("U"), of("B")];
  if (u) return { kind: "isotropic", iso: u.value, su: u.su };
  if (!b) return null;
  return { kind: "isotropic", iso: b.value / EIGHT_PI_SQUARED, su: b.su === null ? null : b.su / EIGHT_PI_SQUARED };
}

/** A line that `siteLine` reads as this site. */
export function formatSite(site: TableSite): string {
  const { multiplicity, letter, coordinates: xyz, parameters, occupancy, displacement } = site;
  const named = PARAMETERS.flatMap((p) => {
    const number = parameters[p];
    return number ? [`${p}=${formatMeasured(number)}`] : [];
  });
  return [
    site.label,
    ...(site.species === null ? [] : [site.species]),
    ...(letter === null ? [] : [`${multiplicity ?? ""}${letter === "A" ? "alpha" : letter}`]),
    ...(xyz === null ? [] : [xyz.map(formatCoordinate).join(",")]),
    ...named,
    ...(occupancy === 1 ? [] : [`occ=${occupancy}`]),
    ...displacementText(displacement),
  ].join(" ");
}

function displacementText(displacement: DisplacementTensor | null): string[] {
  if (displacement === null) return [];
  if (displacement.kind === "isotropic")
    return [`U=${formatMeasured({ value: displacement.iso, su: displacement.su })}`];
  return displacement.u.map((value, i) => `${TENSOR[i]}=${formatMeasured({ value, su: displacement.su[i] ?? null })}`);
}
