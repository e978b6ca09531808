import {
  applyRow,
  determinant,
  hermiteRows,
  type IntMat3,
  type IntVec3,
  integerNullspace,
  negate,
  rational,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { formThrough } from "./affine-form.ts";
import { formatExpression } from "./affine-text.ts";
import type { SpaceGroup } from "./space-group.ts";

/** A class of reflections for which a condition may hold: all of them, or those in a zone or on a row of the lattice. */
export interface Stratum {
  /** `hkl`, `h0l`, `hhl`, `00l`; with four indices `hkil`, `h-h0l`, `hh(-2h)l`, `000l`. */
  readonly name: string;
  /** The letters among h, k, l that vary freely, by their places 0, 1, 2. */
  readonly letters: readonly number[];
  /** For each letter, the reflection that has 1 for it and 0 for the others; a basis of the class. */
  readonly basis: readonly IntVec3[];
  /** True where the letters are the indices at their places, as in every conventional cell. */
  readonly plain: boolean;
  /** Key shared by equal classes. */
  readonly key: string;
}

/**
 * Classes of reflections that some rotation part or its negative leaves fixed (h W = h), one of each set of equivalent
 * ones, named as International Tables prefer; all reflections first, then zones, then rows.
 * @param rotations all rotation parts of the group
 * @param fourIndices true to write i = -h-k, on hexagonal axes
 */
function reciprocalStrata(rotations: readonly IntMat3[], fourIndices: boolean): Stratum[] {
  const found = new Map<string, readonly IntVec3[]>();
  for (const W of rotations.flatMap((m) => [m, negate(m)])) {
    const fixed = fixedReflections(W);
    if (fixed.length > 0) found.set(keyOf(fixed), fixed);
  }
  const chosen: Stratum[] = [];
  const done = new Set<string>();
  for (const [key, fixed] of found) {
    if (done.has(key)) continue;
    const images = new Map(
      rotations.map((W) => {
        const image = fixed.map((h) => applyRow(h, W));
        return [keyOf(image), image] as const;
      }),
    );
    for (const k of images.keys()) done.add(k);
    const named = [...images.values()].map((basis) => stratum(basis, fourIndices));
    chosen.push(named.sort((a, b) => rank(a, fourIndices) - rank(b, fourIndices) || (a.name < b.name ? -1 : 1))[0]!);
  }
  return chosen.sort((a, b) => b.basis.length - a.basis.length || order(a) - order(b) || (a.name < b.name ? -1 : 1));
}

const cache = new WeakMap<SpaceGroup, readonly Stratum[]>();

/** The classes of reflections of a group, computed once. */
export function strataOf(group: SpaceGroup): readonly Stratum[] {
  const known = cache.get(group);
  if (known) return known;
  const rotations = group.representatives.map((a) => a.W);
  const fresh = reciprocalStrata(rotations, onHexagonalAxes(rotations));
  cache.set(group, fresh);
  return fresh;
}

/** Whether hexagonal axes are in use: a threefold rotation about c that carries a onto b or -a-b. */
export function onHexagonalAxes(rotations: readonly IntMat3[]): boolean {
  return rotations.some((W) => W.join() === "0,-1,0,1,-1,0,0,0,1");
}

/** Basis of the integer rows h with h W = h. */
function fixedReflections(W: IntMat3): IntVec3[] {
  const equations = [0, 1, 2].map((j) => [0, 1, 2].map((i) => W[3 * i + j]! - (i === j ? 1 : 0)));
  return integerNullspace(equations, 3) as unknown as IntVec3[];
}

function keyOf(basis: readonly IntVec3[]): string {
  return hermiteRows(basis).join(";");
}

function stratum(basis: readonly IntVec3[], fourIndices: boolean): Stratum {
  const { M } = formThrough(ZERO_VECTOR, basis);
  const columns = [0, 1, 2].map((j): IntVec3 => [M.n[j]!, M.n[3 + j]!, M.n[6 + j]!]);
  const letters = [0, 1, 2].filter((j) => columns[j]!.some((e) => e !== 0));
  // in a skew cell no index may be free by itself: the letters then count basis vectors, `(2h)(3h)0`
  const own = M.d === 1 ? letters.map((j) => columns[j]!) : [...basis];
  const coefficient = (i: number, letter: number) => own[letters.indexOf(letter)]?.[i] ?? 0;
  const indices = [0, 1, 2].map((i): IntVec3 => [coefficient(i, 0), coefficient(i, 1), coefficient(i, 2)]);
  const third = indices[0]!.map((e, j) => -e - indices[1]![j]! + 0) as unknown as IntVec3;
  const shown = fourIndices ? [indices[0]!, indices[1]!, third, indices[2]!] : indices;
  return { name: shown.map(indexText).join(""), letters, basis: own, plain: M.d === 1, key: keyOf(basis) };
}

function indexText(e: IntVec3): string {
  if (e[0] === -1 && e[1] === -1 && e[2] === 0) return "i";
  const text = formatExpression(
    { coefficients: [rational(e[0]), rational(e[1]), rational(e[2])], constant: rational(0) },
    "hkl",
  );
  return /^-?[hkl0]$/.test(text) ? text : `(${text})`;
}

const PREFERRED = ["hkl", "0kl", "h0l", "hk0", "hhl", "h-hl", "h00", "0k0", "00l", "hh0", "h-h0", "hhh"];
const PREFERRED_FOUR = ["hkil", "h-h0l", "hh(-2h)l", "hki0", "000l", "h-h00", "hh(-2h)0"];

function rank(s: Stratum, fourIndices: boolean): number {
  const at = (fourIndices ? PREFERRED_FOUR : PREFERRED).indexOf(s.name);
  return at < 0 ? 99 : at;
}

function order(s: Stratum): number {
  const at = [...PREFERRED, ...PREFERRED_FOUR].indexOf(s.name);
  return at < 0 ? 99 : at;
}

/** Coordinates of a reflection in the basis of the class, or null where it does not belong to the class. */
export function coordinatesIn({ basis, letters, plain }: Stratum, h: IntVec3): number[] | null {
  const m = plain ? letters.map((i) => h[i]!) : solve(basis, h);
  for (let i = 0; i < 3; i++) {
    let sum = 0;
    for (let j = 0; j < m.length; j++) sum += basis[j]![i]! * m[j]!;
    if (sum !== h[i]) return null;
  }
  return m;
}

/** Solution of m . basis = h from as many of its equations as there are unknowns; to be checked in the others. */
function solve(basis: readonly IntVec3[], h: IntVec3): number[] {
  const [u, v, w] = basis;
  if (!u) return [];
  if (!v) {
    const i = u.findIndex((e) => e !== 0);
    return [h[i]! / u[i]!];
  }
  if (w) return [det3(h, v, w) / det3(u, v, w), det3(u, h, w) / det3(u, v, w), det3(u, v, h) / det3(u, v, w)];
  const pairs = [
    [0, 1],
    [0, 2],
    [1, 2],
  ] as const;
  const [i, j] = pairs.find(([a, b]) => u[a] * v[b] !== u[b] * v[a])!;
  const det = u[i] * v[j] - u[j] * v[i];
  return [(h[i] * v[j] - h[j] * v[i]) / det, (u[i] * h[j] - u[j] * h[i]) / det];
}

function det3(a: IntVec3, b: IntVec3, c: IntVec3): number {
  return determinant([...a, ...b, ...c]);
}
