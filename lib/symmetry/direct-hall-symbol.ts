import {
  addVectors,
  equalVectors,
  type IntMat3,
  MINUS_IDENTITY,
  modOne,
  RAT_IDENTITY,
  type RatVec3,
  ratMat3,
  ratVec3,
  subtractVectors,
  transformVector,
  ZERO_VECTOR,
} from "../algebra/index.ts";
import { centringLetter, centringsOf } from "./centring.ts";
import { hallAxisVector, hallLetterVector, hallRotationMatrix } from "./hall-symbol.ts";
import {
  formatHallSymbol,
  type HallAxis,
  type HallLattice,
  type HallRotation,
  type HallSymbol,
} from "./hall-symbol-text.ts";
import type { Operation } from "./operation.ts";

/** `-2x`, `4z`, `2'`, `3*` as a specification of one rotation of a Hall symbol. */
interface RotationSpec {
  readonly improper: boolean;
  readonly order: HallRotation["order"];
  readonly axis: HallAxis | null;
  readonly principal: "x" | "y" | "z";
}

/**
 * Sets of generators by the order of the group they generate, in order of preference: cubic, axial with a second
 * axis, orthorhombic, then single axes. Written as in the symbols; a ' or " alone is seen along z.
 */
const PLANS: Readonly<Record<number, readonly string[]>> = {
  24: ["4z 2x 3*", "-4z 2x 3*"],
  12: ["2z 2x 3*", "6z 2'", "6z -2'", "-6z 2'", "-6z -2'"],
  8: ["4z 2x", "4z -2x", "-4z 2x", "-4z -2x", "4x 2y", "4x -2y", "-4x 2y", "-4x -2y", "4y 2x", "4y -2x"],
  6: ["6z", "-6z", "3z 2'", "3z -2'", '3z 2"', '3z -2"', "3* 2'", "3* -2'", "6x", "6y", "-6x", "-6y"],
  4: ["4z", "-4z", "4x", "4y", "-4x", "-4y", "2z 2x", "2z -2x", "-2z 2x", "-2z -2x", "2z 2'", "2z -2'", "-2z 2'"],
  3: ["3z", "3*", "3x", "3y"],
  2: ["2y", "-2y", "2z", "-2z", "2x", "-2x", "2'", "-2'", '2"', '-2"'],
  1: ["1"],
};

/**
 * A Hall symbol without change of basis that denotes exactly these operations, or null where there is none: rotations
 * in unusual orientations, translations that the letters cannot write. A shift along c in twelfths is tried.
 * @param operations all of them modulo Z^3, centrings included
 */
export function directHallSymbol(operations: readonly Operation[]): string | null {
  const lattice = hallLattice(centringsOf(operations));
  if (!lattice) return null;
  const byRotation = new Map<string, RatVec3[]>();
  for (const a of operations) {
    const key = a.W.join();
    const list = byRotation.get(key);
    if (list) list.push(a.w);
    else byRotation.set(key, [a.w]);
  }
  const plan = planFor(byRotation);
  if (!plan) return null;
  for (let k = 0; k < 12; k++) {
    const shift = ratVec3([0, 0, -k], 12);
    const symbol = symbolFor(plan, byRotation, lattice, shift);
    if (symbol) return formatHallSymbol(symbol);
  }
  return null;
}

function hallLattice(centrings: readonly RatVec3[]): HallLattice | null {
  const letter = centringLetter(centrings);
  if (letter !== "R") return letter as HallLattice | null;
  const obverse = ratVec3([2, 1, 1], 3);
  return centrings.some((t) => equalVectors(t, obverse)) ? "R" : "T";
}

function planFor(byRotation: ReadonlyMap<string, readonly RatVec3[]>): RotationSpec[] | null {
  const inverted = byRotation.has(MINUS_IDENTITY.join());
  const order = byRotation.size / (inverted ? 2 : 1);
  for (const text of PLANS[order] ?? []) {
    if (inverted && text.includes("-")) continue;
    const plan = text.split(" ").map(specOf);
    if (plan.every((spec) => byRotation.has(hallRotationMatrix(spec).join()))) return plan;
  }
  return null;
}

