import {
  addVectors,
  apply,
  type IntMat3,
  type IntVec3,
  primitiveRow,
  type RatVec3,
  ratVec3,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { formatLine, formatPlane } from "./element-text.ts";
import { matrixOrder, splitTranslation } from "./intrinsic-part.ts";
import type { Operation } from "./operation.ts";
import { type RotationType, rotationType } from "./rotation-type.ts";
import { formatVector } from "./transformation-text.ts";

/** What an operation is geometrically. */
export interface GeometricMeaning {
  readonly kind:
    | "identity"
    | "translation"
    | "inversion"
    | "rotation"
    | "screw rotation"
    | "rotoinversion"
    | "reflection"
    | "glide reflection";
  /** `1`, `t`, `-1`, `2`, `3+`, `4-`, `-3+`, `m`, `a`, `b`, `c`, `n`, `d`, `g`. */
  readonly symbol: string;
  /** Screw or glide vector, or the translation; zero for the others. */
  readonly intrinsic: RatVec3;
  /** Axis or plane as a triplet, `0,1/4,z`; the point of an inversion; null for identity and translation. */
  readonly element: string | null;
  /** Inversion point on the axis of a rotoinversion. */
  readonly point: string | null;
  /** All of it as International Tables print it: `2(0,0,1/2) 0,1/4,z`; `-3+ x,x,x; 0,0,0`; `d(1/4,1/4,1/4) x,x,z`. */
  readonly text: string;
}

/**
 * Geometric meaning of an operation, exact, from its matrix and its translation as it stands (not modulo the lattice).
 * Source: International Tables for Crystallography A (2016), section 1.2.2.4 (method), chapter 2.1 (symbols).
 */
export function geometricMeaning(a: Operation): GeometricMeaning {
  const type = rotationType(a.W);
  const { intrinsic, location } = splitTranslation(a);
  if (type.axis === null) return withoutAxis(a, type.improper);
  const fixed = fixedPoint(a.W, location);
  const moves = intrinsic.n.some((n) => n !== 0);
  if (type.improper && type.order === 2) {
    const normal = planeNormal(a.W);
    const symbol = moves ? glideSymbol(intrinsic, normal) : "m";
    const element = formatPlane(fixed, normal);
    const kind = moves ? "glide reflection" : "reflection";
    return meaning(kind, symbol, intrinsic, element, null, !"mabc".includes(symbol));
  }
  const symbol = axisSymbol(type);
  const element = formatLine(fixed, type.axis);
  if (type.improper) return meaning("rotoinversion", symbol, ZERO_VECTOR, element, formatVector(fixed), false);
  return meaning(moves ? "screw rotation" : "rotation", symbol, intrinsic, element, null, moves);
}

function withoutAxis(a: Operation, improper: boolean): GeometricMeaning {
  if (improper) {
    const centre = ratVec3(a.w.n, a.w.d * 2);
    return meaning("inversion", "-1", ZERO_VECTOR, formatVector(centre), null, false);
  }
  const moves = a.w.n.some((n) => n !== 0);
  if (!moves) return meaning("identity", "1", ZERO_VECTOR, null, null, false);
  return meaning("translation", "t", a.w, null, null, true);
}

function meaning(
  kind: GeometricMeaning["kind"],
  symbol: string,
  intrinsic: RatVec3,
  element: string | null,
  point: string | null,
  vectorShown: boolean,
): GeometricMeaning {
  const vector = vectorShown ? `(${formatVector(intrinsic)})` : "";
  const text = `${symbol}${vector}${element === null ? "" : ` ${element}`}${point === null ? "" : `; ${point}`}`;
  return { kind, symbol, intrinsic, element, point, text };
}

function axisSymbol({ order, improper, sense }: RotationType): string {
  return `${improper ? "-" : ""}${order}${sense === 0 ? "" : sense > 0 ? "+" : "-"}`;
}

/** A point that x -> W x + w keeps, w without intrinsic part: the centroid of the orbit of the origin. */
function fixedPoint(W: IntMat3, w: RatVec3): RatVec3 {
  const k = matrixOrder(W);
  let sum = ZERO_VECTOR;
  let image = ZERO_VECTOR;
  for (let i = 0; i < k; i++) {
    sum = addVectors(sum, image);
    image = addVectors(ratVec3(apply(W, image.n), image.d), w);
  }
  return ratVec3(sum.n, sum.d * k);
}

/** Integer row h of the planes h x = constant that a reflection keeps: any non-zero row of W - 1. */
function planeNormal(W: IntMat3): IntVec3 {
  const rows = [0, 1, 2].map((i) => [0, 1, 2].map((j) => W[3 * i + j]! - (i === j ? 1 : 0)));
  return primitiveRow(rows.find((row) => row.some((e) => e !== 0))!) as unknown as IntVec3;
}

/** Letter of a glide by its vector alone: half an axis, half a diagonal, quarters of two or three axes, or another. */
function glideSymbol(g: RatVec3, normal: IntVec3): string {
  const halves = g.n.map((n) => (2 * n) / g.d);
  const nonzero = [0, 1, 2].filter((i) => g.n[i] !== 0);
  const wanted = normal.filter((h) => h !== 0).length === 1 ? 2 : 3;
  if (nonzero.length === 1 && Math.abs(halves[nonzero[0]!]!) === 1) return "abc"[nonzero[0]!]!;
  if (nonzero.length !== wanted) return "g";
  if (nonzero.every((i) => Math.abs(halves[i]!) === 1)) return "n";
  return nonzero.every((i) => Math.abs(2 * halves[i]!) % 2 === 1) ? "d" : "g";
}
