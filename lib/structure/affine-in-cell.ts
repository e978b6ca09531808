import {
  addVectors,
  component,
  inverseRatMat,
  modOne,
  multiplyRatMat,
  type Rational,
  type RatMat3,
  rational,
  ratMat3,
  subtractVectors,
  transformVector,
} from "../algebra/index.ts";
import { formatExpression, type Operation, type Transformation } from "../symmetry/index.ts";
import { floatMatrix } from "./atom-set.ts";
import { apply3, type Vec3 } from "./cell.ts";

/**
 * An operation as it reads in another cell, where its rotation part need not be integer: `1/2x+3/2y,1/2x-1/2y,z`.
 * @param way from the cell wanted to the one that the operation is written in
 */
export function exactText(a: Operation, way: Transformation): string {
  const W = multiplyRatMat(multiplyRatMat(way.P, ratMat3(a.W)), inverseRatMat(way.P));
  const moved = addVectors(transformVector(way.P, a.w), subtractVectors(way.p, transformVector(W, way.p)));
  const w = modOne(moved);
  return triplet(
    W,
    [0, 1, 2].map((i) => component(w, i)),
  );
}

/** Measured translations nearer to a fraction than this are written as that fraction; dimensionless. */
const NEAR_FRACTION = 0.02;
const DENOMINATORS = [1, 2, 3, 4, 6, 8, 12] as const;

/**
 * The same for an operation with a measured translation, which is written as a fraction near to it or else to three
 * decimals.
 * @param P axes of the cell wanted in terms of those that the operation is written in
 * @param p origin of the cell wanted, fractional in the old one
 */
export function measuredText({ W, w }: { readonly W: Operation["W"]; readonly w: Vec3 }, P: RatMat3, p: Vec3): string {
  const back = inverseRatMat(P);
  const turned = apply3(W, p);
  const moved = apply3(floatMatrix(back), [turned[0] + w[0] - p[0], turned[1] + w[1] - p[1], turned[2] + w[2] - p[2]]);
  return triplet(multiplyRatMat(multiplyRatMat(back, ratMat3(W)), P), moved.map(fractionNear));
}

function fractionNear(x: number): Rational {
  const part = x - Math.floor(x);
  for (const d of DENOMINATORS) {
    const n = Math.round(part * d);
    if (Math.abs(part - n / d) <= NEAR_FRACTION) return rational(n % d, d);
  }
  return rational(Math.round(part * 1000), 1000);
}

function triplet(W: RatMat3, w: readonly Rational[]): string {
  return [0, 1, 2]
    .map((i) => {
      const coefficients = [0, 1, 2].map((j) => rational(W.n[3 * i + j]!, W.d)) as [Rational, Rational, Rational];
      return formatExpression({ coefficients, constant: w[i]! }, "xyz");
    })
    .join(",");
}
