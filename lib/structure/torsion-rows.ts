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
  context: SiteContext,
  lists: NeighbourLists,
  isCentre: (site: number) => boolean,
): TorsionRow[] {
  const { source, measures } = context;
  const seen = new Set<string>();
  const rows: TorsionRow[] = [];
  for (const chain of chains(source, lists, isCentre)) {
    if (seen.has(chain.map(latticeKey).join())) continue;
    for (const key of equivalents(source, chain)) seen.add(key);
    const torsion = measures.torsion(...chain);
    if (torsion === null) continue;
    rows.push({ atoms: chain.map((n) => coded(context, n)), angle: inRange(torsion.value), su: torsion.su });
  }
  return rows;
}

type Source = SiteContext["source"];
type Chain = readonly [LatticeAtom, LatticeAtom, LatticeAtom, LatticeAtom];

/** Chains of bonds whose second atom stands as listed, without atoms that are never there together. */
function* chains(source: Source, lists: NeighbourLists, isCentre: (site: number) => boolean): Generator<Chain> {
  const bonds = lists.choose({ kind: "bonds" }, () => true);
  const around = (there: LatticeAtom): LatticeAtom[] => {
    const g = source.operationTo(there);
    return (bonds.get(source.atoms[there.atom]!.site) ?? []).map((n) => source.action.image(g, n));
  };
  const together = (a: LatticeAtom, b: LatticeAtom) => latticeKey(a) !== latticeKey(b) && !source.excludes(a, b);
  for (const site of lists.centres.filter(isCentre)) {
    const b = source.listed(site);
    const near = around(b);
    for (const c of near) {
      const firsts = near.filter((a) => together(a, c));
      const lasts = around(c).filter((d) => together(b, d));
      for (const a of firsts) for (const d of lasts) if (together(a, d)) yield [a, b, c, d];
    }
  }
}

function coded({ source, codes }: SiteContext, there: LatticeAtom): TorsionRow["atoms"][number] {
  const { operation, cells } = source.origin(there);
  return { label: source.crystal.sites[source.atoms[there.atom]!.site]!.label, code: codes.code(operation, cells) };
}

/** 180 rather than -180, which rounding makes of it. */
function inRange(angle: number): number {
  return angle < -180 + 1e-6 ? 180 : angle;
}

/** Keys of all images of the chain and its reverse of which the second atom stands as listed. */
function equivalents(source: Source, chain: Chain): string[] {
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
