import type { SpeciesFunctions } from "./functions.ts";
import { type LinearGroupName, type LinearSpecies, linearSpecies, linearTable } from "./linear-group.ts";

/** A species of a linear molecule with the functions that transform like it. */
export interface LinearRow extends LinearSpecies {
  readonly functions: SpeciesFunctions;
}

/** Functions of the two linear groups: [angular momentum, parity under i, reflection at a plane through the axis]. */
const FUNCTIONS: readonly (readonly [keyof SpeciesFunctions, string, number, 1 | -1, 1 | -1])[] = [
  ["vectors", "z", 0, -1, 1],
  ["vectors", "(x, y)", 1, -1, 1],
  ["rotations", "Rz", 0, 1, -1],
  ["rotations", "(Ry, -Rx)", 1, 1, 1],
  ["quadratics", "x2+y2", 0, 1, 1],
  ["quadratics", "z2", 0, 1, 1],
  ["quadratics", "(xz, yz)", 1, 1, 1],
  ["quadratics", "(x2-y2, 2xy)", 2, 1, 1],
];

/** Table of a linear group up to an angular momentum about the axis, z along the axis. */
export function linearGroupTable(group: LinearGroupName, upTo = 4): LinearRow[] {
  return linearTable(group, upTo).map((species) => {
    const functions: { -readonly [K in keyof SpeciesFunctions]: string[] } = {
      vectors: [],
      rotations: [],
      quadratics: [],
    };
    for (const [kind, text, lambda, parity, reflection] of FUNCTIONS) {
      const fits = lambda === species.lambda && (species.parity === 0 || species.parity === parity);
      if (fits && (lambda > 0 || reflection === species.reflection)) functions[kind].push(text);
    }
    return { ...species, functions };
  });
}

/**
 * Species in the direct product of two species of one linear group: angular momenta add and subtract, parities and
 * reflections multiply; equal angular momenta above 0 give Sigma+ and Sigma-.
 * @throws RangeError if the species belong to different groups
 */
export function linearProduct(a: LinearSpecies, b: LinearSpecies): LinearSpecies[] {
  if (a.group !== b.group) throw new RangeError(`${a.label} and ${b.label} belong to different groups`);
  const parity = (a.parity * b.parity + 0) as 1 | -1 | 0;
  const species = (lambda: number, reflection: 1 | -1 = 1) => linearSpecies(a.group, lambda, parity, reflection);
  if (a.lambda === 0 && b.lambda === 0) return [species(0, a.reflection === b.reflection ? 1 : -1)];
  const sum = species(a.lambda + b.lambda);
  if (a.lambda === 0 || b.lambda === 0) return [sum];
  if (a.lambda === b.lambda) return [species(0, 1), species(0, -1), sum];
  return [species(Math.abs(a.lambda - b.lambda)), sum];
}
