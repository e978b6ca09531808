import { isHydrogen } from "./bond-class.ts";
import { BOND_VALENCE_SLOPE, bondValence, type CationState, cationStates } from "./bond-valence-parameters.ts";
import type { LatticeAtom } from "./cell-atoms.ts";
import type { CrystalSite } from "./crystal.ts";
import type { NeighbourAtoms } from "./neighbour-atoms.ts";
import type { ChosenNeighbour } from "./neighbour-choice.ts";
import type { MeasuredQuantity, NeighbourMeasures } from "./neighbour-measures.ts";

/** What the bond valences about a site add up to. */
export interface ValenceSum extends MeasuredQuantity {
  /** The oxidation state that the parameters of a cation are for; null for an anion, whose neighbours have theirs. */
  readonly charge: number | null;
  /** Whether the file states it, or the state was chosen whose sum comes nearest. */
  readonly stated: boolean;
  /** Hydrogen atoms bonded to the site, which are not in the sum: X-rays place them too near. */
  readonly hydrogens: number;
}

/** Bond valences of the neighbours chosen, by the state of every cation. */
export class BondValences {
  private readonly source: NeighbourAtoms;
  private readonly lists: ReadonlyMap<number, readonly ChosenNeighbour[]>;
  private readonly states: readonly (CationState | null)[];
  private readonly stated: ReadonlyMap<string, number>;

  constructor(
    source: NeighbourAtoms,
    lists: ReadonlyMap<number, readonly ChosenNeighbour[]>,
    stated: ReadonlyMap<string, number>,
  ) {
    this.source = source;
    this.lists = lists;
    this.stated = stated;
    this.states = source.crystal.sites.map((site, i) => this.stateOf(site, i));
  }

  /** Valence of the bond of a site to an atom of the cell, weighted by how often it is there; null without parameters. */
  valence(site: number, atom: number, distance: number): number | null {
    const centre = this.source.crystal.sites[site]!;
    let sum = 0;
    let known = false;
    const neighbour = this.source.atoms[atom]!.site;
    const weight = this.source.presence(site, neighbour) / this.source.occupancyAt(neighbour);
    for (const i of this.source.sharing[neighbour]!) {
      const other = this.source.crystal.sites[i]!;
      if (isHydrogen(centre.element) || isHydrogen(other.element)) continue;
      const r0 = this.parameter(site, other.element) ?? this.parameter(i, centre.element);
      if (r0 === null) continue;
      known = true;
      sum += bondValence(r0, distance) * weight * other.occupancy;
    }
    return known ? sum : null;
  }

  /** Null where a neighbour has no parameter with the site: bonded to its like, to carbon, to a cation. */
  sum(site: number, measures: NeighbourMeasures, listed: LatticeAtom): ValenceSum | null {
    const all = this.lists.get(this.source.sharing[site]![0]!) ?? [];
    const others = all.filter((n) => !isHydrogen(this.source.elementOf(n.atom)));
    const valences = others.map((n) => this.valence(site, n.atom, n.distance));
    if (valences.length === 0 || valences.includes(null)) return null;
    const value = valences.reduce<number>((s, v) => s + v!, 0);
    const su = measures.ofDistances(listed, others, (i) => -valences[i]! / BOND_VALENCE_SLOPE);
    const state = this.states[site] ?? null;
    const { label, element } = this.source.crystal.sites[site]!;
    const isCation = state !== null && others.some((n) => state.r0.has(this.source.elementOf(n.atom) ?? ""));
    return {
      value,
      su,
      charge: isCation ? state.charge : null,
      stated: isCation && this.stated.has(label),
      hydrogens: isHydrogen(element) ? 0 : all.length - others.length,
    };
  }

  private parameter(cation: number, anion: string | null): number | null {
    return this.states[cation]?.r0.get(anion ?? "") ?? null;
  }

  /** The stated state of a cation, or the one whose sum comes nearest to it in proportion. */
  private stateOf(site: CrystalSite, index: number): CationState | null {
    if (site.element === null || isHydrogen(site.element)) return null;
    const stated = this.stated.get(site.label) ?? null;
    const states = cationStates(site.element).filter((s) => stated === null || s.charge === stated);
    const list = this.lists.get(this.source.sharing[index]?.[0] ?? index) ?? [];
    const misfit = (state: CationState) => {
      const sum = list.reduce((s, n) => {
        const r0 = state.r0.get(this.source.elementOf(n.atom) ?? "");
        return r0 === undefined ? s : s + bondValence(r0, n.distance);
      }, 0);
      return Math.abs(sum - state.charge) / state.charge;
    };
    const fitting = states.map((state) => ({ state, misfit: misfit(state) })).sort((a, b) => a.misfit - b.misfit);
    return fitting[0]?.state ?? null;
  }
}
