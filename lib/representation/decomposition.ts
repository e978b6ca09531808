import type { CharacterTable } from "./character-table.ts";

/** Largest distance of a multiplicity from an integer that rounding of characters explains; dimensionless. */
const INTEGER_TOLERANCE = 1e-6;

/**
 * Multiplicity of every species in a real representation given by its characters.
 * @param characters one value per element, in the order of the elements
 * @returns one non-negative integer per species
 * @throws RangeError if the characters belong to no representation of the group
 */
export function decompose(group: CharacterTable, characters: readonly number[]): number[] {
  if (characters.length !== group.order) {
    throw new RangeError(`${characters.length} characters for a group of order ${group.order}`);
  }
  const sums = new Array<number>(group.classes.length).fill(0);
  for (let i = 0; i < group.order; i++) sums[group.classOf[i]!]! += characters[i]!;
  const multiplicities = group.irreps.map((irrep) => {
    let sum = 0;
    for (let k = 0; k < sums.length; k++) sum += irrep.characters[k]! * sums[k]!;
    return wholeNumber(sum / (group.order * irrep.norm), irrep.label);
  });
  confirm(group, characters, multiplicities);
  return multiplicities;
}

function wholeNumber(x: number, label: string): number {
  const nearest = Math.round(x);
  if (Math.abs(x - nearest) > INTEGER_TOLERANCE || nearest < 0 || !Number.isFinite(x)) {
    throw new RangeError(`the characters hold the species ${label} ${x} times: they belong to no representation`);
  }
  return nearest + 0;
}

/** A function that is not constant on classes can give whole numbers by chance: compare with what they stand for. */
function confirm(group: CharacterTable, characters: readonly number[], multiplicities: readonly number[]): void {
  const perClass = group.classes.map((_, k) =>
    group.irreps.reduce((sum, irrep, r) => sum + multiplicities[r]! * irrep.characters[k]!, 0),
  );
  for (let i = 0; i < group.order; i++) {
    if (Math.abs(characters[i]! - perClass[group.classOf[i]!]!) > INTEGER_TOLERANCE * group.order) {
      throw new RangeError(`the character ${characters[i]} of element ${i + 1} belongs to no real representation`);
    }
  }
}

/** The characters of a representation with the given multiplicities, one value per element. */
export function composeCharacters(group: CharacterTable, multiplicities: readonly number[]): number[] {
  return group.classOf.map((k) =>
    group.irreps.reduce((sum, irrep, r) => sum + (multiplicities[r] ?? 0) * irrep.characters[k]!, 0),
  );
}

/** Multiplicities of the species in the direct product of species i and j (indices). */
export function directProduct(group: CharacterTable, i: number, j: number): number[] {
  const a = group.irreps[i]!.characters;
  const b = group.irreps[j]!.characters;
  return decompose(
    group,
    group.classOf.map((k) => a[k]! * b[k]!),
  );
}

/** Multiplicities in the symmetric part of the square of species i: characters (x(g)^2 + x(g^2)) / 2. */
export function symmetricSquare(group: CharacterTable, i: number): number[] {
  return square(group, i, 1);
}

/** Multiplicities in the antisymmetric part of the square of species i: characters (x(g)^2 - x(g^2)) / 2. */
export function antisymmetricSquare(group: CharacterTable, i: number): number[] {
  return square(group, i, -1);
}

function square(group: CharacterTable, i: number, sign: 1 | -1): number[] {
  const { characters } = group.irreps[i]!;
  return decompose(
    group,
    group.classOf.map((k, g) => {
      const squared = characters[group.classOf[group.products[group.order * g + g]!]!]!;
      return (characters[k]! ** 2 + sign * squared) / 2;
    }),
  );
}
