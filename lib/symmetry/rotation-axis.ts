import { IDENTITY, type IntMat3, type IntVec3, multiply, primitiveRow } from "../algebra/index.ts";

/** 1 + R + ... + R^(n-1) for a proper rotation of order n: n times the projection onto its axis. */
export function powerSum(R: IntMat3, n: number): IntMat3 {
  const sum = [...IDENTITY];
  let power = R;
  for (let k = 1; k < n; k++) {
    for (let i = 0; i < 9; i++) sum[i]! += power[i]!;
    power = multiply(power, R);
  }
  return sum as unknown as IntMat3;
}

/** Shortest vector along the axis of a proper rotation of order n > 1, in the basis of R, up to its sign. */
export function axisOf(R: IntMat3, n: number): IntVec3 {
  const sum = powerSum(R, n);
  for (let j = 0; j < 3; j++) {
    if (sum[j] || sum[3 + j] || sum[6 + j]) {
      return primitiveRow([sum[j]!, sum[3 + j]!, sum[6 + j]!]) as unknown as IntVec3;
    }
  }
  throw new RangeError(`no rotation of order ${n}: ${R.join(" ")}`);
}
