import {
  carriedMap,
  equivariantMaps,
  irrepMatrices,
  type Matrix3,
  mapProduct,
  type PartnerMap,
  type PointGroup,
  pointGroup,
  quarterTurn,
  type Rows,
} from "../representation/index.ts";
import { type Crystal, type CrystalFrame, crystalFrame } from "../structure/index.ts";
import { rotationIndex, rotationParts } from "../symmetry/index.ts";
import { type PrimitiveAtom, primitiveAtoms } from "./primitive-atoms.ts";
import type { VibratingSite } from "./vibrating-sites.ts";

/** One repeat of a species: as many sets of displacements as the species has partners. */
export interface ModePattern {
  /** Index of the species. */
  readonly irrep: number;
  /** Sites whose atoms move, by index. */
  readonly sites: readonly number[];
  /** Number of this repeat from 1, within the species and the sites that move. */
  readonly repeat: number;
  /** The atoms that move, by index. */
  readonly atoms: readonly number[];
  /** partners[q][3 k + c]: component c, along x, y, z of the frame, of atom k of `atoms`, for partner q; of length 1. */
  readonly partners: readonly (readonly number[])[];
}

/** How much of one repeat a rigid translation holds. */
export interface AcousticTerm {
  /** Index of the pattern. */
  readonly pattern: number;
  readonly factor: number;
  /**
   * Factor of the same pattern with its partners turned by a quarter, the first towards the second; 0 but for pairs of
   * complex species.
   */
  readonly turned: number;
}

/** The rigid translations of one species as a sum over its patterns; partner i of the sum is that of each pattern. */
export interface AcousticPattern {
  readonly irrep: number;
  /** Direction of the translation of every partner, along x, y, z of the frame. */
  readonly directions: readonly (readonly number[])[];
  readonly terms: readonly AcousticTerm[];
}

export interface ModePatterns {
  readonly group: PointGroup;
  readonly frame: CrystalFrame;
  readonly sites: readonly VibratingSite[];
  readonly atoms: readonly PrimitiveAtom[];
  /** By species, then site, then repeat. */
  readonly patterns: readonly ModePattern[];
  readonly acoustic: readonly AcousticPattern[];
}

/**
 * Symmetry-adapted displacements of a crystal at k = 0: for every species and site an orthonormal set of patterns, not
 * weighted with masses, in the Cartesian frame of the crystal. Partner i of a pattern, carried along by an operation
 * with rotation part g, is the sum over j of D(g)_ji times partner j, with the same matrices D (`irrepMatrices`) in every
 * repeat and site; so a force constant couples partner i of one repeat to partner i of another only.
 * Method: a pattern is known from the map that it makes of the partners to the displacement of one atom, which must
 * commute with the site group (G. Frobenius' reciprocity); its other atoms follow by the operations.
 */
export function modePatterns(crystal: Crystal): ModePatterns {
  const frame = crystalFrame(crystal);
  const group = pointGroup(rotationParts(crystal.group), frame.labels);
  const { sites, atoms } = primitiveAtoms(crystal);
  const orbits = sites.map((v, site) => ({
    site,
    siteElements: v.site.symmetry.operations.map((a) => rotationIndex(crystal.group, a.W)),
    atoms: atoms.flatMap((a, i) => (a.site === site ? [i] : [])),
  }));
  const patterns: ModePattern[] = [];
  const acoustic: AcousticPattern[] = [];
  group.irreps.forEach(({ norm }, irrep) => {
    const species: Species = { irrep, norm, D: irrepMatrices(group, irrep), matrices: frame.matrices };
    const first = patterns.length;
    const maps = orbits.flatMap((orbit) => {
      const found = mapsOf(species, orbit.siteElements);
      found.forEach((t, r) => {
        patterns.push(patternOf(species, orbit, atoms, t, r + 1));
      });
      return found.map((t) => ({ t, weight: Math.sqrt(orbit.atoms.length / atoms.length) }));
    });
    for (const rigid of mapsOf(species, undefined)) acoustic.push(acousticOf(species, rigid, maps, first));
  });
  return { group, frame, sites, atoms, patterns, acoustic };
}

interface Species {
  readonly irrep: number;
  readonly norm: 1 | 2;
  readonly D: readonly Rows[];
  readonly matrices: readonly Matrix3[];
}

interface Orbit {
  readonly site: number;
  /** Elements of the site group of the listed atom. */
  readonly siteElements: readonly number[];
  readonly atoms: readonly number[];
}

/** Maps that commute with some elements, by default with all. */
function mapsOf({ matrices, D, norm }: Species, elements: readonly number[] | undefined): PartnerMap[] {
  if (!elements) return equivariantMaps(matrices, D, norm);
  return equivariantMaps(
    elements.map((g) => matrices[g]!),
    elements.map((g) => D[g]!),
    norm,
  );
}

function patternOf(
  { irrep, D, matrices }: Species,
  orbit: Orbit,
  atoms: readonly PrimitiveAtom[],
  t: PartnerMap,
  repeat: number,
): ModePattern {
  const length = Math.sqrt(orbit.atoms.length);
  const partners = D[0]!.map(() => new Array<number>(3 * orbit.atoms.length));
  orbit.atoms.forEach((atom, k) => {
    const g = atoms[atom]!.element;
    carriedMap(t, matrices[g]!, D[g]!).forEach((e, i) => {
      partners[Math.floor(i / 3)]![3 * k + (i % 3)] = e / length;
    });
  });
  return { irrep, sites: [orbit.site], repeat, atoms: orbit.atoms, partners };
}

/** Factors below this are rounding; dimensionless. */
const ROUNDING = 1e-9;

function acousticOf(
  { irrep, norm }: Species,
  rigid: PartnerMap,
  maps: readonly { readonly t: PartnerMap; readonly weight: number }[],
  first: number,
): AcousticPattern {
  const cleared = (x: number) => (Math.abs(x) < ROUNDING ? 0 : x);
  const terms = maps.flatMap(({ t, weight }, r) => {
    const factor = cleared(weight * mapProduct(t, rigid));
    const turned = norm === 2 ? cleared(weight * mapProduct(quarterTurn(t), rigid)) : 0;
    return factor === 0 && turned === 0 ? [] : [{ pattern: first + r, factor, turned }];
  });
  const directions = Array.from({ length: rigid.length / 3 }, (_, q) => rigid.slice(3 * q, 3 * q + 3));
  return { irrep, directions, terms };
}
