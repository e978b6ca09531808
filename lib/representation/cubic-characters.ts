import type { ElementCharacter } from "./axial-characters.ts";
import type { GroupElement } from "./group-analysis.ts";
import type { GroupTable } from "./group-table.ts";

/**
 * Physically irreducible characters of T, Td, Th, O and Oh. The rotation parts form T or O; there T1 is the vector,
 * A2 is -1 outside the subgroup T, T2 = A2 T1, and E is what the symmetric square of T1 holds besides A1 and T2.
 * With the inversion every species comes even and odd.
 */
export function cubicCharacters(parts: readonly GroupElement[], table: GroupTable): ElementCharacter[] {
  const octahedral = parts.some((p) => p.order === 4);
  const n = parts.length;
  const squares = new Set<number>();
  parts.forEach((p, i) => {
    if (p.order === 4) squares.add(table.products[n * i + i]!);
  });
  const outside = (p: GroupElement, i: number) => p.order === 4 || (p.order === 2 && !squares.has(squareFree(i)));
  // With the inversion, a rotation part of order 2 may stand on an improper element: look at its proper partner.
  const inversion = parts.findIndex((p) => !p.proper && p.order === 1);
  const squareFree = (i: number) => (parts[i]!.proper || inversion < 0 ? i : table.products[n * i + inversion]!);
  const a2 = parts.map((p, i) => (octahedral && outside(p, i) ? -1 : 1));
  const t1 = parts.map((p) => p.trace);
  const t2 = t1.map((t, i) => t * a2[i]!);
  const e = t1.map((t, i) => t * t - t - 1 - t2[i]! + 0);
  const species: ElementCharacter[] = octahedral
    ? [one(n), real(1, a2), real(2, e), real(3, t1), real(3, t2)]
    : [one(n), { dimension: 2, norm: 2, values: e }, real(3, t1)];
  return withParity(species, parts, inversion);
}

/**
 * Irreducible characters of I and Ih. T1 is the vector; T2 follows from it by the automorphism of the field that
 * takes every rotation to its seventh power; H is the symmetric square of T1 without A, and G is what the seven
 * functions of third degree hold besides T2.
 */
export function icosahedralCharacters(parts: readonly GroupElement[]): ElementCharacter[] {
  const n = parts.length;
  const t1 = parts.map((p) => p.trace);
  const t2 = parts.map((p) => (p.order === 5 ? 1 - p.trace : p.trace));
  const h = t1.map((t) => snap(t * t - t - 1));
  const g = t1.map((t, i) => snap(t * t * t - 2 * t * t - t + 1 - t2[i]!));
  const species = [one(n), real(3, t1), real(3, t2), real(4, g), real(5, h)];
  const inversion = parts.findIndex((p) => !p.proper && p.order === 1);
  return withParity(species, parts, inversion);
}

function one(n: number): ElementCharacter {
  return real(1, new Array<number>(n).fill(1));
}

function real(dimension: number, values: readonly number[]): ElementCharacter {
  return { dimension, norm: 1, values };
}

function snap(x: number): number {
  const nearest = Math.round(x);
  return Math.abs(x - nearest) < 1e-12 ? nearest + 0 : x;
}

function withParity(
  species: readonly ElementCharacter[],
  parts: readonly GroupElement[],
  inversion: number,
): ElementCharacter[] {
  if (inversion < 0) return [...species];
  const odd = species.map((s) => ({ ...s, values: s.values.map((v, i) => (parts[i]!.proper ? v : -v + 0)) }));
  return [...species, ...odd];
}
