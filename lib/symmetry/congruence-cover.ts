import { gcd, mod } from "../algebra/index.ts";
import { type Congruence, generated, holds, type Residues, reduced } from "./congruence.ts";

/** A set of classes of residues, as bits, with the congruences that single it out. */
interface Candidate {
  readonly bits: bigint;
  readonly list: readonly Congruence[];
}

/** Most congruences joined in one alternative; three letters modulo 4 need three. */
const LONGEST = 3;

/** Alternatives that together allow a set of residues. */
export interface Cover {
  readonly alternatives: Congruence[][];
  /** Those to print: one of each set that cyclic exchange of the letters makes of it. */
  readonly shown: Congruence[][];
}

/**
 * Alternatives, each a list of congruences, that together allow exactly the residues `kept` among `all`: large simple
 * sets first (greedy set cover). For residues that form no subgroup, such as `h=2n+1 or h+k+l=4n`.
 * @param all a subgroup of (Z/N)^r: what the general conditions leave
 * @param kept a subset of it
 * @param general characters that are trivial on `all`
 * @param cyclic true if cyclic exchange of three letters leaves both sets alone
 */
export function coveringAlternatives(
  all: readonly Residues[],
  kept: readonly Residues[],
  general: readonly Residues[],
  N: number,
  cyclic: boolean,
): Cover {
  const characters = relevantCharacters(all, kept, general, N);
  const classes = classesBy(characters, all);
  const keys = new Set(kept.map((m) => m.join()));
  const bitsOf = (inside: (m: Residues) => boolean) =>
    classes.reduce((bits, m, i) => (inside(m) ? bits | (1n << BigInt(i)) : bits), 0n);
  const target = bitsOf((m) => keys.has(m.join()));
  const usable = usableCandidates(
    singleCandidates(characters, bitsOf),
    target,
    bitsOf(() => true),
  );
  const plain = cover(target, usable);
  if (!cyclic) return { alternatives: plain, shown: plain };
  const satisfied = (list: readonly Congruence[]) => bitsOf((m) => list.every((c) => holds(c, m)));
  const together = usable.map(({ list }) => ({
    list,
    bits: exchanged(list).reduce((bits, other) => bits | satisfied(other), 0n),
  }));
  const shown = cover(target, together);
  if (plain.length <= shown.length) return { alternatives: plain, shown: plain };
  return { alternatives: shown.flatMap(exchanged), shown };
}

/** Largest subsets of the target that up to LONGEST congruences single out; as few congruences as cover it all. */
function usableCandidates(singles: readonly Candidate[], target: bigint, everything: bigint): Candidate[] {
  let usable: Candidate[] = [];
  let open: Candidate[] = [{ bits: everything, list: [] }];
  let missing = target;
  for (let size = 1; size <= LONGEST && missing !== 0n; size++) {
    const joined = join(open, singles);
    usable = largest([...usable, ...joined.filter((c) => (c.bits & ~target) === 0n)]);
    missing = target & ~usable.reduce((bits, c) => bits | c.bits, 0n);
    open = joined.filter((c) => (c.bits & ~target) !== 0n && (c.bits & missing) !== 0n);
  }
  return usable;
}

/** Candidates that lie in no other. */
function largest(candidates: readonly Candidate[]): Candidate[] {
  const sized = candidates.map((c) => ({ c, size: count(c.bits), cost: cost(c.list) }));
  const kept: Candidate[] = [];
  for (const { c } of sized.sort((a, b) => b.size - a.size || a.cost - b.cost)) {
    if (!kept.some((k) => (c.bits & ~k.bits) === 0n)) kept.push(c);
  }
  return kept;
}

/** A list of congruences and what cyclic exchange of the three letters makes of it, equal ones once. */
function exchanged(list: readonly Congruence[]): Congruence[][] {
  const turn = (by: number) =>
    list.map((c) => ({ ...c, coefficients: [0, 1, 2].map((i) => c.coefficients[(i + by) % 3]!) }));
  const found = new Map<string, Congruence[]>();
  for (const by of [0, 1, 2]) {
    const turned = turn(by);
    const key = turned
      .map((c) => `${c.coefficients}=${c.modulus}n+${c.residue}`)
      .sort()
      .join();
    if (!found.has(key)) found.set(key, turned);
  }
  return [...found.values()];
}

