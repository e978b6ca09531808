import {
  type IntVec3,
  inverseRatMat,
  type RatMat3,
  type RatVec3,
  ratVec3,
  transformVector,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { glideLetters, type PlaneNormal } from "./glide-letter.ts";
import {
  type DirectionSystem,
  type HermannMauguinSymbol,
  type PlaneLetter,
  type SymbolPart,
  symmetryDirections,
} from "./hermann-mauguin-symbol.ts";

/** A symbol in another setting. */
export interface CarriedSymbol extends HermannMauguinSymbol {
  /** For each part the letters that may stand for its plane: `e`, `a` and `b` may be one and the same plane. */
  readonly planeLetters: readonly (readonly PlaneLetter[])[];
  /** The symbol with a simple letter for each `e`, as it was written before 1992; null where there is no `e`. */
  readonly older: HermannMauguinSymbol | null;
}

/**
 * Carries the symbol of the reference setting to another setting: each part follows its axis or its glide vector.
 * @param P columns: the new axes in terms of the reference axes
 * @param centrings pure translations of the new setting
 * @throws RangeError if the new axes do not follow symmetry directions
 */
export function carrySymbol(
  reference: HermannMauguinSymbol,
  system: DirectionSystem,
  P: RatMat3,
  lattice: string,
  centrings: readonly RatVec3[],
): CarriedSymbol {
  if (system === "triclinic" || system === "rhombohedral") {
    const letters = reference.parts.map((part) => (part.plane ? [part.plane] : []));
    return { lattice, parts: reference.parts, planeLetters: letters, older: null };
  }
  const directions = symmetryDirections(system);
  const back = inverseRatMat(P);
  const carried = reference.parts.map((_, i) => {
    const along = transformVector(P, ratVec3(directions[i]!));
    const { part, glide } = partAlong(reference, system, along);
    if (!part.plane) return { part, older: part, letters: [] };
    const g = transformVector(back, glide);
    const letters = glideLetters(g, planeNormal(directions[i]!), centrings);
    // International Tables keep the simple letter in centred tetragonal cells: C 4/a, not C 4/e.
    const named = system === "tetragonal" && letters[0] === "e" ? letters[1]! : letters[0]!;
    const older = named === "e" ? ("abc"[g.n.findIndex((n) => n !== 0)] as PlaneLetter) : named;
    return { part: { axis: part.axis, plane: named }, older: { axis: part.axis, plane: older }, letters };
  });
  const parts = carried.map((c) => c.part);
  const named = parts.some((p) => p.plane === "e");
  return {
    lattice,
    parts,
    planeLetters: carried.map((c) => c.letters),
    older: named ? { lattice, parts: carried.map((c) => c.older) } : null,
  };
}

/** The part of the reference symbol that belongs to a direction, and the glide vector of its plane normal to it. */
function partAlong(
  reference: HermannMauguinSymbol,
  system: DirectionSystem,
  along: RatVec3,
): { part: SymbolPart; glide: RatVec3 } {
  const directions = symmetryDirections(system);
  const turns = system === "monoclinic" || system === "orthorhombic" ? 1 : 6;
  for (const [i, direction] of directions.entries()) {
    const part = reference.parts[i];
    let d = direction;
    for (let turn = 0; part && turn < turns; turn++) {
      if (parallel(along, d)) return { part, glide: turnedGlide(part, system, direction, turn) };
      d = turnAbout(system, d);
    }
  }
  // Cell choices of a monoclinic lattice move the two axes that carry no symmetry.
  if (system === "monoclinic") return { part: { axis: "1", plane: null }, glide: ZERO_VECTOR };
  throw new RangeError(`no symmetry direction along ${along.n.join(",")}`);
}

function turnedGlide(part: SymbolPart, system: DirectionSystem, direction: IntVec3, turns: number): RatVec3 {
  if (!part.plane) return ZERO_VECTOR;
  const glide = glideVector(part.plane, direction);
  let n = glide.n;
  for (let turn = 0; turn < turns; turn++) n = turnAbout(system, n);
  return { n, d: glide.d };
}

/** The rotation about c that makes directions of one kind equivalent: fourfold, sixfold, or none. */
function turnAbout(system: DirectionSystem, [x, y, z]: IntVec3): IntVec3 {
  if (system === "tetragonal" || system === "cubic") return [-y + 0, x, z];
  if (system === "hexagonal" || system === "trigonal") return [x - y, x, z];
  return [x, y, z];
}

function parallel(a: RatVec3, b: IntVec3): boolean {
  const [x, y, z] = a.n;
  return x * b[1] === y * b[0] && y * b[2] === z * b[1] && z * b[0] === x * b[2];
}

function planeNormal(direction: IntVec3): PlaneNormal {
  const axes = [0, 1, 2].filter((i) => direction[i] !== 0);
  return axes.length === 1 ? (axes[0] as 0 | 1 | 2) : "diagonal";
}

/** Glide vector that a letter stands for in a plane normal to a cell axis or to a-b, in quarters of the axes. */
function glideVector(letter: PlaneLetter, direction: IntVec3): RatVec3 {
  const normal = planeNormal(direction);
  const inPlane = (i: number) => normal === "diagonal" || i !== normal;
  const sum = (quarters: number) =>
    ratVec3([inPlane(0) ? quarters : 0, inPlane(1) ? quarters : 0, inPlane(2) ? quarters : 0], 4);
  switch (letter) {
    case "a":
      return ratVec3([2, 0, 0], 4);
    case "b":
      return ratVec3([0, 2, 0], 4);
    case "c":
      return ratVec3([0, 0, 2], 4);
    case "e":
      return normal === 0 ? ratVec3([0, 2, 0], 4) : ratVec3([2, 0, 0], 4);
    case "n":
      return sum(2);
    case "d":
      return sum(1);
    default:
      return ZERO_VECTOR;
  }
}
