import { InputProblem } from "../problem.ts";
import type { Operation } from "../symmetry/index.ts";
import { AtomAction, type CellAtom, cellAtoms } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { nearestDistance } from "./periodic-points.ts";

/** A place that is filled in one of several ways. */
export interface Slot {
  /** Atoms of the cell that each way puts there; none for a vacancy. */
  readonly ways: readonly (readonly number[])[];
}

/** Equivalent places, and how many of them are filled in each way. */
export interface SlotOrbit {
  /** Labels of the sites of each way, `vacancy` for none. */
  readonly names: readonly string[];
  readonly slots: readonly Slot[];
  readonly counts: readonly number[];
}

/** The disorder of a cell as places to be filled. */
export interface DisorderSlots {
  readonly atoms: readonly CellAtom[];
  readonly orbits: readonly SlotOrbit[];
  /** Per operation of the group: where it takes each place, numbered through all orbits. */
  readonly permutations: readonly Int32Array[];
}

/** Occupancies add up to 1 within this; they are rounded in files. */
const SLACK = 0.02;
/** Numbers of atoms are whole within this; 24 places of occupancy 0.33 hold 7.92. */
const WHOLE = 0.1;
/** Multiples of the cell that are tried to find whole numbers. */
const MOST_MULTIPLES = 24;

/**
 * The places of a crystal that are filled in several ways: disorder groups of an assembly, sites that share a position,
 * partly occupied sites. Those of one orbit hold whole numbers of each way.
 * @throws InputProblem `occupancy-not-whole`, `disorder-tangled`
 */
export function disorderSlots(crystal: Crystal): DisorderSlots {
  const atoms = cellAtoms(crystal);
  const action = new AtomAction(crystal, atoms);
  const places = disorderedPlaces(crystal).map((sites) => orbitOf(crystal, atoms, action, sites));
  const orbits = places.map(({ sites, slots }): SlotOrbit => {
    const names = sites.map((way) =>
      way.length === 0 ? "vacancy" : way.map((i) => crystal.sites[i]!.label).join("+"),
    );
    return { names, slots, counts: wholeCounts(crystal, sites, slots.length, names) };
  });
  const owner = new Map<number, number>();
  const first = orbits
    .flatMap((o) => o.slots)
    .map((slot, k) => {
      for (const atom of slot.ways.flat()) {
        if (owner.has(atom)) throw tangled(crystal, atoms[atom]!.site);
        owner.set(atom, k);
      }
      return slot.ways.find((way) => way.length > 0)![0]!;
    });
  const permutations = crystal.group.operations.map((g) =>
    Int32Array.from(first, (atom) => owner.get(action.image(g, { atom, shift: [0, 0, 0] }).atom)!),
  );
  return { atoms, orbits, permutations };
}

/** For each kind of place the sites of each way, a vacancy last where occupancies leave room for one. */
function disorderedPlaces(crystal: Crystal): number[][][] {
  const { sites } = crystal;
  const places = new Map<string, Map<string, number[]>>();
  sites.forEach((site, i) => {
    const root = site.sharesPositionOf ?? i;
    const isShared = sites.some((s, k) => k !== i && (s.sharesPositionOf ?? k) === root);
    const isGrouped = site.disorderGroup !== null && site.disorderGroup !== "0";
    if (!isGrouped && !isShared && site.occupancy >= 1 - SLACK) return;
    const place = isGrouped ? `assembly ${site.assembly ?? ""}` : `site ${root}`;
    const way = isGrouped ? site.disorderGroup! : String(i);
    const ways = places.get(place) ?? new Map<string, number[]>();
    places.set(place, ways);
    ways.set(way, [...(ways.get(way) ?? []), i]);
  });
  return [...places.values()].map((ways) => {
    const list = [...ways.values()];
    const sum = list.reduce((s, way) => s + meanOccupancy(crystal, way), 0);
    return sum < 1 - SLACK ? [...list, []] : list;
  });
}

function meanOccupancy({ sites }: Crystal, way: readonly number[]): number {
  return way.reduce((s, i) => s + sites[i]!.occupancy, 0) / Math.max(1, way.length);
}

/** The images of a place under the group: those of the atom listed for each site, sites at one position together. */
function orbitOf(crystal: Crystal, atoms: readonly CellAtom[], action: AtomAction, sites: number[][]) {
  const root = sites[0]![0]!;
  const listed = (site: number) => {
    const own = atoms.flatMap((a, i) => (a.site === site ? [i] : []));
    if (crystal.sites[site]!.sharesPositionOf !== root) return own[0]!;
    const at = crystal.sites[root]!.images[0]!.position;
    const distance = (i: number) => nearestDistance(crystal.metric, at, atoms[i]!.position);
    return own.reduce((best, i) => (distance(i) < distance(best) - 1e-9 ? i : best));
  };
  const start = sites.map((way) => way.map(listed));
  const found = new Map<string, Slot>();
  for (const g of crystal.group.operations) {
    const ways = start.map((way) => way.map((atom) => imageOf(action, g, atom)).sort((a, b) => a - b));
    const key = ways.map((way) => way.join()).join(";");
    if (!found.has(key)) found.set(key, { ways });
  }
  return { sites, slots: [...found.values()] };
}

function imageOf(action: AtomAction, g: Operation, atom: number): number {
  return action.image(g, { atom, shift: [0, 0, 0] }).atom;
}

function tangled(crystal: Crystal, site: number): InputProblem {
  return new InputProblem(
    "disorder-tangled",
    `the alternatives of ${crystal.sites[site]!.label} overlap with their own images, so they cannot be chosen one by one`,
    null,
    "ask for one ordered model instead (--ordered)",
  );
}

function wholeCounts(crystal: Crystal, sites: readonly number[][], slots: number, names: readonly string[]): number[] {
  const shares = sites.map((way) => meanOccupancy(crystal, way));
  const given = shares.reduce((s, e) => s + e, 0);
  const wanted = sites.map((way, k) => slots * (way.length === 0 ? Math.max(0, 1 - given) : shares[k]!));
  const counts = wanted.map((e) => Math.round(e));
  const isWhole = (m: number) => wanted.every((e) => Math.abs(m * e - Math.round(m * e)) <= WHOLE);
  const total = counts.reduce((s, e) => s + e, 0);
  if (isWhole(1) && total === slots) return counts;
  let multiple = 2;
  while (multiple < MOST_MULTIPLES && !isWhole(multiple)) multiple++;
  const shown = names.map((n, k) => `${n} ${Number(wanted[k]!.toFixed(3))}`).join(", ");
  throw new InputProblem(
    "occupancy-not-whole",
    `${slots} equivalent places in this cell would hold ${shown}, which are no whole numbers`,
    null,
    multiple < MOST_MULTIPLES
      ? `a cell ${multiple} times as large holds whole numbers`
      : "no small multiple of the cell holds whole numbers",
  );
}
