import { InputProblem } from "../problem.ts";
import { cellContents, element, type Formula, parseFormula } from "../structure/index.ts";
import { atomLoop, atomRows, occupancySlack } from "./atom-rows.ts";
import { type AuditInput, type StatedNumber, type StatedText, statedNumber, statedText } from "./audit-input.ts";

/** What the file says about the atoms of its cell, in words and by its sites. D and T count as H. */
export interface StatedComposition {
  readonly formula: Formula | null;
  readonly formulaText: StatedText | null;
  readonly z: StatedNumber | null;
  /** Atoms of each element in the cell by the sites; null where the structure cannot be built. */
  readonly contents: Formula | null;
  /** By element, how far its number in the cell may be off by rounding of occupancies. */
  readonly slack: Formula;
  /** By element, how far its number in the formula may be off by rounding. */
  readonly formulaSlack: Formula;
  /** Rows of the atom list that could not be used. */
  readonly leftOut: number;
}

/** Atoms in the cell that differ by less than this are the same number of atoms. */
export const LEAST_ATOMS = 0.02;

/** Reads formula, Z and contents. */
export function statedComposition(input: AuditInput): StatedComposition {
  const formulaText = statedText(input, "_chemical_formula.sum");
  const formula = formulaText ? readable(formulaText.text) : null;
  const { crystal } = input;
  const slack = new Map<string, number>();
  for (const row of atomRows(input)) {
    if (!row.site) continue;
    const symbol = isotopeFree(row.atom.element ?? "?");
    slack.set(symbol, (slack.get(symbol) ?? 0) + row.site.images.length * occupancySlack(row));
  }
  return {
    formula,
    formulaText,
    z: statedNumber(input, "_cell.formula_units_Z"),
    contents: crystal && cellContents(crystal.sites),
    slack,
    formulaSlack: new Map(formulaText ? countSlack(formulaText.text) : []),
    leftOut: (atomLoop(input)?.rowCount ?? 0) - input.atoms.length,
  };
}

function readable(text: string): Formula | null {
  try {
    const counts = new Map<string, number>();
    for (const [symbol, n] of parseFormula(text)) {
      if (!element(symbol)) return null;
      counts.set(isotopeFree(symbol), (counts.get(isotopeFree(symbol)) ?? 0) + n);
    }
    return counts;
  } catch (e) {
    if (e instanceof InputProblem) return null;
    throw e;
  }
}

function isotopeFree(symbol: string): string {
  return symbol === "D" || symbol === "T" ? "H" : symbol;
}

/** Half a unit of the last digit of each count that is no whole number. */
function countSlack(text: string): [string, number][] {
  return [...text.matchAll(/([A-Z][a-z]?)\s*\d*\.(\d*)/g)].map(([, symbol, decimals]) => [
    isotopeFree(symbol!),
    0.5 * 10 ** -decimals!.length,
  ]);
}

/** Elements whose number in the cell is not `factor` times that of the formula; hydrogen only if asked for. */
export function unlike(c: StatedComposition, factor: number, withHydrogen = false): string[] {
  const { formula, contents } = c;
  if (!formula || !contents) return [];
  return [...new Set([...contents.keys(), ...formula.keys()])].filter((e) => {
    if (e === "?" || (e === "H" && !withHydrogen)) return false;
    return Math.abs(surplus(c, e, factor)) > allowance(c, e, factor);
  });
}

/** Atoms of an element in the cell beyond `factor` formulas. */
export function surplus({ formula, contents }: StatedComposition, symbol: string, factor: number): number {
  return (contents?.get(symbol) ?? 0) - factor * (formula?.get(symbol) ?? 0);
}

/** How far apart the numbers of atoms of an element may be. */
export function allowance(c: StatedComposition, symbol: string, factor: number): number {
  return LEAST_ATOMS + (c.slack.get(symbol) ?? 0) + factor * (c.formulaSlack.get(symbol) ?? 0);
}

/** How many times the cell holds the formula, by the number of atoms other than hydrogen; null where that is 0. */
export function formulasInCell({ formula, contents }: StatedComposition): number | null {
  const heavy = (f: Formula) => [...f].reduce((s, [e, n]) => (e === "H" || e === "?" ? s : s + n), 0);
  if (!formula || !contents || heavy(formula) === 0 || heavy(contents) === 0) return null;
  return heavy(contents) / heavy(formula);
}

/** The number of formula units where it is not stated: by the sites, if they give a whole number. */
function wholeUnits(c: StatedComposition): number | null {
  const inCell = formulasInCell(c);
  return inCell !== null && Math.abs(inCell - Math.round(inCell)) < LEAST_ATOMS ? Math.round(inCell) : null;
}

/**
 * Whether the formula is that of the whole cell although more than one formula unit is stated: the sites say so, and its
 * counts can be divided by Z.
 */
export function isFormulaOfCell(c: StatedComposition): boolean {
  const z = c.z?.value ?? 1;
  if (z <= 1 || !c.formula || !c.contents || unlike(c, z).length === 0) return false;
  const divisible = [...c.formula.values()].every((n) => !Number.isInteger(n) || Number.isInteger(n / z));
  return divisible && unlike(c, 1).length === 0;
}

/** Electrons of the neutral atoms. */
export function electronsOf(formula: Formula): number | null {
  return summed(formula, (symbol) => element(symbol)?.number ?? null);
}

/** Sum over the atoms of a formula; null where an element has no value. */
export function summed(formula: Formula, of: (symbol: string) => number | null): number | null {
  let sum = 0;
  for (const [symbol, n] of formula) {
    const each = of(symbol);
    if (each === null) return null;
    sum += n * each;
  }
  return sum;
}

/** A formula several times over. */
export function times(formula: Formula, factor: number): Formula {
  return new Map([...formula].map(([e, n]) => [e, n * factor]));
}

/**
 * The contents of the cell by each of the file's own accounts: formula and Z, then sites. A quantity per cell is
 * doubted only where it agrees with neither, since their disagreement is told on its own.
 */
export function accountsOfCell(c: StatedComposition): { readonly what: string; readonly atoms: Formula }[] {
  const found: { what: string; atoms: Formula }[] = [];
  const z = isFormulaOfCell(c) ? 1 : (c.z?.value ?? wholeUnits(c));
  if (c.formula && z !== null) {
    const what = z === 1 ? c.formulaText!.name : `${z} times ${c.formulaText!.name}`;
    found.push({ what, atoms: times(c.formula, z) });
  }
  if (c.contents && !c.contents.has("?")) found.push({ what: "the sites of the cell", atoms: c.contents });
  return found;
}
