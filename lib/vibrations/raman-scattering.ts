import type { PartnerTensor, TensorForm } from "../representation/index.ts";
import type { Vec3 } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import type { ScatteringGeometry } from "./scattering-geometry.ts";

/** A sum over the letters of a tensor form, one coefficient per letter. */
export type LetterSum = readonly number[];

/** How a polar species appears: its dipole along the phonon's wavevector, across it, or at an angle to it. */
export type PolarPart = "LO" | "TO" | "oblique" | "undetermined";

/** What one species shows in one geometry. */
export interface SpeciesScattering {
  readonly form: TensorForm;
  /** es . R . ei of each partner, as coefficients of the letters. */
  readonly amplitudes: readonly LetterSum[];
  /** Components of the tensor that the two polarisations see: `xy`, `xx`; weighted by their products. */
  readonly components: readonly string[];
  /** Null for a species without dipole, and in forward scattering. */
  readonly polar: { readonly part: PolarPart; readonly longitudinal: LetterSum } | null;
}

/** Coefficients below this come from rounding, not from a tensor. Dimensionless. */
const NOTHING = 1e-9;

const AXES = ["x", "y", "z"] as const;

/** Species that scatter in a geometry, with the amplitude of each partner. */
export function scatteringOf(tensors: CrystalTensors, geometry: ScatteringGeometry): SpeciesScattering[] {
  const weights = componentWeights(geometry.ei, geometry.es);
  return tensors.raman.flatMap((form) => {
    const amplitudes = form.partners.map((partner) =>
      form.letters.map((_, l) => tidy(weights.reduce((s, w, c) => s + w * partner.coefficients[c]![l]!, 0))),
    );
    if (amplitudes.every((a) => a.every((e) => e === 0))) return [];
    const dipole = tensors.dipoles.find((d) => d.irrep === form.irrep) ?? null;
    const polar = dipole && geometry.q ? polarPart(dipole, geometry.q, amplitudes) : null;
    return [{ form, amplitudes, components: seenComponents(form, weights), polar }];
  });
}

/** Weight of xx, xy, xz, yy, yz, zz in es . R . ei for a symmetric R. */
function componentWeights(ei: Vec3, es: Vec3): number[] {
  const out: number[] = [];
  for (let i = 0; i < 3; i++) {
    for (let j = i; j < 3; j++) out.push(es[i]! * ei[j]! + (i === j ? 0 : es[j]! * ei[i]!));
  }
  return out;
}

/** Names of the components that carry weight and are not zero in this species. */
function seenComponents(form: TensorForm, weights: readonly number[]): string[] {
  const names = AXES.flatMap((a, i) => AXES.slice(i).map((b) => a + b));
  return names.filter(
    (_, c) =>
      Math.abs(weights[c]!) > NOTHING &&
      form.partners.some((p) => p.coefficients[c]!.some((e) => Math.abs(e) > NOTHING)),
  );
}

/**
 * Splits a polar species by the direction of its dipole against q. With one free letter the dipoles of the partners
 * are fixed by symmetry; the partner that moves along q is the longitudinal one, those across it are transverse. With
 * several letters the dipole can turn in a plane or in space, and symmetry alone does not tell.
 */
function polarPart(dipole: TensorForm, q: Vec3, amplitudes: readonly LetterSum[]): SpeciesScattering["polar"] {
  const letters = amplitudes[0]!.length;
  const nothing: LetterSum = new Array(letters).fill(0);
  const across = dipole.letters.every((_, l) => dipole.partners.every((p) => Math.abs(alongWave(p, l, q)) < NOTHING));
  if (across) return { part: "TO", longitudinal: nothing };
  if (dipole.letters.length > 1) return { part: "undetermined", longitudinal: nothing };
  const along = dipole.partners.map((p) => alongWave(p, 0, q));
  const longitudinal = Array.from({ length: letters }, (_, l) =>
    tidy(along.reduce((s, a, p) => s + a * amplitudes[p]![l]!, 0)),
  );
  const total = strength(amplitudes);
  const lo = strength([longitudinal]);
  if (lo < NOTHING * total) return { part: "TO", longitudinal }; // what scatters moves across q, whatever its direction
  const share = along.reduce((s, a) => s + a * a, 0);
  if (share < 1 - 1e-6) return { part: "oblique", longitudinal };
  return { part: lo > (1 - 1e-6) * total ? "LO" : "oblique", longitudinal };
}

/** Cosine between the dipole of a partner, with one letter alone, and the wavevector; 0 where that dipole is nothing. */
function alongWave({ coefficients }: PartnerTensor, letter: number, q: Vec3): number {
  const d = coefficients.map((row) => row[letter]!);
  const length = Math.hypot(...d);
  return length < NOTHING ? 0 : (d[0]! * q[0] + d[1]! * q[1] + d[2]! * q[2]) / length;
}

/** Sum of the squares of all coefficients: a measure of what is there, whatever the letters are. */
function strength(amplitudes: readonly LetterSum[]): number {
  return amplitudes.reduce((s, a) => s + a.reduce((t, e) => t + e * e, 0), 0);
}

function tidy(x: number): number {
  const nearest = Math.round(x);
  if (Math.abs(x - nearest) < NOTHING) return nearest + 0;
  return x;
}

/** Scattered intensity of a species for given values of its letters: the sum of squares over its partners. */
export function intensityOf(scattering: Pick<SpeciesScattering, "amplitudes">, letters: readonly number[]): number {
  return scattering.amplitudes.reduce((s, a) => s + a.reduce((t, e, l) => t + e * (letters[l] ?? 0), 0) ** 2, 0);
}
