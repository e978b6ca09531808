import type { AcousticPattern, ModePattern, ModePatterns } from "./mode-patterns.ts";

/** What is left of a unit factor is nothing if its square is below this; dimensionless. */
const NOTHING = 1e-9;

/**
 * The patterns without the rigid translations: in every species that holds some, the repeats that take part in them
 * are replaced by orthonormal sums orthogonal to them, one fewer for every translation. First come sums within each
 * site, in which the mean of its atoms rests, then rigid motions of the atoms of one site against those of the later
 * ones. Repeats that take no part stay. All displacements of an optic pattern add up to 0, so the mean of the atoms
 * rests (not the centre of mass: patterns carry no masses).
 */
export function opticPatterns(all: ModePatterns): ModePattern[] {
  return all.group.irreps.flatMap((_, irrep) => {
    const acoustic = all.acoustic.filter((a) => a.irrep === irrep);
    const involved = new Set(acoustic.flatMap((a) => a.terms.map((t) => t.pattern)));
    const untouched = all.patterns.filter((p, index) => p.irrep === irrep && !involved.has(index));
    const touched = [...involved].sort((a, b) => a - b);
    const sums = [...withinSites(all, acoustic, touched), ...betweenSites(all, acoustic, touched)];
    return numbered([...untouched, ...sums.map((z) => summed(all, touched, z))]);
  });
}

/** Factors of a sum over some patterns: real and imaginary parts, where i is the quarter turn of the partners. */
interface Factors {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const noFactors = (n: number): Factors => ({ re: new Float64Array(n), im: new Float64Array(n) });

/** A rigid translation of the atoms of some sites, of length 1, and its share of the whole translation. */
function rigidPart(
  { patterns }: ModePatterns,
  { terms }: AcousticPattern,
  touched: readonly number[],
  site: number,
): { z: Factors; share: number } {
  const z = noFactors(touched.length);
  const own = terms.filter((t) => patterns[t.pattern]!.sites[0] === site);
  const share = Math.sqrt(own.reduce((sum, t) => sum + t.factor ** 2 + t.turned ** 2, 0));
  for (const t of own) {
    const k = touched.indexOf(t.pattern);
    z.re[k] = t.factor / share;
    z.im[k] = t.turned / share;
  }
  return { z, share };
}

/** Sums over the repeats of one site orthogonal to its rigid translations. */
function withinSites(all: ModePatterns, acoustic: readonly AcousticPattern[], touched: readonly number[]): Factors[] {
  return sitesOf(all, touched).flatMap((site) => {
    const rigid = acoustic.map((a) => rigidPart(all, a, touched, site).z);
    const own = touched.flatMap((index, k) => (all.patterns[index]!.sites[0] === site ? [k] : []));
    return complement(rigid, own, touched.length);
  });
}

/** Rigid translations of whole sites against each other. */
function betweenSites(all: ModePatterns, acoustic: readonly AcousticPattern[], touched: readonly number[]): Factors[] {
  const sites = sitesOf(all, touched);
  return acoustic.flatMap((a) => {
    const parts = sites.map((site) => rigidPart(all, a, touched, site));
    const whole: Factors = { re: Float64Array.from(parts, (p) => p.share), im: new Float64Array(sites.length) };
    const against = complement([whole], [...sites.keys()], sites.length);
    return against.map((factors) => {
      const z = noFactors(touched.length);
      parts.forEach((p, s) => {
        for (let k = 0; k < touched.length; k++) {
          z.re[k]! += factors.re[s]! * p.z.re[k]!;
          z.im[k]! += factors.re[s]! * p.z.im[k]!;
        }
      });
      return z;
    });
  });
}

function sitesOf({ patterns }: ModePatterns, touched: readonly number[]): number[] {
  return [...new Set(touched.map((index) => patterns[index]!.sites[0]!))].sort((a, b) => a - b);
}

/**
 * Orthonormal factors orthogonal to those given, out of some unit factors. Each unit factor in turn loses its part
 * along those before it, so the k-th sum sets one of them against the later ones.
 */
function complement(given: readonly Factors[], units: readonly number[], n: number): Factors[] {
  const done = [...given];
  for (const k of units) {
    const z = noFactors(n);
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
  return done.slice(given.length);
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
