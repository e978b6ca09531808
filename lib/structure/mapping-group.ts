import { apply, multiply, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { type Operation, reduce } from "../symmetry/index.ts";
import { type AtomMapping, composeMappings, differenceOf, identityMapping } from "./atom-mapping.ts";
import type { AtomSet } from "./atom-set.ts";
import type { Vec3 } from "./cell.ts";

/** Mappings of a set of atoms that form a group modulo the lattice, one for each rotation part. */
export interface MappingGroup {
  /** The identity first. */
  readonly members: readonly AtomMapping[];
  readonly generators: readonly AtomMapping[];
}

/** Point groups of lattices have up to 48 operations. */
const LARGEST_POINT_GROUP = 48;

export function trivialGroup(atoms: AtomSet): MappingGroup {
  return { members: [identityMapping(atoms)], generators: [] };
}

/** Which mapping it is, modulo the lattice: rotation part and image of the first atom tell. */
export function mappingKey({ W, permutation }: Pick<AtomMapping, "W" | "permutation">): string {
  return `${W.join()} ${permutation[0]}`;
}

/**
 * The group that a group and one more mapping generate, or null where a product displaces an atom beyond the limit,
 * mappings disagree about an atom, or a rotation part would come twice.
 * @param limit angstrom
 */
export function extendGroup(
  atoms: AtomSet,
  group: MappingGroup,
  generator: AtomMapping,
  limit: number,
): MappingGroup | null {
  const generators = [...group.generators, generator];
  const members = [...group.members];
  const known = new Map(members.map((m) => [mappingKey(m), m]));
  const rotations = new Set(members.map((m) => m.W.join()));
  for (let i = 0; i < members.length; i++) {
    for (const g of generators) {
      const product = composeMappings(atoms, members[i]!, g);
      const same = known.get(mappingKey(product));
      if (same) {
        if (!differenceOf(product, same)) return null;
        continue;
      }
      const rotation = product.W.join();
      if (product.largest > limit || rotations.has(rotation) || members.length >= LARGEST_POINT_GROUP) return null;
      rotations.add(rotation);
      known.set(mappingKey(product), product);
      members.push(product);
    }
  }
  return { members, generators };
}

/** A group of mappings made exact. */
export interface ExactGroup {
  /** In the order of the members; translations rational, in [0, 1). */
  readonly operations: readonly Operation[];
  /** The point about which they are written, in the axes of the atoms; measured, not exact. */
  readonly origin: Vec3;
}

/**
 * The space group that a group of mappings stands for. Permutations tell exactly by which lattice vector c(i, j) the
 * product of two mappings differs from the third, and W_i w_j + w_i - w_ij = c(i, j) summed over the N mappings j gives
 * w_i = C_i / N + (1 - W_i) p, p the mean of all w: about the origin p the translations are the fractions C_i / N, and
 * no measured number enters them.
 */
export function exactGroup({ members }: MappingGroup): ExactGroup {
  const index = new Map(members.map((m) => [mappingKey(m), m]));
  const operations = members.map((a): Operation => {
    const sum: [number, number, number] = [0, 0, 0];
    for (const b of members) {
      const middle = b.permutation[0]!;
      const product = index.get(`${multiply(a.W, b.W).join()} ${a.permutation[middle]}`)!;
      const moved = apply(a.W, [b.shifts[0]!, b.shifts[1]!, b.shifts[2]!]);
      for (let i = 0; i < 3; i++) sum[i]! += moved[i]! + a.shifts[3 * middle + i]! - product.shifts[i]!;
    }
    const w: RatVec3 = ratVec3(sum, members.length);
    return reduce({ W: a.W, w });
  });
  const origin = [0, 1, 2].map((i) => members.reduce((s, m) => s + m.w[i]!, 0) / members.length);
  return { operations, origin: origin as unknown as Vec3 };
}
