import type { Vec3 } from "../structure/index.ts";
import type { CrystalTensors } from "./crystal-tensors.ts";
import { intensityOf, scatteringOf } from "./raman-scattering.ts";
import { type RotationLaw, rotationLaws } from "./rotation-law.ts";
import type { ScatteringGeometry } from "./scattering-geometry.ts";

/** Intensities of one species while the crystal turns about the light; one value per angle. */
export interface RotationCurve {
  readonly label: string;
  readonly parallel: readonly number[];
  readonly crossed: readonly number[];
}

export interface RotationTable {
  /** Degrees, from the first polarisation towards the second. */
  readonly angles: readonly number[];
  readonly curves: readonly RotationCurve[];
  /** The same in letters. */
  readonly laws: readonly RotationLaw[];
}

/**
 * Backscattered intensity against the angle of the polarisation in the face, for polarisers parallel and crossed. The
 * letters of the tensors are measured quantities; their values must be given.
 * @param k direction of the light, unit vector in the frame
 * @param zero polarisation at angle 0, perpendicular to k
 * @param step degrees, divides 180
 */
export function rotationTable(
  tensors: CrystalTensors,
  k: Vec3,
  zero: Vec3,
  letters: ReadonlyMap<string, number>,
  step: number,
): RotationTable {
  const ninety: Vec3 = [
    k[1] * zero[2] - k[2] * zero[1],
    k[2] * zero[0] - k[0] * zero[2],
    k[0] * zero[1] - k[1] * zero[0],
  ];
  const angles = Array.from({ length: Math.floor(180 / step) + 1 }, (_, i) => i * step);
  const at = (degrees: number): Vec3 => {
    const [c, s] = [Math.cos((degrees * Math.PI) / 180), Math.sin((degrees * Math.PI) / 180)];
    return [0, 1, 2].map((i) => c * zero[i]! + s * ninety[i]!) as unknown as Vec3;
  };
  const back: Vec3 = [-k[0], -k[1], -k[2]];
  const shown = (label: string, turn: number) =>
    angles.map((angle) => {
      const geometry: ScatteringGeometry = { text: "", ki: k, ei: at(angle), es: at(angle + turn), ks: back, q: k };
      const found = scatteringOf(tensors, geometry).find((s) => s.form.label === label);
      return found
        ? intensityOf(
            found,
            found.form.letters.map((l) => letters.get(l) ?? 1),
          )
        : 0;
    });
  const curves = tensors.raman.map(({ label }) => ({ label, parallel: shown(label, 0), crossed: shown(label, 90) }));
  return { angles, curves, laws: rotationLaws(tensors, k, zero, ninety) };
}
