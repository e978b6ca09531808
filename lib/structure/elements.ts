import { ELEMENT_TABLE } from "./tables/elements.ts";

/** What the tables know of an element; `mass` in dalton, `bondRadius` in angstrom, null where not tabulated. */
export interface Element {
  readonly symbol: string;
  readonly number: number;
  readonly mass: number | null;
  readonly bondRadius: number | null;
}

/** Mass of deuterium and tritium in dalton. Source: CIAAW / AME 2020 atomic masses, rounded (from memory). */
const HYDROGEN_ISOTOPES: Readonly<Record<string, number>> = { D: 2.014, T: 3.016 };

let decoded: Map<string, Element> | null = null;

function elements(): Map<string, Element> {
  if (decoded) return decoded;
  const map = new Map<string, Element>();
  for (const row of ELEMENT_TABLE.split(";")) {
    const [symbol = "", number, mass, radius] = row.trim().split(" ");
    map.set(symbol, { symbol, number: Number(number), mass: figure(mass), bondRadius: figure(radius) });
  }
  const hydrogen = map.get("H")!;
  for (const [symbol, mass] of Object.entries(HYDROGEN_ISOTOPES)) map.set(symbol, { ...hydrogen, symbol, mass });
  decoded = map;
  return map;
}

function figure(text: string | undefined): number | null {
  return text === undefined || text === "-" ? null : Number(text);
}

/** The element of a symbol as the tables write it (`Ca`, and `D`, `T` for the hydrogen isotopes), or null. */
export function element(symbol: string): Element | null {
  return elements().get(symbol) ?? null;
}

/** Element and charge read from a type symbol or an atom label. */
export interface SpeciesReading {
  readonly element: string;
  /** In units of the elementary charge; null where the text does not tell. */
  readonly charge: number | null;
}

/**
 * Reads an atom type symbol: `Ca`, `CA`, `Fe3+`, `O2-`, `Fe+3`, `D`, `Cval`, `H1-`. Null where it starts with no element.
 * @param expected symbols that the file's formula or type list names; they settle `CO` (cobalt, or carbon in a chain)
 */
export function readTypeSymbol(text: string, expected: ReadonlySet<string> = new Set()): SpeciesReading | null {
  const letters = /^[A-Za-z]+/.exec(text.trim())?.[0];
  if (!letters) return null;
  const symbol = chooseSymbol(letters, expected);
  return symbol ? { element: symbol, charge: readCharge(text.trim().slice(symbol.length)) } : null;
}

/** The element of an atom label such as `Ca1`, `O1W`, `H2A`, `SI3`; null where it starts with no element. */
export function readLabel(label: string, expected: ReadonlySet<string> = new Set()): SpeciesReading | null {
  const reading = readTypeSymbol(label, expected);
  return reading && { element: reading.element, charge: null };
}

function chooseSymbol(letters: string, expected: ReadonlySet<string>): string | null {
  const one = letters[0]!.toUpperCase();
  const two = letters.length > 1 ? one + letters[1]!.toLowerCase() : "";
  const hasOne = element(one) !== null;
  const hasTwo = two !== "" && element(two) !== null;
  if (hasTwo && !hasOne) return two;
  if (hasOne && !hasTwo) return one;
  if (!hasOne) return null;
  if (expected.has(two) !== expected.has(one)) return expected.has(two) ? two : one;
  // Undecided by the formula: a lower-case second letter belongs to the symbol, capitals are read as the longer one.
  return two;
}

function readCharge(rest: string): number | null {
  const m = /^(?:(\d+)([+-])|([+-])(\d*))/.exec(rest);
  if (!m) return null;
  const size = Number(m[1] ?? (m[4] || "1"));
  return (m[2] ?? m[3]) === "-" ? -size : size;
}
