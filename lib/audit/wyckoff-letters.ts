import { groupAnswer, nameSite } from "../symmetry/index.ts";
import { atomRows } from "./atom-rows.ts";
import { type AuditInput, rowText, type StatedText } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** Sites moved farther than this onto a special position are not judged; angstrom. */
const CERTAIN_SHIFT = 0.02;
/** Permutations of letters that are tried; no normaliser has more that differ. */
const MOST_PERMUTATIONS = 400;

const LETTER: Criterion = {
  id: "wyckoff-letter",
  severity: "contradiction",
  criterion:
    "The Wyckoff letters listed are not those of the sites, nor does any change of origin or axes that leaves the " +
    "operations as they are (the Euclidean normaliser) turn all of them into the letters listed.",
  source: "International Tables for Crystallography A (2016), chapters 2.1 (letters) and 3.5 (normalisers).",
  advice: "Correct the letter, or the coordinates if the site was meant to be another one.",
};

export const criteria: readonly Criterion[] = [LETTER];

interface LetteredSite {
  readonly label: string;
  readonly stated: StatedText;
  readonly letter: string;
  readonly own: string;
}

/** Are the Wyckoff letters as listed, up to the choices that letters depend on? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const sites = atomRows(input).flatMap((row): LetteredSite[] => {
    const stated = rowText(row.loop, row.row, "_atom_site.Wyckoff_symbol");
    const letter = /^\d*\s*([a-zA-Zα])$/.exec(stated?.text ?? "")?.[1];
    if (!stated || !letter || !row.site || row.site.symmetry.shift > CERTAIN_SHIFT) return [];
    const own = nameSite(crystal.identified, row.site.symmetry.operations).letter;
    return [{ label: row.atom.label, stated, letter: normal(letter), own: normal(own) }];
  });
  if (sites.every((s) => s.letter === s.own)) return [];
  const best = bestPermutation(sites, permutations(crystal.identified));
  const wrong = sites.filter((s) => best(s.own) !== s.letter);
  if (wrong.length === 0) return [];
  const first = wrong[0]!;
  const others = wrong.slice(1).map((s) => s.label);
  const message = `${first.label} is listed at the Wyckoff position ${first.letter}, but it is at ${best(first.own)}${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(LETTER, input.place(first.stated.name, first.stated.span), message, {
      stated: { what: `${first.stated.name} of ${first.label}`, value: first.stated.text },
      against: { what: "by operations and coordinates", value: best(first.own) },
      ...(others.length > 0 ? { also: wrong.slice(1).map((s) => `${s.label}: ${s.letter}, not ${best(s.own)}`) } : {}),
    }),
  ];
}

/** `A` and the Greek letter both stand for the general position of P m m m. */
function normal(letter: string): string {
  if (letter === "α") return "A";
  return letter === "A" ? "A" : letter.toLowerCase();
}

type Permutation = (letter: string) => string;

/** Of the permutations the one that explains most of the letters listed; the identity where that is as good. */
function bestPermutation(sites: readonly LetteredSite[], all: readonly Permutation[]): Permutation {
  const explained = (p: Permutation) => sites.filter((s) => p(s.own) === s.letter).length;
  return all.reduce((best, p) => (explained(p) > explained(best) ? p : best));
}

/** All permutations of letters that the normaliser makes, the identity first. */
function permutations(identified: Parameters<typeof groupAnswer>[0]): Permutation[] {
  const generators = groupAnswer(identified).letterExchanges.map((e) => e.letters);
  const letters = [...new Set(generators.flatMap((g) => Object.keys(g)))].sort();
  const found = new Map<string, readonly string[]>([[letters.join(), letters]]);
  for (const list of found.values()) {
    if (found.size > MOST_PERMUTATIONS) break;
    for (const g of generators) {
      const next = list.map((letter) => g[letter] ?? letter);
      found.set(next.join(), next);
    }
  }
  return [...found.values()].map((list) => (letter) => list[letters.indexOf(letter)] ?? letter);
}