function specOf(text: string): RotationSpec {
  const improper = text.startsWith("-");
  const bare = improper ? text.slice(1) : text;
  const order = Number(bare[0]) as RotationSpec["order"];
  return { improper, order, axis: (bare[1] ?? null) as HallAxis | null, principal: "z" };
}

function symbolFor(
  plan: readonly RotationSpec[],
  byRotation: ReadonlyMap<string, readonly RatVec3[]>,
  lattice: HallLattice,
  shift: RatVec3,
): HallSymbol | null {
  const moved = (W: IntMat3) =>
    (byRotation.get(W.join()) ?? []).map((w) => {
      const image = transformVector(ratMat3(W), shift);
      return modOne(addVectors(subtractVectors(w, image), shift));
    });
  const inversions = moved(MINUS_IDENTITY);
  const centrosymmetric = inversions.some((w) => equalVectors(w, ZERO_VECTOR));
  const last: RotationSpec[] =
    inversions.length > 0 && !centrosymmetric ? [{ improper: true, order: 1, axis: null, principal: "z" }] : [];
  const rotations: HallRotation[] = [];
  for (const spec of [...plan, ...last]) {
    const written = simplest(spec, moved(hallRotationMatrix(spec)));
    if (!written) return null;
    // `P -1` needs no rotation 1 beside the inversion
    if (spec.order === 1 && !spec.improper && last.length > 0) continue;
    rotations.push({ ...spec, ...written, span: NOWHERE });
  }
  const change = shift.n[2] === 0 ? null : { P: RAT_IDENTITY, p: shift };
  return { centrosymmetric, lattice, rotations, change, spans: { lattice: NOWHERE, change: null } };
}

const NOWHERE = { start: 0, end: 0 };

/** The shortest way to write one of the translations, letters before screw numbers. */
function simplest(
  spec: RotationSpec,
  translations: readonly RatVec3[],
): { readonly screw: number; readonly translations: string } | null {
  const sums = letterSums();
  let best: { screw: number; translations: string } | null = null;
  for (let screw = 0; screw < spec.order; screw++) {
    const [x, y, z] = hallAxisVector(spec);
    const along = ratVec3([x * screw, y * screw, z * screw], spec.order);
    for (const w of translations) {
      const rest = modOne(subtractVectors(w, along));
      const letters = sums.get(`${rest.n.join()}/${rest.d}`);
      if (letters === undefined) continue;
      const option = { screw, translations: letters };
      if (!best || rank(option) < rank(best)) best = option;
    }
  }
  return best;
}

/** Shorter texts first, then by letter, so that the order of the operations does not matter. */
function rank(option: { readonly screw: number; readonly translations: string }): string {
  return `${option.translations.length + (option.screw ? 1 : 0)}${option.screw}${option.translations}`;
}

let sums: ReadonlyMap<string, string> | null = null;

/** Every translation that up to four different letters add up to, with the first shortest way to write it. */
function letterSums(): ReadonlyMap<string, string> {
  if (sums) return sums;
  const found = new Map<string, string>();
  let layer: { text: string; v: RatVec3 }[] = [{ text: "", v: ZERO_VECTOR }];
  for (let length = 0; length <= 4; length++) {
    for (const { text, v } of layer) {
      const key = `${v.n.join()}/${v.d}`;
      if (!found.has(key)) found.set(key, text);
    }
    layer = layer.flatMap(({ text, v }) =>
      [..."abcnuvwd"]
        .filter((l) => text === "" || "abcnuvwd".indexOf(l) > "abcnuvwd".indexOf(text.at(-1)!))
        .map((l) => ({ text: text + l, v: modOne(addVectors(v, hallLetterVector(l))) })),
    );
  }
  sums = found;
  return found;
}
