import { decompose, type MolecularGroup, type PointGroup } from "../representation/index.ts";
import { cross3, type Vec3 } from "../structure/index.ts";
import { IndependentSpecies, type SparseRow } from "./independent-species.ts";
import type { InternalCoordinate } from "./internal-coordinate.ts";
import { internalCoordinates } from "./internal-coordinates.ts";
import type { Scaffold, Star } from "./scaffold.ts";
import type { SpeciesCounts } from "./species-counts.ts";

/** Kinds of internal coordinates that are built, in the order in which they claim motions. */
export const COORDINATE_KINDS = ["stretch", "outOfPlane", "bend"] as const;

export type CoordinateKind = (typeof COORDINATE_KINDS)[number];

/** Coordinates that the group carries into each other. */
export interface CoordinateSet {
  readonly kind: CoordinateKind;
  /** Elements along them: `C-O`, `O-C-O`; the centre alone for motions out of its plane. */
  readonly name: string;
  /** Labels of the atoms of the first. */
  readonly labels: readonly string[];
  /** How many coordinates these are. */
  readonly count: number;
  /** Their representation, redundant ones included: one number per species. */
  readonly species: readonly number[];
}

/** The same for printing, with species by label. */
export type CoordinateSetAnswer = Omit<CoordinateSet, "species"> & { readonly species: SpeciesCounts };

/** The coordinates of a kind as a whole, one number per species. */
export interface KindContent {
  readonly kind: CoordinateKind;
  /** Species of all coordinates of the kind. */
  readonly all: readonly number[];
  /** Those that are independent of each other and of the kinds before. */
  readonly independent: readonly number[];
}

export interface CoordinateContent {
  readonly sets: readonly CoordinateSet[];
  readonly kinds: readonly KindContent[];
}

/**
 * How many stretches, out-of-plane motions and bends each species holds. Representations of the sets are exact, from the
 * coordinates that each element carries into themselves; redundancies come from the rank of the B matrix, species by
 * species. Stretches claim motions first, then motions out of planes, then bends.
 * @param group whose elements act in the order of the scaffold's action
 * @param rigid rows of motions that change no coordinate
 * @throws RangeError if the coordinates do not form representations: a defect of this program
 */
export function coordinateContent<A>(
  scaffold: Scaffold<A>,
  stars: readonly Star<A>[],
  group: PointGroup | MolecularGroup,
  rigid: readonly SparseRow[],
): CoordinateContent {
  const coordinates = internalCoordinates(scaffold, stars);
  const orbits = orbitsOf(scaffold, coordinates);
  const space = new IndependentSpecies(scaffold.action, group);
  space.extend(rigid);
  const sets = orbits.map((orbit) => describeSet(scaffold, orbit, group));
  const kinds = COORDINATE_KINDS.map((kind): KindContent => {
    const rows = orbits.map((o) => o.members[0]!).flatMap((c) => (c.kind === kind ? c.rows : []));
    const own = sets.filter((s) => s.kind === kind);
    return {
      kind,
      all: group.irreps.map((_, i) => own.reduce((sum, s) => sum + s.species[i]!, 0)),
      independent: space.extend(rows),
    };
  });
  return { sets, kinds };
}

/** The coordinates of an orbit with the images of each one: position in the orbit, per element. */
interface Orbit<A> {
  readonly members: readonly InternalCoordinate<A>[];
  readonly keys: readonly string[];
}

function orbitsOf<A>(s: Scaffold<A>, coordinates: readonly InternalCoordinate<A>[]): Orbit<A>[] {
  const keyOf = (c: InternalCoordinate<A>, atoms: readonly A[]) => `${c.kind} ${c.key(atoms)}`;
  const byKey = new Map(coordinates.map((c) => [keyOf(c, c.atoms), c]));
  const seen = new Set<string>();
  const orbits: Orbit<A>[] = [];
  for (const [start, first] of byKey) {
    if (seen.has(start)) continue;
    const keys = new Set<string>();
    s.action.matrices.forEach((_, g) => {
      keys.add(
        keyOf(
          first,
          first.atoms.map((a) => s.image(g, a)),
        ),
      );
    });
    for (const key of keys) seen.add(key);
    const members = [...keys].map((key) => {
      const member = byKey.get(key);
      if (!member) throw new RangeError(`the group does not keep the coordinates: ${first.name} has an unknown image`);
      return member;
    });
    orbits.push({ members, keys: [...keys] });
  }
  return orbits;
}

function describeSet<A>(
  s: Scaffold<A>,
  { members, keys }: Orbit<A>,
  group: PointGroup | MolecularGroup,
): CoordinateSet {
  const [first] = members as [InternalCoordinate<A>];
  const character = (g: number) =>
    members.reduce((sum, c, k) => {
      const images = c.atoms.map((a) => s.image(g, a));
      if (`${c.kind} ${c.key(images)}` !== keys[k]) return sum;
      const isFixed = (atom: A) => s.key([c.atoms[0]!, atom]) === s.key([images[0]!, s.image(g, atom)]);
      return sum + c.character(s.action.matrices[g]!, isFixed);
    }, 0);
  const perClass = group.classes.map((c) => character(c.members[0]!));
  const characters = group.classOf.map((k) => perClass[k]!);
  return {
    kind: first.kind,
    name: first.name,
    labels: first.atoms.map(s.label),
    count: members.length * first.size,
    species: decompose(group, characters),
  };
}

/** Translations and rotations of a molecule as rows. */
export function rigidMotions(places: readonly Vec3[]): SparseRow[] {
  const axes: readonly Vec3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const translations = axes.map((e): SparseRow => places.map((_, k) => [k, e] as const));
  const rotations = axes.map((e): SparseRow => places.map((r, k) => [k, cross3(e, r)] as const));
  return [...translations, ...rotations];
}
