import { apply, determinant, type IntMat3, type IntVec3, negate } from "../algebra/index.ts";
import { signedOrder } from "./geometric-class.ts";
import { axisOf } from "./rotation-axis.ts";

/** What a rotation part does, with the direction in which it does it. */
export interface RotationType {
  /** 1, 2, 3, 4 or 6: the order of the rotation, for a rotoinversion that of the rotation in it. */
  readonly order: 1 | 2 | 3 | 4 | 6;
  /** True for determinant -1: a rotoinversion; order 1 then is the inversion, order 2 a reflection. */
  readonly improper: boolean;
  /** Shortest integer vector along the axis (normal of a reflection plane), null for 1 and -1. */
  readonly axis: IntVec3 | null;
  /** Sense of the rotation seen against the axis direction: 1 counter-clockwise, -1 clockwise; 0 for order 1 and 2. */
  readonly sense: 1 | -1 | 0;
}

/**
 * Type, axis and sense of a rotation part. The sense of a rotoinversion is that of its rotation. The axis points as
 * International Tables print it: body diagonals x,x,x; -x,x,-x; x,-x,-x; -x,-x,x and face diagonals x,x,0; x,-x,0;
 * 0,y,y; 0,y,-y; x,0,x; -x,0,x.
 * @throws RangeError if W is no crystallographic rotation
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4.
 */
export function rotationType(W: IntMat3): RotationType {
  const signed = signedOrder(W);
  const improper = signed < 0;
  const order = Math.abs(signed) as RotationType["order"];
  if (order === 1) return { order, improper, axis: null, sense: 0 };
  const R = improper ? negate(W) : W;
  const axis = oriented(axisOf(R, order));
  return { order, improper, axis, sense: order === 2 ? 0 : senseAbout(R, axis) };
}

/** Body diagonals get a positive product of components; [uv0] a positive u, [0vw] a positive v, [u0w] a positive w. */
export function oriented(v: IntVec3): IntVec3 {
  const [x, y, z] = v;
  const product = x * y * z;
  const leading = z === 0 ? x || y : x === 0 ? y || z : z;
  const flip = product !== 0 ? product < 0 : leading < 0;
  return flip ? [-x + 0, -y + 0, -z + 0] : v;
}

function senseAbout(R: IntMat3, axis: IntVec3): 1 | -1 {
  // a vector off the axis, its image and the axis span a volume whose sign is the sense
  for (const e of UNIT) {
    const image = apply(R, e);
    const volume = determinant([e[0], image[0], axis[0], e[1], image[1], axis[1], e[2], image[2], axis[2]]);
    if (volume !== 0) return volume > 0 ? 1 : -1;
  }
  throw new RangeError(`a rotation without a sense: ${R.join(" ")}`);
}

const UNIT: readonly IntVec3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
