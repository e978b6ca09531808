import { gcd, type IntVec3, primitiveRow } from "../algebra/index.ts";
import type { BondChoice } from "./bond-choice.ts";
import { type Component, componentsOf } from "./bond-graph.ts";
import type { BondOptions } from "./bond-overrides.ts";
import { type Bond, bondsOf } from "./bonds.ts";
import { AtomAction } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import { invariantMetric } from "./invariant-metric.ts";
import {
  type ComponentOrbit,
  componentOrbits,
  describeUnit,
  type MolecularUnit,
  type UnitSource,
} from "./molecular-unit.ts";
import { sequenceFormula } from "./unit-formula.ts";

/** Atoms bonded without end. */
export interface ExtendedUnit {
  readonly kind: "chain" | "layer" | "framework";
  /** Empirical, by IUPAC's sequence of elements. */
  readonly formula: string;
  /** Formulae of that kind in the primitive cell. */
  readonly count: number;
  readonly labels: readonly string[];
  /** Indices of its sites in the crystal. */
  readonly sites: readonly number[];
  /** Lattice direction [uvw] of a chain, Miller indices (hkl) of a layer, null for a framework; of the first of its images. */
  readonly direction: IntVec3 | null;
}

/** A site none of whose atoms is bonded. */
export interface LoneAtom {
  readonly label: string;
  readonly element: string;
  /** Index of the site in the crystal. */
  readonly site: number;
  /** In the primitive cell. */
  readonly count: number;
}

/** A crystal taken apart into molecules, ions, extended structures and single atoms. */
export interface UnitAnalysis {
  readonly units: readonly MolecularUnit[];
  readonly extended: readonly ExtendedUnit[];
  readonly loneAtoms: readonly LoneAtom[];
  readonly choice: BondChoice;
  readonly notes: readonly string[];
}

/**
 * Takes a crystal apart at its bonds: finite pieces are gathered across cell edges and sorted into kinds that the space
 * group carries into each other. Each kind stands in the order of its first site.
 * @throws InputProblem `bond-name-unknown`
 */
export function molecularUnits(crystal: Crystal, options: BondOptions = {}): UnitAnalysis {
  const metric = invariantMetric(crystal.metric, crystal.group);
  const { atoms, bonds, choice, notes } = bondsOf({ ...crystal, metric }, options);
  const components = componentsOf(atoms.length, bonds);
  const source: UnitSource = { crystal, metric, atoms, components, bonds: sorted(bonds, components) };
  const action = new AtomAction(crystal, atoms);
  const units: MolecularUnit[] = [];
  const extended: ExtendedUnit[] = [];
  const loneAtoms: LoneAtom[] = [];
  for (const orbit of componentOrbits(source, action)) {
    const { members, translations } = components[orbit.first]!;
    if (translations.length > 0) extended.push(describeExtended(source, orbit));
    else if (members.length > 1) units.push(describeUnit(source, action, orbit));
    else loneAtoms.push(loneAtom(source, orbit));
  }
  return { units, extended, loneAtoms, choice, notes };
}

/** The bonds of each component. */
function sorted(bonds: readonly Bond[], components: readonly Component[]): Bond[][] {
  const owner = new Map<number, number>();
  components.forEach((c, k) => {
    for (const m of c.members) owner.set(m.atom, k);
  });
  const lists: Bond[][] = components.map(() => []);
  for (const b of bonds) lists[owner.get(b.first)!]!.push(b);
  return lists;
}

function loneAtom({ crystal, atoms, components }: UnitSource, orbit: ComponentOrbit): LoneAtom {
  const { site } = atoms[components[orbit.first]!.members[0]!.atom]!;
  const { label, element } = crystal.sites[site]!;
  return { label, element: element ?? "?", site, count: orbit.members.length / crystal.group.centrings.length };
}

const KINDS = ["chain", "layer", "framework"] as const;

function describeExtended({ crystal, atoms, components }: UnitSource, orbit: ComponentOrbit): ExtendedUnit {
  const { members, translations } = components[orbit.first]!;
  const sites = [...new Set(members.map((m) => atoms[m.atom]!.site))].sort((a, b) => a - b);
  const elements = members.map((m) => crystal.sites[atoms[m.atom]!.site]!.element ?? "?");
  const counts = new Map<string, number>();
  for (const e of elements) counts.set(e, (counts.get(e) ?? 0) + 1);
  const divisor = [...counts.values()].reduce((a, b) => gcd(a, b), 0);
  const empirical = [...counts].flatMap(([e, n]) => new Array<string>(n / divisor).fill(e));
  return {
    kind: KINDS[translations.length - 1]!,
    formula: sequenceFormula(empirical),
    count: (orbit.members.length * divisor) / crystal.group.centrings.length,
    labels: sites.map((s) => crystal.sites[s]!.label),
    sites,
    direction: directionOf(translations),
  };
}

function directionOf(translations: readonly IntVec3[]): IntVec3 | null {
  const [a, b, c] = translations;
  if (c || !a) return null;
  if (!b) return primitiveRow(a) as unknown as IntVec3;
  const normal = primitiveRow([a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]);
  const sign = (normal.find((e) => e !== 0) ?? 1) < 0 ? -1 : 1;
  return normal.map((e) => sign * e + 0) as unknown as IntVec3;
}
