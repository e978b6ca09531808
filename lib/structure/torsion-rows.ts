import type { LatticeAtom } from "./cell-atoms.ts";
import { latticeKey } from "./neighbour-atoms.ts";
import type { NeighbourLists } from "./neighbour-choice.ts";
import type { SiteContext } from "./site-neighbours.ts";

/** A torsion angle along three bonds; the second atom stands as listed. */
export interface TorsionRow {
  readonly atoms: readonly { readonly label: string; readonly code: string | null }[];
  /** Degrees in (-180, 180]; positive if the far bond is turned clockwise: W. Klyne, V. Prelog, Experientia 16 (1960) 521. */
  readonly angle: number;
  readonly su: number | null;
}

/** Torsion angles along all chains of three bonds, each class under the space group once; ends that coincide left out. */
export function torsionRows(
  { source, measures, codes }: SiteContext,
  lists: NeighbourLists,
  isCentre: (site: number) => boolean,
): TorsionRow[] {
  const bonds = lists.choose({ kind: "bonds" }, () => true);
  const around = (there: LatticeAtom): LatticeAtom[] => {
    const g = source.operationTo(there);
    return (bonds.get(source.atoms[there.atom]!.site) ?? []).map((n) => source.action.image(g, n));
  };
  const seen = new Set<string>();
  const rows: TorsionRow[] = [];
  for (const site of lists.centres.filter(isCentre)) {
    const b = source.listed(site);
    for (const c of around(b)) {
      for (const a of around(b).filter((n) => latticeKey(n) !== latticeKey(c))) {
        for (const d of around(c)) {
          const chain = [a, b, c, d];
          if ([a, b].some((n) => latticeKey(n) === latticeKey(d)) || seen.has(chain.map(latticeKey).join())) continue;
          for (const key of equivalents(source, chain)) seen.add(key);
          const torsion = measures.torsion(a, b, c, d);
          if (torsion === null) continue;
          const atoms = chain.map((n) => {
            const { operation, cells } = source.origin(n);
            return {
              label: source.crystal.sites[source.atoms[n.atom]!.site]!.label,
              code: codes.code(operation, cells),
            };
          });
          rows.push({ atoms, angle: inRange(torsion.value), su: torsion.su });
        }
      }
    }
  }
  return rows;
}

/** 180 rather than -180, which rounding makes of it. */
function inRange(angle: number): number {
  return angle < -180 + 1e-6 ? 180 : angle;
}

/** Keys of the chain and its reverse as any of their images that has its second atom as listed. */
function equivalents(source: SiteContext["source"], chain: readonly LatticeAtom[]): string[] {
  const back = [...chain].reverse();
  const keys: string[] = [];
  for (const list of [chain, back]) {
    const second = list[1]!;
    const { site } = source.atoms[second.atom]!;
    const moved = list.map((n) => source.reverse(n, second));
    for (const s of source.crystal.sites[site]!.symmetry.operations) {
      keys.push(moved.map((n) => latticeKey(source.action.image(s, n))).join());
    }
  }
  return keys;
}
