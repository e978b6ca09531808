import type { IntVec3 } from "../algebra/index.ts";

/** A text counts as a list of reflections from this many lines on; shorter tables of five numbers are common. */
export const MANY_REFLECTIONS = 20;

/** One measured value. */
export interface Reflection {
  readonly h: IntVec3;
  /** F^2 or F on an arbitrary scale, as the list says; F^2 may be negative. */
  readonly value: number;
  /** Standard uncertainty of the value, positive; null where the list gives none. */
  readonly sigma: number | null;
}

export type Quantity = "F^2" | "F";

/** Reflections as one place of a file lists them. */
export interface ReflectionList {
  /** Measured or refined list in a loop, a plain text, or a loop of a CIF that is itself a text of the file. */
  readonly kind: "refln" | "diffrn_refln" | "text" | "nested";
  readonly reflections: readonly Reflection[];
  readonly quantity: Quantity;
  /** How the quantity is known: `data name`, `negative values`, `assumed`, `given`. */
  readonly quantityFrom: string;
  /** The place in words: `loop with _refln_index_h`, `text of _some_name`. */
  readonly source: string;
  /** Rows left out and why; plain sentences. */
  readonly notes: readonly string[];
}

/**
 * The same list as F^2: F |F| with the uncertainty 2 |F| s + s^2, which stays positive where F is 0; and values without
 * an uncertainty, or with one that is not positive, kept with null.
 */
export function asSquares(list: ReflectionList): Reflection[] {
  if (list.quantity === "F^2") return list.reflections.map((r) => ({ ...r, sigma: positive(r.sigma) }));
  return list.reflections.map(({ h, value, sigma }) => {
    const s = positive(sigma);
    return { h, value: value * Math.abs(value), sigma: s === null ? null : 2 * Math.abs(value) * s + s * s };
  });
}

function positive(sigma: number | null): number | null {
  return sigma !== null && sigma > 0 ? sigma : null;
}

/** What a list without a data name holds: negative values are F^2; otherwise F^2 is assumed, as nearly all such lists are. */
export function quantityOfValues(
  reflections: readonly Reflection[],
): Pick<ReflectionList, "quantity" | "quantityFrom"> {
  const negative = reflections.some((r) => r.value < 0);
  return { quantity: "F^2", quantityFrom: negative ? "negative values" : "assumed" };
}
