import { apply, determinant, type IntMat3, type IntVec3, trace } from "../algebra/index.ts";
import { closeTo, dot, MATRIX_TOLERANCE, type Matrix3, snap, type Vector3 } from "./cartesian.ts";
import type { CharacterTable } from "./character-table.ts";
import { decompose } from "./decomposition.ts";

export type LinearGroupName = "Cinfv" | "Dinfh";

/** A species of a linear molecule. */
export interface LinearSpecies {
  readonly group: LinearGroupName;
  /** ASCII: `Sigma+`, `Pi`, `Delta`; with parity `Sigmag+`, `Piu`; beyond `Gamma`, `Lambda5` and so on. */
  readonly label: string;
  /** Angular momentum about the axis. */
  readonly lambda: number;
  /** Character on a plane through the axis; 0 where lambda > 0. */
  readonly reflection: 1 | -1 | 0;
  /** Character on the inversion over the dimension; 0 in Cinfv. */
  readonly parity: 1 | -1 | 0;
  readonly dimension: 1 | 2;
}

const NAMES: readonly string[] = ["Sigma", "Pi", "Delta", "Phi", "Gamma"];

/**
 * Species by quantum numbers.
 * @param lambda angular momentum about the axis, an integer from 0
 * @param reflection for lambda = 0 only: 1 for Sigma+, -1 for Sigma-
 * @param parity in Dinfh: 1 for g, -1 for u; 0 in Cinfv
 */
export function linearSpecies(
  group: LinearGroupName,
  lambda: number,
  parity: 1 | -1 | 0 = 0,
  reflection: 1 | -1 = 1,
): LinearSpecies {
  if (!Number.isInteger(lambda) || lambda < 0) throw new RangeError(`not an angular momentum about an axis: ${lambda}`);
  if ((group === "Dinfh") !== (parity !== 0)) throw new RangeError(`parity ${parity} has no meaning in ${group}`);
  const name = NAMES[lambda] ?? `Lambda${lambda}`;
  const suffix = parity === 1 ? "g" : parity === -1 ? "u" : "";
  const sign = lambda > 0 ? "" : reflection > 0 ? "+" : "-";
  const dimension = lambda > 0 ? 2 : 1;
  return { group, label: name + suffix + sign, lambda, reflection: lambda > 0 ? 0 : reflection, parity, dimension };
}

const GREEK: Readonly<Record<string, string>> = { Σ: "Sigma", Π: "Pi", Δ: "Delta", Φ: "Phi", Γ: "Gamma", Λ: "Lambda" };

/**
 * Species by label: `Sigma+`, `Sigma+g`, `Sigma_g+`, `Sigmag+`, `Piu`, also with Greek letters.
 * @throws RangeError if the label is not one of the group
 */
export function parseLinearSpecies(group: LinearGroupName, label: string): LinearSpecies {
  const plain = label.replace(/^[ΣΠΔΦΓΛ]/, (letter) => GREEK[letter]!).replaceAll("_", "");
  const match = /^(Sigma|Pi|Delta|Phi|Gamma|Lambda(\d+))([+-]?)([gu]?)([+-]?)$/.exec(plain);
  if (match) {
    const [, name = "", digits, before = "", parity = "", after = ""] = match;
    const lambda = digits === undefined ? NAMES.indexOf(name) : Number(digits);
    const sign = before + after;
    const fits = (lambda === 0) === (sign.length === 1) && (group === "Dinfh") === (parity !== "");
    if (fits) return linearSpecies(group, lambda, parity === "g" ? 1 : parity === "u" ? -1 : 0, sign === "-" ? -1 : 1);
  }
  throw new RangeError(`no species of ${group}: ${label}`);
}

/** All species of a linear group up to an angular momentum about the axis. */
export function linearTable(group: LinearGroupName, upTo: number): LinearSpecies[] {
  const list: LinearSpecies[] = [];
  for (const parity of group === "Dinfh" ? ([1, -1] as const) : ([0] as const)) {
    list.push(linearSpecies(group, 0, parity, 1), linearSpecies(group, 0, parity, -1));
    for (let lambda = 1; lambda <= upTo; lambda++) list.push(linearSpecies(group, lambda, parity));
  }
  return list;
}

/**
 * Character of a species on an operation that keeps the axis of the molecule.
 * @param flips whether the operation reverses the axis; only Dinfh has such operations
 */
export function linearCharacter(species: LinearSpecies, W: Matrix3 | IntMat3, flips: boolean): number {
  if (flips && species.parity === 0) throw new RangeError(`${species.group} has no operation that reverses the axis`);
  // W = i (i W), and i W keeps the ends of the axis apart.
  const d = flips ? -determinant(W) : determinant(W);
  const t = flips ? -trace(W) : trace(W);
  const parity = flips ? species.parity : 1;
  if (d < 0) return species.reflection * parity + 0;
  if (species.lambda === 0) return parity;
  const angle = Math.acos(Math.max(-1, Math.min(1, (t - 1) / 2)));
  return snap(2 * Math.cos(species.lambda * angle)) * parity + 0;
}

/**
 * How a species of a linear molecule splits in a finite group whose operations keep the axis of the molecule.
 * @param group with matrices in any basis
 * @param axis of the molecule in the basis of these matrices
 * @returns multiplicities of the species of the group
 * @throws RangeError if an operation moves the axis
 */
export function subduceLinear(
  species: LinearSpecies,
  group: CharacterTable & { readonly elements: readonly (Matrix3 | IntMat3)[] },
  axis: Vector3 | IntVec3,
): number[] {
  const tolerance = MATRIX_TOLERANCE * Math.sqrt(dot(axis, axis));
  const characters = group.elements.map((W) => {
    const image = apply(W, axis);
    if (closeTo(image, axis, tolerance)) return linearCharacter(species, W, false);
    const opposite = [-axis[0], -axis[1], -axis[2]];
    if (closeTo(image, opposite, tolerance)) return linearCharacter(species, W, true);
    throw new RangeError(`the operation ${W.join(" ")} moves the axis ${axis.join(" ")} of the molecule`);
  });
  return decompose(group, characters);
}
