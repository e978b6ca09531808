import { gcd, mod } from "../algebra/index.ts";

/** The congruence c . m = residue (mod modulus) on the free letters m of a class of reflections. */
export interface Congruence {
  readonly coefficients: readonly number[];
  readonly modulus: number;
  readonly residue: number;
}

/** Elements of (Z/N)^r: characters m -> exp(2 pi i c . m / N) of the reflections, or reflections modulo N. */
export type Residues = readonly number[];

/** The subgroup of (Z/N)^r that the given elements generate; the zero first. */
export function generated(generators: readonly Residues[], N: number, r: number): Residues[] {
  const found = new Map<string, Residues>();
  const zero = new Array<number>(r).fill(0);
  found.set(zero.join(), zero);
  for (const g of generators) {
    if (found.has(g.map((e) => mod(e, N)).join())) continue;
    // cosets of the subgroup so far by the multiples of g
    const before = [...found.values()];
    for (let k = 1; k < N; k++) {
      for (const b of before) {
        const sum = b.map((e, i) => mod(e + k * g[i]!, N));
        found.set(sum.join(), sum);
      }
    }
  }
  return [...found.values()];
}

/** A character of (Z/N)^r in lowest terms, small coefficients, the last one positive: `-h+k+l = 0 (mod 3)`. */
export function reduced(c: Residues, N: number): Congruence {
  const g = c.reduce((a, b) => gcd(a, b), N);
  const modulus = N / g;
  let best: number[] | null = null;
  for (let unit = 1; unit < modulus || unit === 1; unit++) {
    if (gcd(unit, modulus) !== 1) continue;
    const small = c.map((e) => {
      const m = mod((e / g) * unit, modulus);
      return 2 * m > modulus ? m - modulus : m;
    });
    if ((lastNonZero(small) ?? 1) < 0) continue;
    if (!best || weight(small) < weight(best)) best = small;
  }
  return { coefficients: best ?? c, modulus, residue: 0 };
}

function lastNonZero(c: readonly number[]): number | undefined {
  return c.findLast((e) => e !== 0);
}

function weight(c: readonly number[]): number {
  return c.reduce((sum, e) => sum + Math.abs(e), 0) + 100 * c.filter((e) => e !== 0).length;
}

/** Order of preference in print: high modulus, few letters, small coefficients, positive ones, early letters. */
function compare(a: Congruence, b: Congruence): number {
  const difference = b.modulus - a.modulus || weight(a.coefficients) - weight(b.coefficients);
  if (difference !== 0) return difference;
  const sum = (c: Congruence) => c.coefficients.reduce((n, e) => n + e, 0);
  if (sum(a) !== sum(b)) return sum(b) - sum(a);
  for (let i = 0; i < a.coefficients.length; i++) {
    const d = Math.abs(b.coefficients[i]!) - Math.abs(a.coefficients[i]!);
    if (d !== 0) return d;
  }
  return 0;
}

/** Order within one condition: high modulus, many letters (`h+k,l=2n`), early letters. */
function inPrint(a: Congruence, b: Congruence): number {
  const letters = (c: Congruence) => c.coefficients.filter((e) => e !== 0).length;
  return b.modulus - a.modulus || letters(b) - letters(a) || compare(a, b);
}

/**
 * Congruences that say that all characters of a group are trivial, as International Tables would write them: a
 * generating set for each prime, `k+l=4n` before `k,l=2n`, all letters of a kind named together, `l=6n` in one.
 * @param group a subgroup of (Z/N)^r
 * @param known characters already known to be trivial; where there are any only what they leave open is said
 */
export function congruencesOf(group: readonly Residues[], N: number, known: readonly Residues[]): Congruence[] {
  const r = group[0]!.length;
  const chosen: Congruence[] = [];
  for (const p of primesOf(N)) {
    const part = group.filter((c) => isPower(reduced(c, N).modulus, p));
    let span = generated(known, N, r);
    const candidates = part.map((c) => reduced(c, N)).sort(compare);
    for (const c of candidates) {
      const next = generated([...span, scaled(c, N)], N, r);
      if (next.length === span.length) continue;
      // the mildest congruence that says as much on top of the others: k=2n rather than -k+l=4n after k+l=4n
      const equivalents = candidates.filter((o) => {
        const other = generated([...span, scaled(o, N)], N, r);
        return other.length === next.length && includes(other, scaled(c, N));
      });
      chosen.push(equivalents.sort((a, b) => a.modulus - b.modulus || compare(a, b))[0]!);
      span = next;
    }
    if (known.length <= 1) complete(chosen, candidates);
  }
  return merged(chosen).sort(inPrint);
}

