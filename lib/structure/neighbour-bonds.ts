import { BondOverrides } from "./bond-overrides.ts";
import { judgedBonds } from "./bonds.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import type { BondRule } from "./contact-table.ts";
import { latticeKey, type NeighbourAtoms } from "./neighbour-atoms.ts";

/** Per site the rules of its bonds by the key of the neighbour, seen from the listed point. */
export function bondRules(source: NeighbourAtoms): Map<number, Map<string, BondRule>> {
  const { crystal, atoms } = source;
  const rules = new Map(
    source.firstImage.flatMap((atom, site) => (atom === null ? [] : [[site, new Map<string, BondRule>()] as const])),
  );
  const { bonds } = judgedBonds(crystal, atoms, new BondOverrides(crystal, {}), (c) => source.areApart(c));
  const add = (centre: number, atom: number, shift: readonly number[], rule: BondRule) => {
    if (atoms[centre]!.image !== 0) return;
    const { site } = atoms[centre]!;
    const base = source.listed(site).shift;
    const moved = { atom, shift: [0, 1, 2].map((i) => shift[i]! + base[i]! + 0) as unknown as LatticeAtom["shift"] };
    rules.get(site)!.set(latticeKey(moved), rule);
  };
  for (const { first, second, shift, rule } of bonds) {
    add(first, second, shift, rule);
    add(
      second,
      first,
      shift.map((e) => -e),
      rule,
    );
  }
  return rules;
}
