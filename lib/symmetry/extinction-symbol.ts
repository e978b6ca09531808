import { equal, IDENTITY, type IntMat3, type IntVec3, ratVec3, transformVector } from "../algebra/index.ts";
import { signedOrder } from "./geometric-class.ts";
import { type DirectionSystem, directionSystem, splitSymbol, symmetryDirections } from "./hermann-mauguin-symbol.ts";
import { independentConditions, reflectionConditions } from "./reflection-conditions.ts";
import { rotationType } from "./rotation-type.ts";
import type { Setting } from "./settings.ts";
import type { SpaceGroup } from "./space-group.ts";

/** A symmetry direction as it shows in the absences: independent conditions on its axis row and on its plane's zone. */
interface Traces {
  row: boolean;
  zone: boolean;
}

/**
 * Extinction symbol of a setting: lattice letter, then for each symmetry direction the screw axis and the glide plane
 * that bring about conditions of their own, or `-`: `P 1 21/c 1`, `P n a -`, `I - - (ab)`, `P 41 - -`, `R(obv) - c`.
 * Groups with the same absences share it.
 * @param group the operations of the setting
 * Source: International Tables for Crystallography A (2005), section 3.1.3; A (2016), section 1.6.4 (from memory).
 */
export function extinctionSymbol(setting: Setting, group: SpaceGroup): string {
  const system = directionSystem(setting.number);
  const { lattice, parts } = splitSymbol(setting.hermannMauguin.full);
  if (system === "triclinic") return `${lattice} -`;
  const rhombohedral = setting.choice === "R";
  const directions = symmetryDirections(system, rhombohedral);
  const traces = tracesOf(group, directions);
  const glides = traces.filter((t) => t.zone).length;
  const words = directions.map((_, i) => {
    const part = parts[i];
    if (system === "monoclinic" && part?.axis === "1") return "1";
    const { row, zone } = traces[i]!;
    const screw = row && part?.axis ? leastScrew(part.axis) : "";
    const bodyCentred = system === "orthorhombic" && lattice === "I" && glides === 1;
    const glide = zone && part?.plane ? planeWord(part.plane, setting, i, bodyCentred) : "";
    return [screw, glide].filter((w) => w !== "").join("/") || "-";
  });
  return [latticeWord(lattice, system, setting), ...words].join(" ");
}

function latticeWord(lattice: string, system: DirectionSystem, { choice }: Setting): string {
  if (system !== "rhombohedral" || choice === "R") return lattice;
  return choice === "H-reverse" ? `${lattice}(rev)` : `${lattice}(obv)`;
}

/** Axes that turn the other way have the same absences: 43 is written 41, 65 61, 64 62, 32 31. */
function leastScrew(axis: string): string {
  const [order, index] = [Number(axis[0]), Number(axis[1])];
  return axis.length === 2 && index > 0 ? `${order}${Math.min(index, order - index)}` : axis;
}

/** Planes that are glide planes with two vectors, or alternate with such, are written with both letters: `(ab)`. */
function planeWord(letter: string, setting: Setting, direction: number, bodyCentred: boolean): string {
  if (letter === "e") return `(${setting.planeLetters[direction]!.filter((l) => l !== "e").join("")})`;
  if (bodyCentred) return `(${["bc", "ac", "ab"][direction]})`;
  return letter;
}

/** For each symmetry direction the independent conditions that its elements bring about. */
function tracesOf(group: SpaceGroup, directions: readonly IntVec3[]): Traces[] {
  const traces = directions.map((): Traces => ({ row: false, zone: false }));
  for (const { stratum } of independentConditions(reflectionConditions(group))) {
    const size = stratum.basis.length;
    if (size === 3) continue;
    for (const { W } of group.representatives) {
      if (equal(W, IDENTITY) || !stratum.basis.every((h) => keeps(W, h))) continue;
      const mirror = signedOrder(W) === -2;
      if (mirror !== (size === 2)) continue;
      const { axis } = rotationType(W);
      const i = directions.findIndex((d) => axis && equivalent(group, axis, d));
      if (i >= 0) traces[i]![mirror ? "zone" : "row"] = true;
    }
  }
  return traces;
}

function keeps(W: IntMat3, [h, k, l]: IntVec3): boolean {
  return [0, 1, 2].every((j) => h * W[j]! + k * W[3 + j]! + l * W[6 + j]! === [h, k, l][j]);
}

/** Whether some operation carries one direction onto the other or its opposite. */
function equivalent(group: SpaceGroup, axis: IntVec3, direction: IntVec3): boolean {
  return group.representatives.some(({ W }) => {
    const { n } = transformVector({ n: W, d: 1 }, ratVec3(axis));
    return n.join() === direction.join() || n.map((e) => -e + 0).join() === direction.join();
  });
}
