import { equal, IDENTITY, type IntMat3, multiply, negate } from "../algebra/index.ts";
import { GENERATORS, MATRICES } from "./tables/crystal-generators.ts";

/** Oriented International symbols of the crystal classes that `crystalMatrices` knows. */
export function orientedSymbols(): string[] {
  return Object.keys(GENERATORS).sort();
}

/**
 * Rotation matrices of a crystal class in conventional axes (hexagonal axes for trigonal and hexagonal classes).
 * @param symbol oriented International symbol: `-4m2`, `31m`, `2mm`; monoclinic `2` has unique axis b, `112` c
 * @throws RangeError if the symbol is not known
 */
export function crystalMatrices(symbol: string): IntMat3[] {
  const text = Object.hasOwn(GENERATORS, symbol) ? GENERATORS[symbol] : undefined;
  if (text === undefined) throw new RangeError(`"${symbol}" is not the symbol of a crystal class`);
  return closeMatrices(text.split(" ").filter(Boolean).map(readMatrix));
}

function readMatrix(name: string): IntMat3 {
  const improper = name.startsWith("-");
  const W = MATRICES[improper ? name.slice(1) : name]!.split(" ").map(Number) as unknown as IntMat3;
  return improper ? negate(W) : W;
}

/** All products of the generators, identity first. */
function closeMatrices(generators: readonly IntMat3[]): IntMat3[] {
  const list: IntMat3[] = [IDENTITY];
  for (let i = 0; i < list.length; i++) {
    for (const g of generators) {
      const product = multiply(list[i]!, g);
      if (!list.some((W) => equal(W, product))) list.push(product);
    }
  }
  return list;
}
