import { IDENTITY, multiply, negate } from "../algebra/index.ts";
import { twiceCosine } from "./axial-characters.ts";
import { closeTo, type Matrix3 } from "./cartesian.ts";
import { LARGEST_ORDER } from "./molecular-analysis.ts";

/** An element of an axial group: rotation by a part of a turn, or reflection at the line at half that part from x. */
interface Code {
  readonly part: number;
  readonly of: number;
  readonly reflects?: boolean;
  readonly flips?: boolean;
}

/** Other names of some molecular groups. */
const ALIASES: Readonly<Record<string, string>> = {
  C1h: "Cs",
  C1v: "Cs",
  S1: "Cs",
  S2: "Ci",
  C3i: "S6",
  D1: "C2",
  D1h: "C2v",
  D1d: "C2h",
  V: "D2",
  Vh: "D2h",
  Vd: "D2d",
};

/** The usual name of a finite molecular group. @throws RangeError if the name is not known or the group too large */
export function molecularName(name: string): string {
  const plain = Object.hasOwn(ALIASES, name) ? ALIASES[name]! : name;
  const odd = /^S(\d*[13579])$/.exec(plain);
  if (odd) return molecularName(`C${odd[1]}h`);
  const axial = /^([CDS])([1-9]\d*)([hvd]?)$/.exec(plain);
  const known = ["Cs", "Ci", "T", "Td", "Th", "O", "Oh", "I", "Ih"].includes(plain);
  if (!known && (!axial || /^C\d+d|^D\d+v|^S\d+[hvd]/.test(plain))) {
    throw new RangeError(`"${name}" is not the name of a finite point group`);
  }
  return plain;
}

/**
 * Matrices of a molecular group in its standard orientation: principal axis along z, a C2' axis along x, or else a
 * vertical plane through x; perpendicular axes of order 4 or 2 of the cubic and icosahedral groups along x, y, z.
 * @param name as `molecularName` returns it
 */
export function molecularMatrices(name: string): Matrix3[] {
  const polyhedral = POLYHEDRAL[name];
  if (polyhedral) return close(polyhedral());
  if (name === "Cs") return [IDENTITY, matrixOf({ part: 0, of: 1, flips: true })];
  if (name === "Ci") return [IDENTITY, negate(IDENTITY)];
  const [, letter = "", digits = "", suffix = ""] = /^([CDS])(\d+)([hvd]?)$/.exec(name)!;
  const n = Number(digits);
  const order = n * (letter === "D" ? 2 : 1) * (suffix === "" ? 1 : 2);
  if (order > LARGEST_ORDER) throw new RangeError(`${name} has order ${order}; the largest order is ${LARGEST_ORDER}`);
  return codes(letter, n, suffix).map(matrixOf);
}

function codes(letter: string, n: number, suffix: string): Code[] {
  const parts = Array.from({ length: n }, (_, part) => ({ part, of: n }));
  if (letter === "S") return parts.map((c) => ({ ...c, flips: c.part % 2 === 1 }));
  const lateral = parts.map((c) => ({ ...c, reflects: true, flips: letter === "D" }));
  const half = letter === "D" ? [...parts, ...lateral] : parts;
  if (suffix === "v") return [...parts, ...lateral];
  if (suffix === "h") return [...half, ...half.map((c: Code) => ({ ...c, flips: !c.flips }))];
  if (suffix === "d") {
    const between = parts.map((c) => ({ part: 2 * c.part + 1, of: 2 * n }));
    return [...half, ...between.map((c) => ({ ...c, flips: true })), ...between.map((c) => ({ ...c, reflects: true }))];
  }
  return half;
}

function matrixOf({ part, of, reflects = false, flips = false }: Code): Matrix3 {
  const c = twiceCosine(part, of) / 2;
  // sin(a) = cos(a - quarter of a turn), so that both are exact where they are halves of integers
  const s = twiceCosine(4 * part - of + 4 * of, 4 * of) / 2;
  const k = reflects ? -1 : 1;
  return [c, -s * k + 0, 0, s, c * k + 0, 0, 0, 0, flips ? -1 : 1];
}

const HALF_TURN_Z: Matrix3 = [-1, 0, 0, 0, -1, 0, 0, 0, 1];
const HALF_TURN_X: Matrix3 = [1, 0, 0, 0, -1, 0, 0, 0, -1];
const QUARTER_TURN_Z: Matrix3 = [0, -1, 0, 1, 0, 0, 0, 0, 1];
const THIRD_TURN: Matrix3 = [0, 0, 1, 1, 0, 0, 0, 1, 0];
const INVERSION: Matrix3 = [-1, 0, 0, 0, -1, 0, 0, 0, -1];

/** Rotation by a fifth of a turn about (0, 1, golden ratio). */
function fifthTurn(): Matrix3 {
  const g = (1 + Math.sqrt(5)) / 2;
  const [p, q, h] = [g / 2, (g - 1) / 2, 0.5];
  return [q, -p, h, p, h, q, -h, q, p];
}

const POLYHEDRAL: Readonly<Record<string, () => Matrix3[]>> = {
  T: () => [HALF_TURN_Z, HALF_TURN_X, THIRD_TURN],
  Th: () => [HALF_TURN_Z, HALF_TURN_X, THIRD_TURN, INVERSION],
  Td: () => [negate(QUARTER_TURN_Z), THIRD_TURN],
  O: () => [QUARTER_TURN_Z, THIRD_TURN],
  Oh: () => [QUARTER_TURN_Z, THIRD_TURN, INVERSION],
  I: () => [HALF_TURN_Z, THIRD_TURN, fifthTurn()],
  Ih: () => [HALF_TURN_Z, THIRD_TURN, fifthTurn(), INVERSION],
};

/** All products of the generators; entries of icosahedral groups are put back on their closed form after each. */
function close(generators: readonly Matrix3[]): Matrix3[] {
  const list: Matrix3[] = [IDENTITY];
  for (let i = 0; i < list.length && list.length <= LARGEST_ORDER; i++) {
    for (const g of generators) {
      const product = multiply(list[i]!, g).map(closedEntry) as unknown as Matrix3;
      if (!list.some((M) => closeTo(M, product))) list.push(product);
    }
  }
  return list;
}

/** The entry of an icosahedral matrix nearest to a number: 0, 1/2, 1, g/2 or (g - 1)/2 with g the golden ratio. */
function closedEntry(x: number): number {
  const g = (1 + Math.sqrt(5)) / 2;
  for (const e of [0, 1, 0.5, g / 2, (g - 1) / 2]) if (Math.abs(Math.abs(x) - e) < 1e-9) return Math.sign(x) * e + 0;
  return x;
}
