import { gcd } from "../algebra/index.ts";
import { type CifBlock, findValue } from "../cif/index.ts";
import { InputProblem } from "../problem.ts";
import { bondClasses, isHydrogen } from "./bond-class.ts";
import { cellContents, contentsMisfit } from "./composition.ts";
import type { Crystal } from "./crystal.ts";
import { type Formula, formatFormula, parseFormula } from "./formula-text.ts";
import { hillFormula, sequenceFormula } from "./unit-formula.ts";

/** Contents agree with a formula, and counts of atoms are whole, within this share; occupancies are rounded in files. */
const COUNT_TOLERANCE = 0.02;

/** Atoms of one formula are written out up to this number. */
const MOST_ATOMS = 2000;

/** A formula and how many of it the primitive cell holds. */
export interface FormulaUnits {
  /** `CaCO3`; with blanks where counts are not whole: `Ca0.95 Mg0.05 C O3`. */
  readonly formula: string;
  readonly inPrimitiveCell: number;
  /** Whether the formula is the one that the file states, or the smallest that the listed atoms make. */
  readonly source: "file" | "atoms";
}

/** The sum formula that a block states, null where it states none or one that cannot be read. */
export function statedFormula(block: CifBlock): Formula | null {
  const stated = findValue(block, "_chemical_formula.sum")?.value;
  if (stated?.kind !== "text") return null;
  try {
    return parseFormula(stated.text.trim());
  } catch (e) {
    if (e instanceof InputProblem) return null;
    throw e;
  }
}

/**
 * Formula units of the primitive cell: of the stated formula where the listed atoms agree with it, hydrogen aside; else of
 * the smallest formula with whole numbers. Null where occupancies leave none.
 */
export function formulaUnits(crystal: Crystal, stated: Formula | null): FormulaUnits | null {
  const cells = crystal.group.centrings.length;
  const contents = new Map([...cellContents(crystal.sites)].map(([e, n]) => [e, n / cells]));
  if (stated && contentsMisfit(contents, stated) <= COUNT_TOLERANCE) {
    const ratio = heavyAtoms(contents) / heavyAtoms(stated);
    const whole = Math.round(ratio);
    const count = Math.abs(ratio - whole) <= COUNT_TOLERANCE * ratio ? whole : Number(ratio.toFixed(2));
    return { formula: written(stated), inPrimitiveCell: count, source: "file" };
  }
  const counts = [...contents].map(([e, n]): [string, number] => [e, Math.round(n)]);
  if (contents.size === 0 || [...contents.values()].some((n) => Math.abs(n - Math.round(n)) > COUNT_TOLERANCE))
    return null;
  const divisor = counts.reduce((d, [, n]) => gcd(d, n), 0);
  if (divisor === 0 || contents.has("?")) return null;
  const formula = written(new Map(counts.map(([e, n]) => [e, n / divisor])));
  return { formula, inPrimitiveCell: divisor, source: "atoms" };
}

function heavyAtoms(formula: Formula): number {
  return [...formula].reduce((sum, [e, n]) => (e === "H" || e === "D" ? sum : sum + n), 0);
}

/**
 * As chemists write it where counts are whole: organic ones in Hill's order; salts of oxo-acids, hydroxides and hydrates
 * with hydrogen as the last of the electropositive constituents, `KH2PO4`, `MgH2O2`; others by the sequence of elements.
 * Source: IUPAC, Nomenclature of Inorganic Chemistry (2005), IR-4.4.2.1 and IR-4.4.3.4 (from memory).
 */
function written(formula: Formula): string {
  const counts = [...formula];
  const total = counts.reduce((s, [, n]) => s + n, 0);
  if (counts.some(([, n]) => !Number.isInteger(n)) || total > MOST_ATOMS) return formatFormula(formula);
  const elements = counts.flatMap(([e, n]) => new Array<string>(n).fill(e));
  const { nonMetal } = bondClasses();
  const isOrganic = formula.has("C") && formula.has("H") && counts.every(([e]) => nonMetal.has(e));
  if (isOrganic) return hillFormula(elements);
  const metals = elements.filter((e) => !nonMetal.has(e));
  if (metals.length === 0 || !formula.has("O") || formula.has("C")) return sequenceFormula(elements);
  const hydrogen = elements.filter(isHydrogen);
  const others = elements.filter((e) => nonMetal.has(e) && !isHydrogen(e));
  return [metals, hydrogen, others].map(sequenceFormula).join("");
}
