import { InputProblem } from "../problem.ts";
import { spaceGroup } from "../symmetry/index.ts";
import { inequivalentCount, type PlaceRange } from "./arrangement-count.ts";
import type { AtomSite } from "./atom-site.ts";
import { AtomAction } from "./cell-atoms.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { exclusiveContacts } from "./disorder.ts";
import { type DisorderSlots, disorderSlots } from "./disorder-slots.ts";
import { FreeLabels } from "./free-labels.ts";

/** How many ordered structures a disordered cell stands for; decimal numbers, since they may be very large. */
export interface ConfigurationCount {
  /** All ways to fill the places. */
  readonly arrangements: string;
  /** Up to the operations of the space group, by Burnside's lemma. */
  readonly inequivalent: string;
  /** For each set of equivalent places what is put there and how often. */
  readonly places: readonly { readonly names: readonly string[]; readonly counts: readonly number[] }[];
}

/** An ordered structure. */
export interface Configuration {
  readonly crystal: Crystal;
  /** Arrangements equivalent to it, itself included. */
  readonly degeneracy: number;
}

export interface ConfigurationList extends ConfigurationCount {
  readonly configurations: readonly Configuration[];
  /** Inequivalent arrangements left out because atoms in them are too near each other to be there together. */
  readonly excluded: number;
}

/** Arrangements gone through at most: some seconds. */
export const MOST_ARRANGEMENTS = 500_000;
/** Ordered structures made at most. */
export const MOST_CONFIGURATIONS = 2000;

/**
 * Counts without making any. @throws InputProblem as `disorderSlots`
 * @example
 * ```ts
 * const half = composedCrystal(parseSiteTable("group 221\ncell a=4.1\nCs 1a\nCl 1b occ=0.5\nBr 1b occ=0.5"));
 * const doubled = changeOfCell(half, multiplesOf(2, 1, 1)).crystal;
 * countConfigurations(doubled).arrangements; // "2"
 * countConfigurations(doubled).inequivalent; // "1"
 * ```
 */
export function countConfigurations(crystal: Crystal): ConfigurationCount {
  return countOf(disorderSlots(crystal));
}

function countOf({ orbits, permutations }: DisorderSlots): ConfigurationCount {
  const ranges = rangesOf(orbits);
  const identity = permutations[0]!.map((_, i) => i);
  return {
    arrangements: String(inequivalentCount([identity], ranges)),
    inequivalent: String(inequivalentCount(permutations, ranges)),
    places: orbits.map(({ names, counts }) => ({ names, counts })),
  };
}

function rangesOf(orbits: DisorderSlots["orbits"]): PlaceRange[] {
  let from = 0;
  return orbits.map(({ slots, counts }) => {
    const range = { from, to: from + slots.length, counts };
    from = range.to;
    return range;
  });
}

/**
 * Every ordered structure of a disordered cell, once for all that the space group makes of it, each in the group of the
 * operations that keep it. Counted first; nothing is made where there are too many.
 * @throws InputProblem `configurations-too-many` with the count, and as `disorderSlots`
 * @example
 * ```ts
 * const half = composedCrystal(parseSiteTable("group 221\ncell a=4.1\nCs 1a\nCl 1b occ=0.5\nBr 1b occ=0.5"));
 * const doubled = changeOfCell(half, multiplesOf(2, 1, 1)).crystal;
 * const { configurations } = orderedConfigurations(doubled);
 * configurations.map((c) => c.degeneracy); // [2]
 * configurations[0]!.crystal.identified.summary.hermannMauguin; // "P 4/m m m"
 * ```
 */
export function orderedConfigurations(crystal: Crystal): ConfigurationList {
  const slots = disorderSlots(crystal);
  const count = countOf(slots);
  if (BigInt(count.arrangements) > MOST_ARRANGEMENTS || BigInt(count.inequivalent) > MOST_CONFIGURATIONS) {
    throw new InputProblem(
      "configurations-too-many",
      `there are ${count.arrangements} arrangements, ${count.inequivalent} up to symmetry; at most ${MOST_ARRANGEMENTS} are gone through and ${MOST_CONFIGURATIONS} made`,
      null,
      "choose a smaller cell, or decide part of the disorder first (--component)",
    );
  }
  const found = representatives(slots);
  const clash = clashTest(crystal, slots);
  const kept = found.filter(({ filling }) => !clash(filling));
  return {
    ...count,
    configurations: kept.map(({ filling, keeping, degeneracy }) => ({
      crystal: filledCrystal(crystal, slots, filling, keeping),
      degeneracy,
    })),
    excluded: found.length - kept.length,
  };
}