/** Characters of (Z/N)^r that are constant on the periods of the set, one for each class modulo the general ones. */
function relevantCharacters(
  all: readonly Residues[],
  kept: readonly Residues[],
  general: readonly Residues[],
  N: number,
): Congruence[] {
  const place = (m: Residues) => m.reduce((sum, e) => sum * N + e, 0);
  const inside = new Set(kept.map(place));
  const sum = (m: Residues, t: Residues) => m.reduce((n, e, i) => n * N + ((e + t[i]!) % N), 0);
  const periods = all.filter((t) => kept.every((m) => inside.has(sum(m, t))));
  const r = all[0]!.length;
  const every = generated(unit(r), N, r);
  const constant = every.filter((c) => periods.every((t) => mod(dot(c, t), N) === 0));
  const seen = new Set(general.map((c) => c.join()));
  const found: Congruence[] = [];
  const simple = constant
    .map((c) => ({ c, form: reduced(c, N) }))
    .sort(
      (a, b) => cost([a.form]) - cost([b.form]) || (a.form.coefficients.join() < b.form.coefficients.join() ? 1 : -1),
    );
  for (const { c, form } of simple) {
    if (seen.has(c.join())) continue;
    // multiples by units and sums with general characters single out the same sets
    for (let k = 1; k < form.modulus; k++) {
      if (gcd(k, form.modulus) !== 1) continue;
      const multiple = c.map((e) => mod(k * e, N));
      for (const g of general) seen.add(multiple.map((e, i) => mod(e + g[i]!, N)).join());
    }
    found.push(form);
  }
  return found;
}

function unit(r: number): number[][] {
  return Array.from({ length: r }, (_, i) => Array.from({ length: r }, (_, j) => (i === j ? 1 : 0)));
}

/** One residue for every combination of values that the characters take. */
function classesBy(characters: readonly Congruence[], all: readonly Residues[]): Residues[] {
  const found = new Map<string, Residues>();
  for (const m of all) {
    const key = characters.map((c) => mod(dot(c.coefficients, m), c.modulus)).join();
    if (!found.has(key)) found.set(key, m);
  }
  return [...found.values()];
}

function singleCandidates(
  characters: readonly Congruence[],
  bitsOf: (inside: (m: Residues) => boolean) => bigint,
): Candidate[] {
  const found: Candidate[] = [];
  for (const c of characters) {
    for (let residue = 0; residue < c.modulus; residue++) {
      const congruence = { ...c, residue };
      const bits = bitsOf((m) => holds(congruence, m));
      if (bits !== 0n) found.push({ bits, list: [congruence] });
    }
  }
  return found;
}

/** Intersections of an open candidate with one more congruence; of equal sets the cheapest. */
function join(open: readonly Candidate[], singles: readonly Candidate[]): Candidate[] {
  const best = new Map<bigint, { a: Candidate; b: Candidate; cost: number }>();
  const costs = singles.map((b) => cost(b.list));
  for (const a of open) {
    const own = cost(a.list);
    singles.forEach((b, i) => {
      const bits = a.bits & b.bits;
      if (bits === 0n || bits === a.bits) return;
      const known = best.get(bits);
      const together = own + costs[i]!;
      if (!known) best.set(bits, { a, b, cost: together });
      else if (together < known.cost) Object.assign(known, { a, b, cost: together });
    });
  }
  return [...best].map(([bits, { a, b }]) => ({ bits, list: [...a.list, ...b.list] }));
}

function cover(target: bigint, usable: readonly Candidate[]): Congruence[][] {
  const chosen: Candidate[] = [];
  let open = target;
  while (open !== 0n) {
    let best: Candidate | null = null;
    let gain = 0;
    for (const c of usable) {
      const more = count(c.bits & open);
      if (more > gain || (more === gain && best && cost(c.list) < cost(best.list))) {
        best = c;
        gain = more;
      }
    }
    if (!best) throw new RangeError("reflections present are no union of the sets at hand");
    chosen.push(best);
    open &= ~best.bits;
  }
  return chosen
    .filter((c, i) => (chosen.reduce((bits, o, j) => (i === j ? bits : bits | o.bits), 0n) & c.bits) !== c.bits)
    .map((c) => [...c.list]);
}

function count(bits: bigint): number {
  let n = 0;
  for (let rest = bits; rest !== 0n; rest &= rest - 1n) n++;
  return n;
}

/** Fewer congruences, smaller moduli, fewer letters, small coefficients, residue 0 and early letters are cheaper. */
function cost(list: readonly Congruence[]): number {
  return list.reduce((sum, { coefficients, modulus, residue }) => {
    const letters = coefficients.filter((e) => e !== 0).length;
    const size = coefficients.reduce((n, e) => n + Math.abs(e) + (e < 0 ? 0.5 : 0), 0);
    return sum + 100 + 10 * modulus + 5 * letters + size + (residue === 0 ? 0 : 1);
  }, 0);
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, e, i) => sum + e * b[i]!, 0);
}
