import { determinant } from "../algebra/index.ts";
import type { Matrix3 } from "./cartesian.ts";

/**
 * Kinds of tensors: polar vector; axial vector; symmetric tensor of rank 2; totally symmetric tensor of rank 3; tensor
 * of rank 3 symmetric in its last two indices.
 */
export type TensorKind = "vector" | "axial" | "symmetric2" | "symmetric3" | "hyperRamanGeneral";

/** Independent components of a kind of tensors, and how a rotation acts on them. */
export interface TensorSpace {
  readonly kind: TensorKind;
  readonly rank: 1 | 2 | 3;
  /** Names of the independent components, in reading order: `xx`, `xy`, `xz`, `yy`, `yz`, `zz`. */
  readonly components: readonly string[];
  /** Index tuples that share the value of each component. */
  readonly tuples: readonly (readonly (readonly number[])[])[];
}

export function tensorSpace(kind: TensorKind): TensorSpace {
  const rank = kind === "vector" || kind === "axial" ? 1 : kind === "symmetric2" ? 2 : 3;
  const byName = new Map<string, number[][]>();
  for (let code = 0; code < 3 ** rank; code++) {
    const tuple = Array.from({ length: rank }, (_, k) => Math.floor(code / 3 ** (rank - 1 - k)) % 3);
    const fixed = kind === "hyperRamanGeneral" ? 1 : 0; // indices that do not take part in the symmetry
    const sorted = [...tuple.slice(0, fixed), ...tuple.slice(fixed).sort((a, b) => a - b)];
    const name = sorted.map((i) => "xyz"[i]).join("");
    byName.set(name, [...(byName.get(name) ?? []), tuple]);
  }
  return { kind, rank, components: [...byName.keys()], tuples: [...byName.values()] };
}

/** Matrix, as rows, by which an orthogonal matrix acts on the independent components. */
export function tensorMatrix(space: TensorSpace, M: Matrix3): number[][] {
  const sign = space.kind === "axial" ? Math.sign(determinant(M)) : 1;
  return space.tuples.map(([first]) =>
    space.tuples.map((tuples) => {
      let sum = 0;
      for (const tuple of tuples) {
        let product = sign;
        for (let k = 0; k < tuple.length; k++) product *= M[3 * first![k]! + tuple[k]!]!;
        sum += product;
      }
      return sum;
    }),
  );
}
