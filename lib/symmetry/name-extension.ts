import { InputProblem, type Span } from "../problem.ts";
import { parseChangeOfCoordinates } from "./hall-symbol-text.ts";
import type { Setting } from "./settings.ts";
import { reverse, type Transformation } from "./transformation.ts";
import { parseTransformation } from "./transformation-text.ts";

/** What stands after a symbol: a choice among settings, a change of setting on top, or a remark that decides nothing. */
export type NameExtension =
  | {
      readonly kind: "choice";
      readonly fits: (setting: Setting) => boolean;
      readonly meaning: string;
      /** True for origins and hexagonal axes, which decide nothing in types that have but one. */
      readonly needsChoice: boolean;
    }
  | { readonly kind: "change"; readonly change: Transformation }
  | { readonly kind: "remark" };

const AXIS_ORDER = /^(1|2)?:?(abc|ba-c|cab|-cba|bca|a-cb)$/;
const UNIQUE_AXIS = /^(-?[abc])([123])?$/;

/**
 * Meaning of a setting code: `1`, `2`, `H`, `R`, `S` (first origin), `Z` (origin at the centre), `b1`, `-c2`, `cab`,
 * `2cab`, the words of International Tables in brackets (`origin choice 2`, `hexagonal axes`), or a change of setting
 * `a,b+1/2,c` (new axes and origin) or `x,y-1/2,z` (new coordinates).
 * @throws InputProblem `group-name-extension` if it means nothing here
 */
export function readExtension(text: string, span: Span): NameExtension {
  const inner = text
    .replace(/^[([{]|[)\]}]$/g, "")
    .trim()
    .toLowerCase();
  if (/^no\.?\s*\d{1,3}$/.test(inner)) return { kind: "remark" };
  if (inner.includes(",") && !/[d-w]/.test(inner)) return { kind: "change", change: readChange(inner, span) };
  const found = choiceOf(inner);
  if (found) return found;
  throw new InputProblem(
    "group-name-extension",
    `"${text}" after the symbol is not understood`,
    span,
    "use 1 or 2 for the origin, H or R for the axes, b1 or cab for the setting, or a change of basis (a,b,c+1/4)",
  );
}

function choiceOf(inner: string): NameExtension | null {
  const origin = /^(?:origin(?: choice)?\s*)?([12])$/.exec(inner)?.[1] ?? { s: "1", z: "2" }[inner];
  if (origin) return choice(`origin choice ${origin}`, (s) => s.choice === origin);
  if (/^(h|hexagonal|hexagonal axes|hexagonal setting|obverse)$/.test(inner)) {
    return choice("hexagonal axes", (s) => s.choice === "H");
  }
  if (/^(h-reverse|reverse)$/.test(inner)) return choice("hexagonal axes, reverse", (s) => s.choice === "H-reverse");
  if (/^(r|rhombohedral|rhombohedral axes|rhombohedral setting|primitive)$/.test(inner)) {
    return choice("rhombohedral axes", (s) => s.choice === "R");
  }
  const order = AXIS_ORDER.exec(inner) ?? AXIS_ORDER.exec(inner.replace(/^(.+):([12])$/, "$2$1"));
  if (order) {
    const meaning = `axes ${order[2]}${order[1] ? `, origin choice ${order[1]}` : ""}`;
    return choice(meaning, (s) => s.axes === order[2] && (!order[1] || s.choice === order[1]));
  }
  const words = /^unique axis ([abc])(?:,?\s*cell choice ([123]))?$/.exec(inner);
  const unique = words ?? UNIQUE_AXIS.exec(inner);
  if (!unique) return null;
  const [, axis, cell] = unique;
  const meaning = `unique axis ${axis}${cell ? `, cell choice ${cell}` : ""}`;
  return choice(
    meaning,
    (s) => s.axes === `${axis}${cell ?? ""}` || (!cell && new RegExp(`^${axis}[123]$`).test(s.axes)),
  );
}

function choice(meaning: string, fits: (setting: Setting) => boolean): NameExtension {
  return { kind: "choice", fits, meaning, needsChoice: /^(origin|hexagonal axes$)/.test(meaning) };
}

/** The change from the setting of the symbol to the one meant. */
function readChange(inner: string, span: Span): Transformation {
  try {
    return /[xyz]/.test(inner) ? reverse(parseChangeOfCoordinates(inner)) : parseTransformation(inner);
  } catch (e) {
    if (e instanceof InputProblem) throw new InputProblem("group-name-extension", e.message, span, e.hint);
    throw e;
  }
}
