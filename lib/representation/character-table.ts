import type { ElementCharacter } from "./axial-characters.ts";
import type { GroupTable } from "./group-table.ts";
import { compareLabels } from "./mulliken.ts";

export interface ConjugacyClass {
  /** ASCII, with the number of members: `E`, `2C4`, `3sigma_v`, `C2(z)`. */
  readonly name: string;
  readonly size: number;
  /** Element indices, ascending. */
  readonly members: readonly number[];
  /** The axes (or plane normals) of the members as `[uvw]`; empty for E and i. */
  readonly directions: readonly string[];
}

/** A physically irreducible representation: real, and irreducible over the real numbers. */
export interface Irrep {
  /** Mulliken symbol in ASCII: `A1g`, `B3u`, `E'`, `A''`, `T2g`. */
  readonly label: string;
  readonly dimension: number;
  /** 2 for a pair of complex conjugate representations taken as one species, else 1. */
  readonly norm: 1 | 2;
  /** One value per class, in the order of the classes. */
  readonly characters: readonly number[];
}

/** A finite group with its multiplication, classes and physically irreducible representations. */
export interface CharacterTable {
  readonly order: number;
  /** Index of the identity among the elements. */
  readonly identity: number;
  /** Flat multiplication table: element i after element j is products[order * i + j]. */
  readonly products: readonly number[];
  readonly classes: readonly ConjugacyClass[];
  /** Class index of every element. */
  readonly classOf: readonly number[];
  readonly irreps: readonly Irrep[];
}

/** A class with its place in the table. */
export interface RankedClass extends ConjugacyClass {
  readonly rank: number;
}

/** Puts classes and species into their usual order and characters per class. */
export function tabulate(
  table: GroupTable,
  ranked: readonly RankedClass[],
  characters: readonly ElementCharacter[],
  labels: readonly string[],
): CharacterTable {
  const classes = [...ranked]
    .sort((a, b) => a.rank - b.rank)
    .map(({ name, size, members, directions }) => ({ name, size, members, directions }));
  const classOf: number[] = new Array(table.order);
  classes.forEach((c, k) => {
    for (const m of c.members) classOf[m] = k;
  });
  const irreps = characters
    .map((c, i) => ({
      label: labels[i]!,
      dimension: c.dimension,
      norm: c.norm,
      characters: classes.map((k) => c.values[k.members[0]!]! + 0),
    }))
    .sort((a, b) => compareLabels(a.label, b.label));
  return { order: table.order, identity: table.identity, products: table.products, classes, classOf, irreps };
}

/** Character of species `irrep` (an index) on an element (an index). */
export function characterOf(group: CharacterTable, irrep: number, element: number): number {
  return group.irreps[irrep]!.characters[group.classOf[element]!]!;
}

/** Index of the species with a label. @throws RangeError if the group has none of that name */
export function irrepIndex(group: CharacterTable, label: string): number {
  const index = group.irreps.findIndex((irrep) => irrep.label === label);
  if (index < 0) throw new RangeError(`no species ${label} among ${group.irreps.map((r) => r.label).join(", ")}`);
  return index;
}