/** The congruence as a character over N. */
function scaled(c: Congruence, N: number): Residues {
  return c.coefficients.map((e) => mod((e * N) / c.modulus, N));
}

function includes(span: readonly Residues[], c: Residues): boolean {
  const key = c.join();
  return span.some((s) => s.join() === key);
}

/** Adds the remaining congruences modulo 2 of the same shape: `h+k,h+l` becomes `h+k,h+l,k+l`, `k` becomes `k,l`. */
function complete(chosen: Congruence[], candidates: readonly Congruence[]): void {
  for (const letters of [1, 2]) {
    const shape = (c: Congruence) => c.modulus === 2 && c.coefficients.filter((e) => e !== 0).length === letters;
    if (!chosen.some(shape) || (letters === 2 && chosen.some((c) => c.modulus === 2 && !shape(c)))) continue;
    for (const c of candidates.filter(shape)) {
      const implied = chosen.some(
        (o) => o.modulus > 2 && o.coefficients.every((e, i) => mod(e - c.coefficients[i]!, 2) === 0),
      );
      const there = chosen.some((o) => o.modulus === 2 && o.coefficients.join() === c.coefficients.join());
      if (!implied && !there) chosen.push(c);
    }
  }
}

/** `l=2n` and `l=3n` are `l=6n` where nothing else is said for either prime. */
function merged(chosen: readonly Congruence[]): Congruence[] {
  const [a, b] = chosen;
  if (chosen.length !== 2 || gcd(a!.modulus, b!.modulus) !== 1) return [...chosen];
  const single = (c: Congruence) => c.coefficients.filter((e) => e !== 0).length === 1;
  if (!single(a!) || !single(b!) || a!.coefficients.join() !== b!.coefficients.join()) return [...chosen];
  return [{ coefficients: a!.coefficients, modulus: a!.modulus * b!.modulus, residue: 0 }];
}

function primesOf(N: number): number[] {
  const found: number[] = [];
  let rest = N;
  for (let p = 2; rest > 1; p++) {
    if (rest % p !== 0) continue;
    found.push(p);
    while (rest % p === 0) rest /= p;
  }
  return found;
}

function isPower(m: number, p: number): boolean {
  let rest = m;
  while (rest % p === 0) rest /= p;
  return rest === 1 && m > 1;
}

/** `k+l=4n, k,l=2n`, or `h=2n and h+k+l=4n`: congruences of one modulus and residue together. */
export function formatCongruences(
  all: readonly Congruence[],
  letters: readonly number[],
  separator: ", " | " and " = ", ",
): string {
  const groups = new Map<string, string[]>();
  const ordered = [...all].sort((a, b) => (separator === ", " ? 0 : a.modulus - b.modulus) || inPrint(a, b));
  for (const c of ordered) {
    const key = `=${c.modulus}n${c.residue === 0 ? "" : `+${c.residue}`}`;
    groups.set(key, [...(groups.get(key) ?? []), linearForm(c.coefficients, letters)]);
  }
  return [...groups].map(([right, left]) => left.join() + right).join(separator);
}

function linearForm(coefficients: readonly number[], letters: readonly number[]): string {
  let text = "";
  coefficients.forEach((e, i) => {
    if (e === 0) return;
    const sign = e < 0 ? "-" : text ? "+" : "";
    text += `${sign}${Math.abs(e) === 1 ? "" : Math.abs(e)}${"hkl"[letters[i]!]}`;
  });
  return text;
}

/** Whether m satisfies the congruence. */
export function holds(c: Congruence, m: readonly number[]): boolean {
  const sum = c.coefficients.reduce((s, e, i) => s + e * m[i]!, 0);
  return mod(sum - c.residue, c.modulus) === 0;
}
