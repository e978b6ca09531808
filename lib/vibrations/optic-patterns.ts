import type { AcousticPattern, ModePattern, ModePatterns } from "./mode-patterns.ts";

/** What is left of a unit factor is nothing if its square is below this; dimensionless. */
const NOTHING = 1e-9;

/**
 * The patterns without the rigid translations: in every species that holds some, the repeats that take part in them
 * are replaced by orthonormal sums orthogonal to them, one fewer for every translation. Repeats that take no part stay.
 * All displacements of an optic pattern add up to 0, so the mean of the atoms rests (not the centre of mass: patterns
 * carry no masses).
 */
export function opticPatterns(all: ModePatterns): ModePattern[] {
  const byIrrep = all.group.irreps.map((_, irrep) =>
    all.patterns.flatMap((p, index) => (p.irrep === irrep ? [index] : [])),
  );
  return byIrrep.flatMap((indices, irrep) => {
    const acoustic = all.acoustic.filter((a) => a.irrep === irrep);
    const involved = new Set(acoustic.flatMap((a) => a.terms.map((t) => t.pattern)));
    const untouched = indices.filter((i) => !involved.has(i)).map((i) => all.patterns[i]!);
    const touched = [...involved].sort((a, b) => a - b);
    const mixed = complement(acoustic, touched).map((z) => summed(all, touched, z));
    return numbered([...untouched, ...mixed]);
  });
}

/** Factors of a sum: real and imaginary parts, where i is the quarter turn of the partners. */
interface Factors {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * Orthonormal factors orthogonal to the acoustic ones. Each unit factor in turn loses its part along those before it,
 * so the k-th sum sets one repeat against the later ones.
 */
function complement(acoustic: readonly AcousticPattern[], touched: readonly number[]): Factors[] {
  const n = touched.length;
  const done: Factors[] = acoustic.map(({ terms }) => {
    const z: Factors = { re: new Float64Array(n), im: new Float64Array(n) };
    for (const t of terms) {
      const k = touched.indexOf(t.pattern);
      z.re[k] = t.factor;
      z.im[k] = t.turned;
    }
    return z;
  });
  for (let k = 0; k < n; k++) {
    const z: Factors = { re: new Float64Array(n), im: new Float64Array(n) };
    z.re[k] = 1;
    for (const u of done) subtractPart(z, u, k);
    const square = z.re.reduce((sum, e, j) => sum + e * e + z.im[j]! ** 2, 0);
    if (square < NOTHING) continue;
    const length = Math.sqrt(square);
    for (let j = 0; j < n; j++) {
      z.re[j] = z.re[j]! / length;
      z.im[j] = z.im[j]! / length;
    }
    done.push(z);
  }
  return done.slice(acoustic.length);
}

/** Takes off the part along u that the k-th unit factor has. */
function subtractPart(z: Factors, u: Factors, k: number): void {
  const [a, b] = [u.re[k]!, -u.im[k]!];
  if (a === 0 && b === 0) return;
  for (let j = 0; j < z.re.length; j++) {
    z.re[j] = z.re[j]! - (u.re[j]! * a - u.im[j]! * b);
    z.im[j] = z.im[j]! - (u.re[j]! * b + u.im[j]! * a);
  }
}

function summed({ patterns, atoms }: ModePatterns, touched: readonly number[], { re, im }: Factors): ModePattern {
  const { irrep, partners: model } = patterns[touched[0]!]!;
  const sums = model.map(() => new Float64Array(3 * atoms.length));
  const moved = new Set<number>();
  const sites = new Set<number>();
  touched.forEach((index, r) => {
    if (Math.abs(re[r]!) < NOTHING && Math.abs(im[r]!) < NOTHING) return;
    const p = patterns[index]!;
    for (const site of p.sites) sites.add(site);
    p.atoms.forEach((atom, k) => {
      moved.add(atom);
      for (let q = 0; q < sums.length; q++) {
        for (let c = 0; c < 3; c++) {
          const turned = im[r] === 0 ? 0 : im[r]! * (q === 0 ? p.partners[1]! : p.partners[0]!)[3 * k + c]!;
          sums[q]![3 * atom + c]! += re[r]! * p.partners[q]![3 * k + c]! + (q === 0 ? turned : -turned);
        }
      }
    });
  });
  const list = [...moved].sort((a, b) => a - b);
  const partners = sums.map((s) => list.flatMap((atom) => [s[3 * atom]!, s[3 * atom + 1]!, s[3 * atom + 2]!]));
  return { irrep, sites: [...sites].sort((a, b) => a - b), repeat: 1, atoms: list, partners };
}

/** Repeats counted anew, within the sites that move. */
function numbered(patterns: readonly ModePattern[]): ModePattern[] {
  const counts = new Map<string, number>();
  return patterns.map((p) => {
    const key = p.sites.join();
    const repeat = (counts.get(key) ?? 0) + 1;
    counts.set(key, repeat);
    return { ...p, repeat };
  });
}
