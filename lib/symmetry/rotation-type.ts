import {
  apply,
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  integerNullspace,
  multiply,
  negate,
} from "../algebra/index.ts";

/** What a rotation part does, independent of the basis. */
export interface RotationType {
  /** 1, 2, 3, 4 or 6: the order of the rotation, for a rotoinversion that of the rotation in it. */
  readonly order: 1 | 2 | 3 | 4 | 6;
  /** True for determinant -1: a rotoinversion; order 1 then is the inversion, order 2 a reflection. */
  readonly improper: boolean;
  /** Shortest lattice direction along the axis (normal of a reflection plane), null for 1 and -1. */
  readonly axis: IntVec3 | null;
  /** Sense of the rotation seen against the axis direction: 1 counter-clockwise, -1 clockwise; 0 for order 1 and 2. */
  readonly sense: 1 | -1 | 0;
}

/**
 * Type of an integer matrix of finite order: from its determinant and the smallest power that is the identity. The
 * axis points so that its last non-zero component is positive, unless two components are negative to one positive.
 * @throws RangeError if the matrix is of no crystallographic order
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4.
 */
export function rotationType(W: IntMat3): RotationType {
  const improper = determinant(W) < 0;
  const R = improper ? negate(W) : W;
  const order = orderOf(R);
  if (order === 1) return { order, improper, axis: null, sense: 0 };
  const axis = oriented(axisOf(R));
  return { order, improper, axis, sense: order === 2 ? 0 : senseAbout(R, axis) };
}

function orderOf(R: IntMat3): RotationType["order"] {
  let power = R;
  for (const order of [1, 2, 3, 4, 5, 6] as const) {
    if (equal(power, IDENTITY)) {
      if (order === 5) break;
      return order;
    }
    power = multiply(power, R);
  }
  throw new RangeError(`not a crystallographic rotation: ${R.join(" ")}`);
}

function axisOf(R: IntMat3): IntVec3 {
  const rows = [0, 1, 2].map((i) => [0, 1, 2].map((j) => R[3 * i + j]! - (i === j ? 1 : 0)));
  return integerNullspace(rows, 3)[0] as unknown as IntVec3;
}

/**
 * International Tables write body diagonals x,x,x; -x,x,-x; x,-x,-x; -x,-x,x: product of components positive; face
 * diagonals x,x,0 and x,-x,0, 0,y,y and 0,y,-y, x,0,x and -x,0,x.
 */
function oriented(v: IntVec3): IntVec3 {
  const [x, y, z] = v;
  const product = x * y * z;
  const flip = product !== 0 ? product < 0 : firstInCycle(v) < 0;
  return flip ? [-x + 0, -y + 0, -z + 0] : v;
}

function firstInCycle([x, y, z]: IntVec3): number {
  if (z === 0) return x !== 0 ? x : y;
  if (x === 0) return y !== 0 ? y : z;
  return z;
}

function senseAbout(R: IntMat3, axis: IntVec3): 1 | -1 {
  for (const e of [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ] as const) {
    const image = apply(R, e);
    const volume = determinant([e[0], image[0], axis[0], e[1], image[1], axis[1], e[2], image[2], axis[2]]);
    if (volume !== 0) return volume > 0 ? 1 : -1;
  }
  throw new RangeError(`a rotation without a sense: ${R.join(" ")}`);
}
