import {
  addVectors,
  gcd,
  type IntVec3,
  lcm,
  mod,
  modOne,
  type RatVec3,
  subtractVectors,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { type AffineForm, imageOfForm } from "./affine-form.ts";
import { congruencesOf, formatCongruences, type Residues } from "./congruence.ts";
import { coveringAlternatives } from "./congruence-cover.ts";
import { type Stratum, strataOf } from "./reciprocal-strata.ts";
import {
  type Characters,
  generalCharacters,
  meetsConditions,
  type ReflectionCondition,
} from "./reflection-conditions.ts";
import { type RootTable, rootTable } from "./roots-of-unity.ts";
import type { SpaceGroup } from "./space-group.ts";

/** An extra condition on the contribution of one position. */
export type SpecialCondition = Omit<ReflectionCondition, "cause" | "implied">;

/**
 * Extra reflection conditions of a position, beyond the general ones: for the reflections of a class, whether the sum
 * of exp(2 pi i h . x) over the orbit of a generic point of the position vanishes identically. Only those that do not
 * follow from wider classes. Exact, by integer arithmetic in the cyclotomic field.
 * @param form the position in the cell of the group; its origin does not matter
 * Source: International Tables for Crystallography A (2016), section 2.1.3.13 (ii).
 */
export function specialConditions(group: SpaceGroup, form: AffineForm): SpecialCondition[] {
  const cyclic = group.representatives.some(({ W }) => W.join() === "0,0,1,1,0,0,0,1,0");
  const orbit = pointsOf(group, form);
  const found: SpecialCondition[] = [];
  for (const stratum of strataOf(group)) {
    const general = smallest(generalCharacters(group, stratum), orbit);
    const present = presentResidues(orbit, stratum, general);
    if (!present) continue;
    const expected = present.all.filter((m) => meetsConditions(found, group, reflection(stratum, m)));
    if (expected.length === present.kept.length) continue;
    found.push(condition(stratum, present, general, cyclic));
  }
  return found;
}

/** The characters over the smallest modulus that serves them and the differences between the points. */
function smallest({ characters, N }: Characters, orbit: readonly OrbitPoint[]): Characters {
  const g = characters.flat().reduce((a, b) => gcd(a, b), N);
  const least = orbit.reduce((m, p) => lcm(m, p.t.d), N / g);
  return { characters: characters.map((c) => c.map((e) => (e / g) * (least / (N / g)))), N: least };
}

interface OrbitPoint {
  /** Columns: how the point moves with the letters. */
  readonly directions: readonly IntVec3[];
  /** Relative to the first point, since a common phase does not matter. */
  readonly t: RatVec3;
}

/** Points of the orbit modulo all translations: centrings only repeat the general integral condition. */
function pointsOf(group: SpaceGroup, form: AffineForm): OrbitPoint[] {
  const points: OrbitPoint[] = [];
  const seen = new Set<string>();
  for (const a of group.representatives) {
    const { M, t } = imageOfForm(a, form);
    const linear = M.n.join();
    if (seen.has(pointKey(linear, t, ZERO_VECTOR))) continue;
    for (const c of group.centrings) seen.add(pointKey(linear, t, c));
    points.push({ directions: [0, 1, 2].map((j): IntVec3 => [M.n[j]!, M.n[3 + j]!, M.n[6 + j]!]), t });
  }
  return points.map((p) => ({ directions: p.directions, t: subtractVectors(p.t, points[0]!.t) }));
}

function pointKey(linear: string, t: RatVec3, shift: RatVec3): string {
  const { n, d } = modOne(addVectors(t, shift));
  return `${linear}|${n.join()}/${d}`;
}

interface Present {
  /** Residues modulo N that meet the general conditions. */
  readonly all: readonly Residues[];
  /** Those to which the position contributes. */
  readonly kept: readonly Residues[];
}

/** What a generic reflection of the class, by its residues, gets from the position; null if always something. */
function presentResidues(
  orbit: readonly OrbitPoint[],
  stratum: Stratum,
  { characters, N }: Characters,
): Present | null {
  // points whose phase varies alike on the whole class add up; different ones cannot cancel for generic parameters
  const alike = new Map<string, number[][]>();
  for (const { directions, t } of orbit) {
    const key = stratum.basis.map((h) => directions.map((v) => dot(h, v)).join()).join(";");
    const phase = stratum.basis.map((h) => mod(dot(h, t.n) * (N / t.d), N));
    alike.set(key, [...(alike.get(key) ?? []), phase]);
  }
  const sums = [...alike.values()];
  if (sums.some((phases) => phases.length === 1)) return null;
  const roots = rootTable(N);
  const all = residues(N, stratum.basis.length).filter((m) => characters.every((c) => mod(dotAny(c, m), N) === 0));
  const kept = all.filter((m) => sums.some((phases) => !vanishes(phases, m, roots)));
  return { all, kept };
}

function vanishes(phases: readonly (readonly number[])[], m: Residues, { N, degree, rows }: RootTable): boolean {
  const sum = new Array<number>(degree).fill(0);
  for (const phase of phases) {
    const row = rows[mod(dotAny(phase, m), N)]!;
    for (let i = 0; i < degree; i++) sum[i]! += row[i]!;
  }
  return sum.every((e) => e === 0);
}

function residues(N: number, r: number): number[][] {
  let all: number[][] = [[]];
  for (let i = 0; i < r; i++) all = all.flatMap((m) => Array.from({ length: N }, (_, k) => [...m, k]));
  return all;
}

/** The reflection with these coordinates in the class. */
function reflection({ basis }: Stratum, m: Residues): IntVec3 {
  const at = (i: number) => basis.reduce((sum, b, j) => sum + b[i]! * m[j]!, 0);
  return [at(0), at(1), at(2)];
}

function condition(
  stratum: Stratum,
  { all, kept }: Present,
  { characters, N }: Characters,
  cyclic: boolean,
): SpecialCondition {
  const r = stratum.basis.length;
  const { name: reflections, letters } = stratum;
  const trivial = residues(N, r).filter((c) => kept.every((m) => mod(dotAny(c, m), N) === 0));
  if (kept.length * trivial.length === N ** r) {
    const congruences = congruencesOf(trivial, N, characters);
    return { reflections, condition: formatCongruences(congruences, letters), stratum, alternatives: [congruences] };
  }
  const permuted = cyclic && r === 3;
  const cover = coveringAlternatives(all, kept, characters, N, permuted);
  const text = cover.shown.map((list) => formatCongruences(list, letters, " and ")).join(" or ");
  const note = cover.shown.length < cover.alternatives.length ? " (h, k, l cyclically permutable)" : "";
  return { reflections, condition: text + note, stratum, alternatives: cover.alternatives };
}

function dot(a: IntVec3, b: IntVec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

function dotAny(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, e, i) => sum + e * b[i]!, 0);
}
