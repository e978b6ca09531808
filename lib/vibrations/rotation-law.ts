import { formatSum } from "../representation/index.ts";
import type { Vec3 } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import { type LetterSum, scatteringOf } from "./raman-scattering.ts";

/** The amplitude of one partner while the crystal turns by phi about the light; sums of letters, `0` for none. */
export interface AngleLaw {
  /** Of cos^2 phi, sin 2 phi and sin^2 phi: polarisers parallel. */
  readonly parallel: readonly [string, string, string];
  /** Of cos 2 phi and sin 2 phi: polarisers crossed. */
  readonly crossed: readonly [string, string];
}

/** How a species scatters at any angle: its intensity is the sum of the squares of the partners' amplitudes. */
export interface RotationLaw {
  readonly label: string;
  readonly partners: readonly AngleLaw[];
}

/**
 * Backscattered amplitudes against the angle in letters: with e = (cos phi, sin phi) and its perpendicular in the face, e R e
 * and e' R e for the symmetric tensor R of each partner. Species that do not show at any angle are left out.
 * @param zero polarisation at angle 0; @param ninety at 90 degrees; unit vectors in the frame
 */
export function rotationLaws(tensors: CrystalTensors, k: Vec3, zero: Vec3, ninety: Vec3): RotationLaw[] {
  const back: Vec3 = [-k[0], -k[1], -k[2]];
  const amplitudes = (ei: Vec3, es: Vec3) => scatteringOf(tensors, { text: "", ki: k, ei, es, ks: back, q: k });
  const [uu, uv, vv] = [amplitudes(zero, zero), amplitudes(zero, ninety), amplitudes(ninety, ninety)];
  return tensors.raman.flatMap(({ label, letters, partners }) => {
    const of = (found: ReturnType<typeof amplitudes>, partner: number): LetterSum =>
      found.find((s) => s.form.label === label)?.amplitudes[partner] ?? letters.map(() => 0);
    const write = (sum: LetterSum) => formatSum(sum, letters, "0");
    const laws = partners.map((_, p): AngleLaw => {
      const [a, b, c] = [of(uu, p), of(uv, p), of(vv, p)];
      const half = a.map((e, l) => (c[l]! - e) / 2);
      return { parallel: [write(a), write(b), write(c)], crossed: [write(b), write(half)] };
    });
    const shown = laws.filter((law) => [...law.parallel, ...law.crossed].some((e) => e !== "0"));
    return shown.length > 0 ? [{ label, partners: shown }] : [];
  });
}
