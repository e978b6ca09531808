import type { IntVec3, RatMat3 } from "../algebra/index.ts";
import { groupProperties } from "../symmetry/index.ts";
import type { Crystal } from "./crystal.ts";

/**
 * Told where two structures have one polar axis each and the second counts along it the other way than the first.
 * @param P x(first) = P x(second) + p
 */
export function polarSenseNotes(first: Crystal, second: Crystal, P: RatMat3): string[] {
  const [own, other] = [onlyPolarAxis(first), onlyPolarAxis(second)];
  if (!own || !other) return [];
  const along = [0, 3, 6].map((i) => P.n[i]! * other[0] + P.n[i + 1]! * other[1] + P.n[i + 2]! * other[2]);
  const square = own[0] ** 2 + own[1] ** 2 + own[2] ** 2;
  const dot = own.reduce((s, e, i) => s + e * along[i]!, 0);
  const isParallel = own.every((e, i) => e * dot === along[i]! * square);
  if (!isParallel || dot >= 0) return [];
  const reversed = own.map((e) => -e + 0) as unknown as IntVec3;
  return [`the polar axis is reversed: ${text(other)} of the second file points along ${text(reversed)} of the first`];
}

function onlyPolarAxis({ identified, group }: Crystal): IntVec3 | null {
  const [axis, ...others] = groupProperties(identified.number, group.operations).polarDirections;
  return axis && others.length === 0 ? axis : null;
}

function text(direction: IntVec3): string {
  return `[${direction.join(" ")}]`;
}
