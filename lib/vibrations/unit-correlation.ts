import { determinant, trace } from "../algebra/index.ts";
import {
  type AxisFrame,
  axialCharacter,
  decompose,
  induce,
  type LinearSpecies,
  linearCharacter,
  linearSpecies,
  type PointGroup,
  pointGroup,
  subduceBy,
  vectorCharacter,
} from "../representation/index.ts";
import type { FiniteSymmetry, LinearSymmetry, MolecularSymmetry, MolecularUnit } from "../structure/index.ts";

/** A species of a free molecule: how often it holds internal modes, and what becomes of one of them in the crystal. */
export interface FreeSpeciesCorrelation {
  readonly label: string;
  readonly dimension: number;
  /** Internal modes of this species. */
  readonly count: number;
  readonly infrared: boolean;
  readonly raman: boolean;
  /** Species of the site group, one number per irrep of it. */
  readonly site: readonly number[];
  /** Species of the factor group, for the kind of unit as a whole. */
  readonly factorGroup: readonly number[];
}

/** The motions of a kind of unit, correlated from its own group M through its site group S to the factor group F. */
export interface UnitCorrelation {
  readonly siteGroup: PointGroup;
  readonly species: readonly FreeSpeciesCorrelation[];
  /** Translations and librations in the site group and in the factor group. */
  readonly translations: { readonly site: readonly number[]; readonly factorGroup: readonly number[] };
  readonly librations: { readonly site: readonly number[]; readonly factorGroup: readonly number[] };
  /** Rows: species of the site group; columns: species of the factor group that the units give. */
  readonly siteToFactorGroup: readonly (readonly number[])[];
  /** Sum of all of them in the factor group: 3 times the atoms of the unit, times the units. */
  readonly total: readonly number[];
}

/** A free species before it is correlated: its character on every operation of the site. */
interface FreeSpecies {
  readonly label: string;
  readonly dimension: number;
  readonly count: number;
  readonly infrared: boolean;
  readonly raman: boolean;
  readonly onSite: readonly number[];
}

/**
 * Correlates a kind of unit. Internal modes are what is left of the 3n displacements after translations and rotations.
 * @param group factor group
 * @param frame axes of its labels
 * Source: R. S. Halford, J. Chem. Phys. 14 (1946) 8; D. F. Hornig, J. Chem. Phys. 16 (1948) 1063.
 */
export function correlateUnit(
  unit: Pick<MolecularUnit, "atoms" | "site">,
  symmetry: MolecularSymmetry,
  group: PointGroup,
  frame: AxisFrame,
): UnitCorrelation {
  const siteGroup = pointGroup(
    unit.site.operations.map((a) => a.W),
    frame,
  );
  const up = induce(siteGroup, group);
  const toFactorGroup = (site: readonly number[]) =>
    group.irreps.map((_, f) => site.reduce((s, n, i) => s + n * up[i]![f]!, 0));
  const free = symmetry.kind === "finite" ? finiteSpecies(symmetry, siteGroup) : linearModes(unit, symmetry);
  const species = free.map(({ onSite, ...rest }) => {
    const site = decompose(siteGroup, onSite);
    return { ...rest, site, factorGroup: toFactorGroup(site) };
  });
  const part = (characters: readonly number[]) => {
    const site = decompose(siteGroup, characters);
    return { site, factorGroup: toFactorGroup(site) };
  };
  const translations = part(siteGroup.elements.map(vectorCharacter));
  const librations = part(rotationCharacters(symmetry, siteGroup));
  const total = group.irreps.map(
    (_, f) =>
      translations.factorGroup[f]! +
      librations.factorGroup[f]! +
      species.reduce((s, m) => s + m.count * m.factorGroup[f]!, 0),
  );
  return { siteGroup, species, translations, librations, siteToFactorGroup: up, total };
}

/** Internal modes of a molecule with a finite group, by counting the atoms that each element leaves in place. */
function finiteSpecies(symmetry: FiniteSymmetry, siteGroup: PointGroup): FreeSpecies[] {
  const { group, permutations, siteElements } = symmetry;
  const vector = group.elements.map(trace);
  const axial = group.elements.map((M) => Math.sign(determinant(M)) * trace(M));
  const square = vector.map((t, g) => t * t - axial[g]!); // trace of the symmetric square, t^2 - det t
  const fixed = permutations.map((p) => p.filter((image, k) => image === k).length);
  const internal = decompose(
    group,
    fixed.map((n, g) => n * vector[g]! - vector[g]! - axial[g]!),
  );
  const infrared = decompose(group, vector);
  const raman = decompose(group, square);
  const down = subduceBy(group, siteGroup, siteElements);
  return group.irreps.flatMap((irrep, i) => {
    if (internal[i] === 0) return [];
    const onSite = siteGroup.elements.map((_, s) =>
      siteGroup.irreps.reduce((sum, small, j) => sum + down[i]![j]! * small.characters[siteGroup.classOf[s]!]!, 0),
    );
    const activity = { infrared: infrared[i]! > 0, raman: raman[i]! > 0 };
    return [{ label: irrep.label, dimension: irrep.dimension, count: internal[i]!, ...activity, onSite }];
  });
}

/**
 * Internal modes of a linear molecule: stretches Sigma+, bends Pi, shared among g and u by pairs of equivalent atoms
 * and the atom at the centre, if there is one.
 */
function linearModes(unit: Pick<MolecularUnit, "atoms" | "site">, symmetry: LinearSymmetry): FreeSpecies[] {
  const n = unit.atoms.length;
  const { schoenflies, siteReverses } = symmetry;
  const list: [LinearSpecies, number][] = [];
  if (schoenflies === "Cinfv") {
    list.push([linearSpecies("Cinfv", 0), n - 1], [linearSpecies("Cinfv", 1), n - 2]);
  } else {
    const pairs = Math.floor(n / 2);
    const odd = n % 2;
    list.push([linearSpecies("Dinfh", 0, 1), pairs], [linearSpecies("Dinfh", 0, -1), pairs + odd - 1]);
    list.push([linearSpecies("Dinfh", 1, 1), pairs - 1], [linearSpecies("Dinfh", 1, -1), pairs + odd - 1]);
  }
  return list.flatMap(([s, count]) => {
    if (count <= 0) return [];
    const polar = s.parity !== 1 && s.lambda <= 1;
    const tensor = s.parity !== -1;
    const onSite = unit.site.operations.map((a, i) => linearCharacter(s, a.W, siteReverses[i]!));
    return [{ label: s.label, dimension: s.dimension, count, infrared: polar, raman: tensor, onSite }];
  });
}

/** Rotations of the unit; a linear one does not turn about its own axis. */
function rotationCharacters(symmetry: MolecularSymmetry, siteGroup: PointGroup): number[] {
  const all = siteGroup.elements.map(axialCharacter);
  if (symmetry.kind === "finite") return all;
  const about = symmetry.schoenflies === "Cinfv" ? linearSpecies("Cinfv", 0, 0, -1) : linearSpecies("Dinfh", 0, 1, -1);
  return all.map((c, i) => c - linearCharacter(about, siteGroup.elements[i]!, symmetry.siteReverses[i]!));
}
