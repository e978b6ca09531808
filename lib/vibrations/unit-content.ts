import type { FiniteSymmetry, LinearSymmetry, MolecularSymmetry, MolecularUnit } from "../structure/index.ts";
import {
  COORDINATE_KINDS,
  type CoordinateKind,
  type CoordinateSetAnswer,
  coordinateContent,
  rigidMotions,
} from "./coordinate-content.ts";
import { linearSets } from "./linear-content.ts";
import { unitScaffold, unitStars } from "./scaffold.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";
import type { FreeSpeciesCorrelation, UnitCorrelation } from "./unit-correlation.ts";

/** What the internal modes of one species are made of: numbers of modes. Torsions are what no other kind describes. */
export interface SpeciesContent {
  readonly stretch: number;
  readonly outOfPlane: number;
  readonly bend: number;
  readonly torsion: number;
}

/** All modes of a kind: in the group of the free unit, in its site and in the factor group. */
export interface KindAnswer {
  readonly kind: keyof SpeciesContent;
  readonly free: SpeciesCounts;
  /** Species of coordinates that others already describe, in the group of the unit. */
  readonly redundant: SpeciesCounts;
  readonly site: SpeciesCounts;
  readonly factorGroup: SpeciesCounts;
}

export interface UnitContent {
  /** By species of the free unit. */
  readonly content: Readonly<Record<string, SpeciesContent>>;
  readonly coordinates: readonly CoordinateSetAnswer[];
  readonly kinds: readonly KindAnswer[];
}

/** Labels of the species of the site group and of the factor group, in their order. */
export interface SpeciesNames {
  readonly site: readonly { readonly label: string }[];
  readonly factorGroup: readonly { readonly label: string }[];
}

/**
 * How many stretches, bends, out-of-plane motions and torsions each species of a unit holds, and what becomes of them in
 * the site and in the factor group.
 */
export function unitContent(
  unit: Pick<MolecularUnit, "atoms" | "bonds">,
  symmetry: MolecularSymmetry,
  correlation: UnitCorrelation,
  names: SpeciesNames,
): UnitContent {
  const { counts, coordinates, redundant } =
    symmetry.kind === "finite" ? finiteContent(unit, symmetry) : linearContent(unit, symmetry);
  const content = Object.fromEntries(
    correlation.species.map((s): [string, SpeciesContent] => {
      const part = (kind: CoordinateKind) => counts.get(kind)?.[s.label] ?? 0;
      const [stretch, outOfPlane, bend] = COORDINATE_KINDS.map(part) as [number, number, number];
      return [s.label, { stretch, outOfPlane, bend, torsion: s.count - stretch - outOfPlane - bend }];
    }),
  );
  const kinds = ([...COORDINATE_KINDS, "torsion"] as const).map((kind): KindAnswer => {
    const sum = (pick: (s: FreeSpeciesCorrelation) => readonly number[], length: number) =>
      Array.from({ length }, (_, i) =>
        correlation.species.reduce((n, s) => n + content[s.label]![kind] * pick(s)[i]!, 0),
      );
    return {
      kind,
      free: positive(Object.fromEntries(Object.entries(content).map(([label, c]) => [label, c[kind]]))),
      redundant: kind === "torsion" ? {} : (redundant.get(kind) ?? {}),
      site: countsOf(
        names.site,
        sum((s) => s.site, names.site.length),
      ),
      factorGroup: countsOf(
        names.factorGroup,
        sum((s) => s.factorGroup, names.factorGroup.length),
      ),
    };
  });
  return { content, coordinates, kinds: kinds.filter((k) => total(k.free) + total(k.redundant) > 0) };
}

interface Content {
  readonly counts: ReadonlyMap<CoordinateKind, SpeciesCounts>;
  readonly redundant: ReadonlyMap<CoordinateKind, SpeciesCounts>;
  readonly coordinates: readonly CoordinateSetAnswer[];
}

function finiteContent(unit: Pick<MolecularUnit, "atoms" | "bonds">, symmetry: FiniteSymmetry): Content {
  const { irreps } = symmetry.group;
  const shaped = { unit, ...symmetry };
  const rigid = rigidMotions(symmetry.idealised);
  const { sets, kinds } = coordinateContent(unitScaffold(shaped), unitStars(shaped), symmetry.group, rigid);
  const left = kinds.map((k) => k.all.map((n, i) => n - k.independent[i]!));
  return {
    counts: new Map(kinds.map((k) => [k.kind, countsOf(irreps, k.independent)])),
    redundant: new Map(kinds.map((k, i) => [k.kind, countsOf(irreps, left[i]!)])),
    coordinates: sets.map((s) => ({ ...s, species: countsOf(irreps, s.species) })),
  };
}

/** Stretches are of species Sigma, bends of species Pi. */
function linearContent(unit: Pick<MolecularUnit, "atoms">, symmetry: LinearSymmetry): Content {
  const coordinates = linearSets(unit, symmetry);
  const sum = (kind: CoordinateKind): [CoordinateKind, SpeciesCounts] => {
    const counts: Record<string, number> = {};
    for (const set of coordinates.filter((c) => c.kind === kind)) {
      for (const [label, n] of Object.entries(set.species)) counts[label] = (counts[label] ?? 0) + n;
    }
    return [kind, counts];
  };
  return { counts: new Map([sum("stretch"), sum("bend")]), redundant: new Map(), coordinates };
}

function positive(counts: SpeciesCounts): SpeciesCounts {
  return Object.fromEntries(Object.entries(counts).filter(([, n]) => n !== 0));
}

function total(counts: SpeciesCounts): number {
  return Object.values(counts).reduce((a, b) => a + b, 0);
}
