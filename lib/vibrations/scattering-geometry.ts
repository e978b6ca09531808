import { InputProblem } from "../problem.ts";
import { type CrystalFrame, directionVector, planeNormal, type Vec3 } from "../structure/index.ts";
import {
  formatDirection,
  formatGeometry,
  parseGeometry,
  type WrittenDirection,
  type WrittenGeometry,
} from "./geometry-text.ts";

/** A scattering geometry in the Cartesian frame of a crystal; all vectors of length 1. */
export interface ScatteringGeometry {
  /** As written, in Porto's notation. */
  readonly text: string;
  /** Direction in which the incident light runs inside the crystal. */
  readonly ki: Vec3;
  readonly ei: Vec3;
  readonly es: Vec3;
  readonly ks: Vec3;
  /** Direction of the phonon's wavevector, ki - ks; null for forward scattering, where it is too short to matter. */
  readonly q: Vec3 | null;
}

/**
 * Largest cosine between light and its polarisation that is put down to rounded indices; half a degree. Dimensionless.
 */
const TRANSVERSE_TOLERANCE = 0.009;

/** @throws InputProblem `geometry-unreadable`, or `polarisation-longitudinal` where light is not transverse */
export function scatteringGeometry(text: string, frame: CrystalFrame): ScatteringGeometry {
  return placeGeometry(parseGeometry(text), frame);
}

export function placeGeometry(written: WrittenGeometry, frame: CrystalFrame): ScatteringGeometry {
  const text = formatGeometry(written);
  const [ki, ei, es, ks] = [
    written.incident,
    written.incidentPolarisation,
    written.scatteredPolarisation,
    written.scattered,
  ].map((d) => vectorOf(d, frame)) as [Vec3, Vec3, Vec3, Vec3];
  requireTransverse(text, "incident", written.incident, ki, written.incidentPolarisation, ei);
  requireTransverse(text, "scattered", written.scattered, ks, written.scatteredPolarisation, es);
  const difference: Vec3 = [ki[0] - ks[0], ki[1] - ks[1], ki[2] - ks[2]];
  const length = Math.hypot(...difference);
  const q: Vec3 | null =
    length < 1e-6 ? null : [difference[0] / length, difference[1] / length, difference[2] / length];
  return { text, ki, ei, es, ks, q };
}

/** Light along a direction, its polarisation at angle 0, and the name of that polarisation. */
export interface Rotation {
  readonly k: Vec3;
  readonly e: Vec3;
  readonly zero: string;
}

/**
 * Light along `about` with polarisation `zero`, as unit vectors. Without `zero`, the first axis of the frame that is
 * perpendicular to the light, else the projection of z on the face: on the cleavage of calcite, the short diagonal.
 * @throws InputProblem as scatteringGeometry
 */
export function rotationAbout(about: WrittenDirection, zero: WrittenDirection | null, frame: CrystalFrame): Rotation {
  const k = vectorOf(about, frame);
  if (zero === null) return { k, ...usualZero(k) };
  const e = vectorOf(zero, frame);
  requireTransverse(`rotation about ${formatDirection(about)}`, "incident", about, k, zero, e);
  return { k, e, zero: formatDirection(zero) };
}

function usualZero(k: Vec3): Omit<Rotation, "k"> {
  const i = k.findIndex((cosine) => Math.abs(cosine) <= TRANSVERSE_TOLERANCE);
  if (i >= 0) return { e: [Number(i === 0), Number(i === 1), Number(i === 2)], zero: "xyz"[i]! };
  const length = Math.hypot(k[0], k[1]); // not 0, or x would be perpendicular
  return {
    e: [(-k[2] * k[0]) / length, (-k[2] * k[1]) / length, length],
    zero: "the projection of z",
  };
}

function vectorOf(d: WrittenDirection, frame: CrystalFrame): Vec3 {
  const plain = plainVector(d, frame);
  return d.negative ? [-plain[0] + 0, -plain[1] + 0, -plain[2] + 0] : plain;
}

function plainVector(d: WrittenDirection, frame: CrystalFrame): Vec3 {
  if (d.kind === "axis") return [d.axis === "x" ? 1 : 0, d.axis === "y" ? 1 : 0, d.axis === "z" ? 1 : 0];
  if (d.indices.every((i) => i === 0)) {
    throw new InputProblem(
      "geometry-unreadable",
      `${formatDirection(d)} is no direction: all its indices are 0`,
      null,
      "give at least one index other than 0",
    );
  }
  return d.kind === "direction" ? directionVector(frame, d.indices) : planeNormal(frame, d.indices);
}

function requireTransverse(
  geometry: string,
  which: string,
  light: WrittenDirection,
  k: Vec3,
  polarisation: WrittenDirection,
  e: Vec3,
): void {
  const cosine = Math.abs(k[0] * e[0] + k[1] * e[1] + k[2] * e[2]);
  if (cosine <= TRANSVERSE_TOLERANCE) return;
  const angle = ((Math.acos(Math.min(1, cosine)) * 180) / Math.PI).toFixed(1);
  throw new InputProblem(
    "polarisation-longitudinal",
    `${geometry}: ${which} light along ${formatDirection(light)} cannot be polarised along ${formatDirection(polarisation)}, which lies ${angle} degrees from it instead of 90`,
    null,
    "choose a polarisation perpendicular to the direction of the light",
  );
}
