/** A species and how often it occurs; `marks` are appended in parentheses, such as R or IR. */
export interface SpeciesTerm {
  readonly label: string;
  readonly count: number;
  readonly marks?: readonly string[];
}

/** `A1g(R) + 3A2g + 2A1u + 3A2u(IR)`, species with count 0 left out; `0` where nothing is left. */
export function speciesSum(terms: readonly SpeciesTerm[]): string {
  const shown = terms.filter((t) => t.count !== 0).map(termText);
  return shown.length > 0 ? shown.join(" + ") : "0";
}

function termText({ label, count, marks = [] }: SpeciesTerm): string {
  return `${count === 1 ? "" : count}${label}${marks.length > 0 ? `(${marks.join(",")})` : ""}`;
}

/** Letter of triply degenerate species: Mulliken's T, or the older F of much infrared and Raman literature. */
export type TripleLetter = "T" | "F";

/** How species are written for people. Views take one, so that a choice of notation is made in one place. */
export interface SpeciesWriter {
  readonly label: (label: string) => string;
  /** A sum in the order of the counts; `marks` gives what is appended to a species, such as R or IR. */
  readonly sum: (counts: Readonly<Record<string, number>>, marks?: (label: string) => readonly string[]) => string;
}

export function speciesWriter(triple: TripleLetter = "T"): SpeciesWriter {
  const label = (text: string) => typographicLabel(text.replace(/^T/, triple));
  return {
    label,
    sum: (counts, marks = () => []) =>
      speciesSum(Object.entries(counts).map(([l, count]) => ({ label: label(l), count, marks: marks(l) }))),
  };
}

const SUBSCRIPTS = "₀₁₂₃₄₅₆₇₈₉";

const GREEK: Readonly<Record<string, string>> = { Sigma: "Σ", Pi: "Π", Delta: "Δ", Phi: "Φ", Gamma: "Γ" };

/**
 * A Mulliken label set for people: digits as subscripts, primes as primes, Greek letters for linear molecules, where plus
 * and minus rise (`Sigmag+` is Σg⁺); letters g and u stay on the line.
 */
export function typographicLabel(label: string): string {
  const linear = /^(Sigma|Pi|Delta|Phi|Gamma)([gu]?)([+-]?)$/.exec(label);
  if (linear) {
    const [, name = "", parity = "", sign = ""] = linear;
    return GREEK[name] + parity + (sign === "+" ? "⁺" : sign === "-" ? "⁻" : "");
  }
  return label
    .replace(/\d/g, (d) => SUBSCRIPTS[Number(d)]!)
    .replace(/''/g, "″")
    .replace(/'/g, "′");
}

/** A function that transforms like a species, set for people: `sqrt3(x2-y2)` as √3(x²-y²). */
export function functionText(text: string): string {
  return text.replace(/([xyz])2/g, "$1²").replace(/sqrt/g, "√");
}

const SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** The name of a class or an element set for people: `2S8^3` as 2S₈³, `3sigma_d` as 3σd, `C2''` as C₂″. */
export function classText(name: string): string {
  return name
    .replace(/([CS])(\d+)/, (_, letter: string, n: string) => letter + n.replace(/\d/g, (d) => SUBSCRIPTS[Number(d)]!))
    .replace(/\^(\d+)/, (_, n: string) => n.replace(/\d/g, (d) => SUPERSCRIPTS[Number(d)]!))
    .replace("sigma", "σ")
    .replace("_", "")
    .replace("phi", "φ")
    .replace("inf ", "∞")
    .replace(/''/, "″")
    .replace(/'/, "′");
}
