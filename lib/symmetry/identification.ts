import {
  adjugate,
  apply,
  determinant,
  equal,
  IDENTITY,
  type IntMat3,
  type IntVec3,
  lcm,
  multiply,
  type RatMat3,
  ratMat3,
  transpose,
} from "../algebra/index.ts";
import { InputProblem } from "../problem.ts";
import { type ArithmeticClass, arithmeticClasses } from "./arithmetic-class.ts";
import { axisChanges } from "./axis-changes.ts";
import { centringsOf, primitiveBasis } from "./centring.ts";
import { type ClassLattice, classLattice, matrixCode, typeOfTranslations } from "./class-lattice.ts";
import { conventionalAxes } from "./conventional-axes.ts";
import { crystalFamily, type GeometricClass, geometricClass, signedOrder } from "./geometric-class.ts";
import { type Operation, sameOperation } from "./operation.ts";
import { originShift } from "./origin-shift.ts";
import { referenceGroup } from "./reference-group.ts";
import { IDENTITY_TRANSFORMATION, type Transformation } from "./transformation.ts";

/** Type of a space group, and the way to the reference setting of that type. */
export interface Identification {
  /** 1 to 230. */
  readonly number: number;
  /** Carries every operation exactly onto one of the reference setting, modulo its lattice; det P > 0. */
  readonly transformation: Transformation;
}

/**
 * Type of the space group given by all its operations modulo the lattice Z^3 of the cell they are written in, whatever
 * that cell is: primitive or centred, skew, with any origin. The basis is taken to be right-handed, so enantiomorphic
 * types (P 41 and P 43) are told apart; in a left-handed basis the type found is that of the mirror image.
 * The transformation is the one nearest to the identity that the search meets: the identity itself if the group is in
 * its reference setting, else the one with the fewest negative entries in P, then the smallest change of P, then the
 * smallest p. The result depends on nothing but the group.
 * @param operations a complete group with integer W; a list that is no group gives a meaningless answer or an error
 * @param guess a type to try first: if the operations are exactly those of its reference setting, nothing is searched
 * @throws InputProblem `operations-no-space-group` if the rotation parts form no crystallographic point group that
 * keeps the lattice
 * Sources: R. W. Grosse-Kunstleve, Acta Cryst. A55 (1999) 383 (axes, change-of-basis candidates); origin from the
 * Smith normal form as in R. W. Grosse-Kunstleve and P. D. Adams, Acta Cryst. A58 (2002) 60. The type is read from the
 * components that no origin shift alters (the class of the translations in the first cohomology of the point group:
 * H. Zassenhaus, Comment. Math. Helv. 21 (1948) 117).
 */
export function identify(operations: readonly Operation[], guess: number | null = null): Identification {
  if (guess !== null && isReferenceOf(guess, operations)) {
    return { number: guess, transformation: IDENTITY_TRANSFORMATION };
  }
  const input = conventional(operations);
  for (const parent of arithmeticClasses(input.geometric)) {
    const lattice = classLattice(parent);
    if (lattice.index !== input.index) continue;
    const found = search(input, parent, lattice);
    if (found) return found;
  }
  throw noSpaceGroup("they belong to none of the 230 types");
}

/** Whether the operations are those of the reference setting of a type; false for a number that is none. */
function isReferenceOf(number: number, operations: readonly Operation[]): boolean {
  if (!Number.isInteger(number) || number < 1 || number > 230) return false;
  const reference = referenceGroup(number);
  if (reference.operations.length !== operations.length) return false;
  // Most files list them in the printed order, so the next one is looked at first.
  const count = operations.length;
  return reference.operations.every((a, at) => {
    for (let i = 0; i < count; i++) if (sameOperation(a, operations[(at + i) % count]!)) return true;
    return false;
  });
}

/** The group carried to conventional axes of its family. */
interface ConventionalGroup {
  readonly geometric: GeometricClass;
  /** Number of lattice points in the conventional cell. */
  readonly index: number;
  /** Conventional axes in the cell of the operations, columns; the denominator kept as it came. */
  readonly axes: { readonly n: IntMat3; readonly d: number };
  /** By code of the rotation part in conventional axes: translation numerators over `d`. */
  readonly byCode: ReadonlyMap<number, IntVec3>;
  readonly d: number;
  /** Numerators, over `index`, of a basis of the lattice in conventional axes: columns. */
  readonly lattice: IntMat3;
  /** Centring translations in the cell of the operations. */
  readonly centrings: Transformation["p"][];
}

