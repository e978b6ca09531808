import { BOND_VALENCES } from "./tables/bond-valences.ts";

/** Slope of all parameters, angstrom. Source: I. D. Brown, D. Altermatt, Acta Crystallographica B41 (1985) 244-247. */
export const BOND_VALENCE_SLOPE = 0.37;

/** An oxidation state of a cation with R0 by anion, angstrom. */
export interface CationState {
  readonly charge: number;
  readonly r0: ReadonlyMap<string, number>;
}

let decoded: ReadonlyMap<string, readonly CationState[]> | null = null;

/** States of an element that have parameters; empty for others. */
export function cationStates(symbol: string): readonly CationState[] {
  decoded ??= decode();
  return decoded.get(symbol) ?? [];
}

function decode(): Map<string, CationState[]> {
  const map = new Map<string, CationState[]>();
  for (const row of BOND_VALENCES.split("; ")) {
    const [cation = "", ...words] = row.split(" ");
    const [, symbol = "", charge] = /^([A-Z][a-z]?)(\d)$/.exec(cation) ?? [];
    const r0 = new Map(words.flatMap((w, i) => (i % 2 === 0 ? [[w, Number(words[i + 1])] as const] : [])));
    map.set(symbol, [...(map.get(symbol) ?? []), { charge: Number(charge), r0 }]);
  }
  return map;
}

/** Valence of a bond of length d, in valence units. */
export function bondValence(r0: number, d: number): number {
  return Math.exp((r0 - d) / BOND_VALENCE_SLOPE);
}