interface Representative {
  /** Way in which each place is filled. */
  readonly filling: Uint8Array;
  /** Indices of the operations that keep it. */
  readonly keeping: readonly number[];
  readonly degeneracy: number;
}

/** Of each set of equivalent fillings the first in lexicographic order. */
function representatives({ orbits, permutations }: DisorderSlots): Representative[] {
  const ranges = rangesOf(orbits);
  const size = ranges.at(-1)?.to ?? 0;
  const rangeAt = ranges.flatMap((r) => new Array<PlaceRange>(r.to - r.from).fill(r));
  const left = ranges.map((r) => [...r.counts]);
  const filling = new Uint8Array(size);
  const found: Representative[] = [];
  const fill = (place: number): void => {
    if (place === size) {
      const keeping = keepers(filling, permutations);
      if (keeping) {
        found.push({ filling: filling.slice(), keeping, degeneracy: permutations.length / keeping.length });
      }
      return;
    }
    const counts = left[ranges.indexOf(rangeAt[place]!)]!;
    for (let way = 0; way < counts.length; way++) {
      if (counts[way] === 0) continue;
      counts[way]!--;
      filling[place] = way;
      fill(place + 1);
      counts[way]!++;
    }
  };
  fill(0);
  return found;
}

/** Operations that keep a filling; null if one of them makes an earlier filling of it. */
function keepers(filling: Uint8Array, permutations: readonly Int32Array[]): number[] | null {
  const keeping: number[] = [];
  for (let g = 0; g < permutations.length; g++) {
    const p = permutations[g]!;
    // the filling seen through the permutation; over a group, all images are met
    let order = 0;
    for (let i = 0; i < filling.length && order === 0; i++) order = filling[p[i]!]! - filling[i]!;
    if (order < 0) return null;
    if (order === 0) keeping.push(g);
  }
  return keeping;
}

/** Whether a filling puts two atoms too near each other. */
function clashTest(crystal: Crystal, { atoms, orbits }: DisorderSlots): (filling: Uint8Array) => boolean {
  const place = new Map<number, readonly [number, number]>();
  orbits
    .flatMap((o) => o.slots)
    .forEach(({ ways }, k) => {
      ways.forEach((way, w) => {
        for (const atom of way) place.set(atom, [k, w]);
      });
    });
  const pairs = exclusiveContacts(crystal, atoms).flatMap(({ first, second }) => {
    const [a, b] = [place.get(first), place.get(second)];
    return a && b && a[0] !== b[0] ? [[a, b] as const] : [];
  });
  return (filling) => pairs.some(([[i, v], [j, w]]) => filling[i] === v && filling[j] === w);
}

/** The crystal with its places filled, in the group of the operations that keep the filling. */
function filledCrystal(
  crystal: Crystal,
  { atoms, orbits }: DisorderSlots,
  filling: Uint8Array,
  keeping: readonly number[],
): Crystal {
  const absent = new Set<number>();
  const decided = new Set<number>();
  orbits
    .flatMap((o) => o.slots)
    .forEach(({ ways }, k) => {
      ways.forEach((way, w) => {
        for (const atom of way) (w === filling[k] ? decided : absent).add(atom);
      });
    });
  const operations = keeping.map((g) => crystal.group.operations[g]!);
  const action = new AtomAction(crystal, atoms);
  const labels = new FreeLabels([]);
  const seen = new Set<number>();
  const sites: AtomSite[] = [];
  atoms.forEach((atom, index) => {
    if (seen.has(index) || absent.has(index)) return;
    for (const g of operations) seen.add(action.image(g, { atom: index, shift: [0, 0, 0] }).atom);
    const site = crystal.sites[atom.site]!;
    const isListed = atom.image === 0;
    sites.push({
      ...site,
      label: labels.claim(site.label),
      position: isListed ? site.symmetry.point : atom.position,
      su: isListed ? site.su : [null, null, null],
      displacement: isListed || site.displacement?.kind === "isotropic" ? site.displacement : null,
      ...(decided.has(index) ? { occupancy: 1, assembly: null, disorderGroup: null } : {}),
    });
  });
  const { name, metric, tolerance } = crystal;
  return crystalOf({ name, metric, tolerance, group: spaceGroup(operations), sites });
}
