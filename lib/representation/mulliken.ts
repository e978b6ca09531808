import { type ElementCharacter, twiceCosine } from "./axial-characters.ts";

/**
 * Elements on which the characters decide the label; -1 where the group has none.
 * Source of the rules: R. S. Mulliken, J. Chem. Phys. 23 (1955) 1997.
 */
export interface LabelMarks {
  /** Rotation (or, without inversion and horizontal plane, rotoinversion) by the smallest angle 1/n about z. */
  readonly principal: number;
  readonly n: number;
  readonly inversion: number;
  /** Horizontal plane, used where there is no inversion. */
  readonly horizontal: number;
  /** Decides subscripts 1 and 2 of A and B: C2', else sigma_v; in C2v sigma(xz). */
  readonly secondary: number;
  /** D2 and D2h: the twofold rotations about x, y, z. */
  readonly twofolds: readonly [number, number, number] | null;
  /** T, O and their kin: a rotation of order 4, or the rotoinversion where there is no inversion. */
  readonly fourfold: number;
  /** I and Ih: a proper rotation by a fifth of a turn. */
  readonly fivefold: number;
}

export const NO_MARKS: LabelMarks = {
  principal: -1,
  n: 1,
  inversion: -1,
  horizontal: -1,
  secondary: -1,
  twofolds: null,
  fourfold: -1,
  fivefold: -1,
};

/** Labels in ASCII, in the order of the characters given: `A1g`, `E'`, `A2''`, `T2`, `E1u`. */
export function mullikenLabels(characters: readonly ElementCharacter[], marks: LabelMarks): string[] {
  const parity = characters.map((c) => paritySuffix(c, marks));
  return characters.map((c, i) => {
    const alone = !characters.some((d, j) => j !== i && d.dimension === c.dimension && parity[j] === parity[i]);
    return letter(c, marks) + subscript(c, marks, alone) + parity[i]!;
  });
}

function letter(c: ElementCharacter, m: LabelMarks): string {
  if (c.dimension > 1) return "ETGH"[c.dimension - 2]!;
  if (m.twofolds) return m.twofolds.every((t) => c.values[t]! > 0) ? "A" : "B";
  return m.principal >= 0 && c.values[m.principal]! < 0 ? "B" : "A";
}

function subscript(c: ElementCharacter, m: LabelMarks, alone: boolean): string {
  if (c.dimension === 3) return m.fourfold < 0 && m.fivefold < 0 ? "" : threefoldIndex(c, m);
  if (c.dimension === 2) return alone ? "" : String(turnsPerTurn(c, m));
  if (c.dimension !== 1) return "";
  if (m.fourfold >= 0) return c.values[m.fourfold]! > 0 ? "1" : "2";
  if (m.twofolds) {
    const along = m.twofolds.findIndex((t) => c.values[t]! > 0);
    return m.twofolds.every((t) => c.values[t]! > 0) ? "" : String(3 - along);
  }
  if (m.secondary < 0) return "";
  return c.values[m.secondary]! > 0 ? "1" : "2";
}

function threefoldIndex(c: ElementCharacter, m: LabelMarks): string {
  const decisive = m.fivefold >= 0 ? m.fivefold : m.fourfold;
  return c.values[decisive]! > 0 ? "1" : "2";
}

/** k of E_k: its character on the principal element is 2 cos(2 pi k / n). */
function turnsPerTurn(c: ElementCharacter, m: LabelMarks): number {
  for (let k = 1; 2 * k < m.n; k++) {
    if (Math.abs(c.values[m.principal]! - twiceCosine(k, m.n)) < 1e-9) return k;
  }
  throw new RangeError(`no species E of order ${m.n} has the character ${c.values[m.principal]}`);
}

function paritySuffix(c: ElementCharacter, m: LabelMarks): string {
  if (m.inversion >= 0) return c.values[m.inversion]! > 0 ? "g" : "u";
  if (m.horizontal >= 0) return c.values[m.horizontal]! > 0 ? "'" : "''";
  return "";
}

/** Order of species in a table: even before odd (' before ''), then A, B, E, T, G, H, then subscripts. */
export function compareLabels(a: string, b: string): number {
  return labelRank(a) - labelRank(b);
}

function labelRank(label: string): number {
  const odd = label.endsWith("u") || label.endsWith("''");
  const index = Number(/\d+/.exec(label)?.[0] ?? 0);
  return (odd ? 1e6 : 0) + "ABETGH".indexOf(label[0]!) * 1e4 + index;
}
