import { InputProblem } from "../problem.ts";

const SUBSCRIPTS = "₀₁₂₃₄₅₆₇₈₉";

/**
 * A Mulliken label as people write it, in ASCII: `F2g`, `t_2g`, `T₂g` are `T2g`; `E″` and `E"` are `E''`.
 * Returned unchanged where it is no such label.
 */
export function plainLabel(text: string): string {
  const plain = text
    .trim()
    .replace(/[₀-₉]/g, (d) => String(SUBSCRIPTS.indexOf(d)))
    .replace(/[″"]/g, "''")
    .replace(/[′’]/g, "'")
    .replace(/[_{}]/g, "");
  const match = /^([abefght])(\d*)([gu]?)('{0,2})$/i.exec(plain);
  if (!match) return text.trim();
  const [, letter = "", index = "", parity = "", primes = ""] = match;
  return letter.toUpperCase().replace("F", "T") + index + parity.toLowerCase() + primes;
}

/**
 * Index of the species that a person means.
 * @throws InputProblem `unknown-species`, naming those that there are
 */
export function findSpecies(irreps: readonly { readonly label: string }[], text: string): number {
  const label = plainLabel(text);
  const index = irreps.findIndex((r) => r.label === label);
  if (index >= 0) return index;
  const known = irreps.map((r) => r.label).join(", ");
  throw new InputProblem("unknown-species", `there is no species "${text}" here`, null, `The species are ${known}.`);
}