function conventional(operations: readonly Operation[]): ConventionalGroup {
  const centrings = centringsOf(operations);
  const basis = primitiveBasis(centrings);
  const representatives = onePerRotation(operations);
  if (representatives.length * centrings.length !== operations.length) {
    throw noSpaceGroup("not every rotation part comes with every centring translation");
  }
  const rotations = representatives.map((a) => inBasis(a.W, basis.n));
  const geometric = classOf(rotations);
  const family = crystalFamily(geometric);
  const M = conventionalAxes(rotations, family, multiply(transpose(basis.n), basis.n));
  const axes = multiply(basis.n, M);
  const back = adjugate(axes);
  const det = determinant(axes);
  const d = representatives.reduce((m, a) => lcm(m, a.w.d), basis.d);
  const byCode = new Map<number, IntVec3>();
  for (let i = 0; i < representatives.length; i++) {
    const { w } = representatives[i]!;
    const k = (basis.d * d) / w.d;
    const image = apply(back, w.n);
    byCode.set(matrixCode(inBasis(rotations[i]!, M)), [image[0] * k, image[1] * k, image[2] * k]);
  }
  const index = determinant(M);
  return { geometric, index, axes: { n: axes, d: basis.d }, byCode, d: det * d, lattice: adjugate(M), centrings };
}

function onePerRotation(operations: readonly Operation[]): Operation[] {
  const seen = new Set<string>();
  return operations.filter((a) => {
    const key = a.W.join();
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
}

/** B^-1 W B, which is integer where the lattice spanned by the columns of B is kept by W. */
function inBasis(W: IntMat3, B: IntMat3): IntMat3 {
  const det = determinant(B);
  const image = multiply(multiply(adjugate(B), W), B);
  if (det === 1) return image;
  for (const e of image) if (e % det !== 0) throw noSpaceGroup("a rotation part does not keep the lattice");
  return image.map((e) => e / det) as unknown as IntMat3;
}

function classOf(rotations: readonly IntMat3[]): GeometricClass {
  let found: GeometricClass | null = null;
  try {
    found = geometricClass(rotations.map(signedOrder));
  } catch {
    throw noSpaceGroup("a rotation part is of no crystallographic type");
  }
  if (!found) throw noSpaceGroup("their rotation parts are not those of a crystallographic point group");
  return found;
}

function noSpaceGroup(why: string): InputProblem {
  return new InputProblem(
    "operations-no-space-group",
    `the operations are not those of a space group: ${why}`,
    null,
    "complete the list of operations, or correct the one that does not fit the others",
  );
}

/** The nearest change of axes for which the translations are, up to an origin shift, those of a type of the class. */
function search(input: ConventionalGroup, parent: ArithmeticClass, lattice: ClassLattice): Identification | null {
  const candidates = axisChanges(crystalFamily(input.geometric))
    .map((N, i) => ({ N, settings: lattice.settings[i]! }))
    .filter(({ settings }) => fits(input, settings))
    .map((c) => ({ ...c, P: multiply(input.axes.n, c.N) }))
    .sort((a, b) => byNearness(a.P, b.P, input.axes.d));
  for (const { settings, P } of candidates) {
    const translations = settings.codes.map((code) => apply(settings.toPrimitive, input.byCode.get(code)!));
    const type = typeOfTranslations(lattice, translations, input.d);
    if (!type) continue;
    const basis: RatMat3 = ratMat3(P, input.axes.d);
    const p = originShift(lattice, type.primitive, translations, input.d, basis, input.centrings);
    return { number: parent.types[type.index]!.number, transformation: { P: basis, p } };
  }
  return null;
}

/** Whether lattice and generators of the class, carried back by the change of axes, are those of the group. */
function fits(input: ConventionalGroup, settings: ClassLattice["settings"][number]): boolean {
  if (!settings.codes.every((code) => input.byCode.has(code))) return false;
  return input.index === 1 || multiply(settings.toPrimitive, input.lattice).every((e) => e % input.index === 0);
}

/** Order of change-of-basis matrices n/d: the identity, few negative entries, little change, then entry by entry. */
function byNearness(a: IntMat3, b: IntMat3, d: number): number {
  const unit = IDENTITY.map((e) => e * d) as unknown as IntMat3;
  const identity = Number(equal(b, unit)) - Number(equal(a, unit));
  const negative = count(a) - count(b);
  const change = distance(a, unit) - distance(b, unit);
  if (identity || negative || change) return identity || negative || change;
  for (let i = 0; i < 9; i++) if (a[i] !== b[i]) return b[i]! - a[i]!;
  return 0;
}

function count(m: IntMat3): number {
  return m.reduce<number>((n, e) => n + (e < 0 ? 1 : 0), 0);
}

function distance(a: IntMat3, b: IntMat3): number {
  return a.reduce<number>((n, e, i) => n + Math.abs(e - b[i]!), 0);
}
