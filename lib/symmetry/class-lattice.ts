import {
  adjugate,
  apply,
  determinant,
  type IntMat3,
  type IntVec3,
  inverseUnimodular,
  mod,
  multiply,
  type SmithForm,
  scale,
  smithForm,
} from "../algebra/index.ts";
import type { ArithmeticClass } from "./arithmetic-class.ts";
import { axisChanges } from "./axis-changes.ts";
import { primitiveBasis } from "./centring.ts";
import { crystalFamily } from "./geometric-class.ts";
import { referenceCentrings } from "./reference-group.ts";

/** What identification needs of an arithmetic class, computed once per class. */
export interface ClassLattice {
  /** Lattice points per conventional cell. */
  readonly index: number;
  /** Primitive basis in conventional axes: columns, numerators over `d`. */
  readonly primitive: { readonly n: IntMat3; readonly d: number };
  /** For every change of axes of the family, in its order. */
  readonly settings: readonly {
    /** Codes of the generators in the axes before the change. */
    readonly codes: readonly number[];
    /** From coordinates in the axes before the change to primitive coordinates after it; integer. */
    readonly toPrimitive: IntMat3;
  }[];
  /** Smith form of the generators' stacked (W - 1) in primitive coordinates: moving the origin by p adds (W - 1) p. */
  readonly smith: SmithForm;
  /** By translation components that no origin shift alters: the type. */
  readonly types: ReadonlyMap<string, TypeEntry>;
}

interface TypeEntry {
  /** Index in `ArithmeticClass.types`. */
  readonly index: number;
  /** Translations of the generators in primitive coordinates, numerators over 12. */
  readonly primitive: readonly IntVec3[];
}

const cache = new Map<ArithmeticClass, ClassLattice>();

/** Lattice, origin-shift equations and types of a class; built on first use. */
export function classLattice(parent: ArithmeticClass): ClassLattice {
  const known = cache.get(parent);
  if (known) return known;
  const centrings = referenceCentrings(parent.centring);
  const primitive = primitiveBasis(centrings);
  const toPrimitive = primitiveInverse(primitive.n, primitive.d);
  const generators = parent.generators.map((W) => multiply(multiply(toPrimitive, W), primitive.n));
  const smith = smithForm(generators.flatMap((W) => shiftRows(scaleDown(W, primitive.d))));
  const types = new Map<string, TypeEntry>();
  parent.types.forEach(({ translations }, index) => {
    const inPrimitive = translations.map((t) => apply(toPrimitive, t));
    types.set(cohomologyKey(smith, inPrimitive, 12)!, { index, primitive: inPrimitive });
  });
  const settings = axisChanges(crystalFamily(parent.geometric)).map((N) => {
    const back = inverseUnimodular(N);
    return {
      codes: parent.generators.map((W) => matrixCode(multiply(multiply(N, W), back))),
      toPrimitive: multiply(toPrimitive, back),
    };
  });
  const fresh = { index: centrings.length, primitive, settings, smith, types };
  cache.set(parent, fresh);
  return fresh;
}

/** A number that two matrices with entries -1, 0, 1 share exactly when they are equal. */
export function matrixCode(W: IntMat3): number {
  let code = 0;
  for (let i = 0; i < 9; i++) code = code * 3 + W[i]! + 1;
  return code;
}

/**
 * The type whose translations differ from these by an origin shift only, or null.
 * @param translations of the generators in primitive coordinates, numerators over d
 */
export function typeOfTranslations(
  lattice: ClassLattice,
  translations: readonly IntVec3[],
  d: number,
): TypeEntry | null {
  const key = cohomologyKey(lattice.smith, translations, d);
  return key === null ? null : (lattice.types.get(key) ?? null);
}

/** Twelfths, modulo 1, of the rows of u t that Smith's diagonal leaves untouched; null if one is no twelfth. */
function cohomologyKey(smith: SmithForm, translations: readonly IntVec3[], d: number): string | null {
  let key = "";
  for (let i = 0; i < smith.u.length; i++) {
    if (i < smith.d.length && smith.d[i] !== 0) continue;
    const value = mod(rowTimesStack(smith.u[i]!, translations), d) * 12;
    if (value % d !== 0) return null;
    key += `${value / d} `;
  }
  return key;
}

/** A row of u times the stacked translations. */
export function rowTimesStack(row: readonly number[], translations: readonly IntVec3[]): number {
  let sum = 0;
  for (let k = 0; k < translations.length; k++) {
    const t = translations[k]!;
    sum += row[3 * k]! * t[0] + row[3 * k + 1]! * t[1] + row[3 * k + 2]! * t[2];
  }
  return sum;
}

function primitiveInverse(n: IntMat3, d: number): IntMat3 {
  // (n/d)^-1 = d adj(n) / det(n), integer because the conventional axes are lattice vectors
  return scaleDown(scale(adjugate(n), d), determinant(n));
}

function scaleDown(m: IntMat3, k: number): IntMat3 {
  return m.map((e) => e / k + 0) as unknown as IntMat3;
}

function shiftRows(W: IntMat3): number[][] {
  return [
    [W[0] - 1, W[1], W[2]],
    [W[3], W[4] - 1, W[5]],
    [W[6], W[7], W[8] - 1],
  ];
}
