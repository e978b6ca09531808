import { InputProblem } from "../problem.ts";
import {
  antisymmetricSquare,
  type CharacterTable,
  decompose,
  findSpecies,
  type LinearGroupName,
  type LinearSpecies,
  linearProduct,
  linearSpecies,
  parseLinearSpecies,
  symmetricSquare,
} from "../representation/index.ts";
import { countsOf, type SpeciesCounts } from "./species-counts.ts";

/** A direct product of species. */
export interface ProductAnswer {
  readonly factors: readonly string[];
  readonly sum: SpeciesCounts;
  /** Parts of the square of one species; null for other products. */
  readonly symmetric: SpeciesCounts | null;
  readonly antisymmetric: SpeciesCounts | null;
}

/** Most factors of one product. */
const MOST_FACTORS = 8;

/**
 * The direct product of species written as `E x E`, `T1u*Eg`, `E × T2`.
 * @throws InputProblem `unknown-species`, or `product-unreadable` if it is not a product of 2 to 8 species
 */
export function productAnswer(group: CharacterTable, text: string): ProductAnswer {
  const factors = factorsOf(text).map((label) => findSpecies(group.irreps, label));
  const characters = group.classOf.map((k) => factors.reduce((p, f) => p * group.irreps[f]!.characters[k]!, 1));
  const [first = 0] = factors;
  const square = factors.length === 2 && first === factors[1];
  return {
    factors: factors.map((f) => group.irreps[f]!.label),
    sum: countsOf(group.irreps, decompose(group, characters)),
    symmetric: square ? countsOf(group.irreps, symmetricSquare(group, first)) : null,
    antisymmetric: square ? countsOf(group.irreps, antisymmetricSquare(group, first)) : null,
  };
}

/** The same for species of linear molecules: `Pi x Pi`, `Sigmag+ x Piu`. */
export function linearProductAnswer(group: LinearGroupName, text: string): ProductAnswer {
  const factors = factorsOf(text).map((label) => linearSpeciesOf(group, label));
  const [first, ...others] = factors as [LinearSpecies, ...LinearSpecies[]];
  const terms = others.reduce<LinearSpecies[]>((sum, f) => sum.flatMap((s) => linearProduct(s, f)), [first]);
  const square = factors.length === 2 && first.label === factors[1]!.label;
  const odd = linearSpecies(group, 0, group === "Dinfh" ? 1 : 0, -1);
  const antisymmetric = first.lambda > 0 ? [odd] : [];
  return {
    factors: factors.map((f) => f.label),
    sum: counted(terms),
    symmetric: square ? counted(terms.filter((t) => t.label !== odd.label)) : null,
    antisymmetric: square ? counted(antisymmetric) : null,
  };
}

function factorsOf(text: string): string[] {
  const factors = text.split(/[x×*⊗]/).map((f) => f.trim());
  if (factors.length >= 2 && factors.length <= MOST_FACTORS && factors.every((f) => f !== "")) return factors;
  const message = `"${text}" is not a product of 2 to ${MOST_FACTORS} species`;
  throw new InputProblem("product-unreadable", message, null, 'Write species with x between them, such as "E x E".');
}

function linearSpeciesOf(group: LinearGroupName, label: string): LinearSpecies {
  try {
    return parseLinearSpecies(group, label);
  } catch (e) {
    if (!(e instanceof RangeError)) throw e;
    const some = group === "Dinfh" ? "Sigmag+, Sigmau-, Pig, Deltau" : "Sigma+, Sigma-, Pi, Delta";
    throw new InputProblem(
      "unknown-species",
      `${group} has no species "${label}"`,
      null,
      `Its species are ${some} and so on.`,
    );
  }
}

function counted(species: readonly LinearSpecies[]): SpeciesCounts {
  const counts: Record<string, number> = {};
  for (const { label } of [...species].sort((a, b) => a.lambda - b.lambda)) counts[label] = (counts[label] ?? 0) + 1;
  return counts;
}
