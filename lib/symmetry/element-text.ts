import {
  addRational,
  component,
  divideRational,
  type IntVec3,
  multiplyRational,
  negateRational,
  type Rational,
  type RatVec3,
  rational,
  ZERO,
} from "../algebra/index.ts";
import { formatForm, formThrough } from "./affine-form.ts";
import { type AffineExpression, formatExpression } from "./affine-text.ts";
import { oriented } from "./rotation-type.ts";

/**
 * A line as International Tables print it, `x,x-1/4,1/8`, `1/8,y+1/4,y`: called by the first letter that runs; the
 * constant left out of z where z runs, else of the first coordinate that runs.
 * @param through a point of the line
 * @param along its direction, oriented
 */
export function formatLine(through: RatVec3, along: IntVec3): string {
  const letter = along.findIndex((e) => e !== 0);
  const anchor = along[2] !== 0 ? 2 : letter;
  const s = divideRational(component(through, anchor), rational(along[anchor]!));
  const at = (i: number) =>
    addRational(component(through, i), negateRational(multiplyRational(s, rational(along[i]!))));
  return [0, 1, 2].map((i) => formatExpression(expression(letter, along[i]!, at(i)), "xyz")).join(",");
}

function expression(letter: number, factor: number, constant: Rational): AffineExpression {
  const coefficients = [ZERO, ZERO, ZERO] as [Rational, Rational, Rational];
  coefficients[letter] = rational(factor);
  return { coefficients, constant };
}

/**
 * A plane as International Tables print it, `x,1/4,z`, `x+1/2,-x,z`, `x,y+1/2,-y`: of two coordinates that depend on
 * each other the second carries no constant.
 * @param normal integer row h, the plane being h x = constant
 */
export function formatPlane(through: RatVec3, normal: IntVec3): string {
  const bound = [0, 1, 2].filter((i) => normal[i] !== 0);
  if (bound.length === 3) return formatForm(formThrough(through, directionsIn(normal)));
  if (bound.length === 1) {
    const fixed = bound[0]!;
    return [0, 1, 2]
      .map((i) =>
        formatExpression(i === fixed ? expression(0, 0, component(through, i)) : expression(i, 1, ZERO), "xyz"),
      )
      .join(",");
  }
  const [i, j] = bound as [number, number];
  const direction = [0, 0, 0];
  direction[i] = -normal[j]!;
  direction[j] = normal[i]!;
  const along = oriented(direction as unknown as IntVec3);
  const s = divideRational(component(through, j), rational(along[j]!));
  const constant = addRational(component(through, i), negateRational(multiplyRational(s, rational(along[i]!))));
  return [0, 1, 2]
    .map((k) => {
      if (k === i) return formatExpression(expression(i, along[i]!, constant), "xyz");
      return formatExpression(k === j ? expression(i, along[j]!, ZERO) : expression(k, 1, ZERO), "xyz");
    })
    .join(",");
}

function directionsIn([h, k, l]: IntVec3): IntVec3[] {
  return [
    [k, -h, 0],
    [0, l, -k],
    [l, 0, -h],
  ];
}
