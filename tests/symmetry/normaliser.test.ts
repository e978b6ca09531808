import { describe, expect, it } from "vitest";
import { determinant, type IntMat3, multiply, ratMat3, type ratVec3 } from "../../lib/algebra/index.ts";
import { axisChanges } from "../../lib/symmetry/axis-changes.ts";
import { groupProperties, normaliserShifts, normalisingShift, operationKey, reduce } from "../../lib/symmetry/index.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { transformOperation } from "../../lib/symmetry/transformation.ts";

/** Whether the group looks the same after the change. */
function keeps(number: number, P: IntMat3, p: ReturnType<typeof ratVec3>): boolean {
  const { operations } = referenceGroup(number);
  const keys = new Set(operations.map(operationKey));
  return operations.every((a) => {
    const moved = transformOperation(a, { P: ratMat3(P), p });
    return moved !== null && keys.has(operationKey(reduce(moved)));
  });
}

/** Changes of axes of the normaliser of a general metric, modulo those of the group, of both determinants. */
function axisClasses(number: number, free: (P: IntMat3) => boolean): number {
  const { crystalFamily } = groupProperties(number);
  const changes = crystalFamily === "triclinic" ? [[1, 0, 0, 0, 1, 0, 0, 0, 1] as IntMat3] : axisChanges(crystalFamily);
  const seen = new Set<string>();
  let classes = 0;
  for (const N of changes) {
    for (const sign of [1, -1]) {
      const P = N.map((e) => e * sign + 0) as unknown as IntMat3;
      if (!free(P) || normalisingShift(number, P) === null || seen.has(P.join())) continue;
      classes++;
      for (const { W } of referenceGroup(number).representatives) seen.add(multiply(W, P).join());
    }
  }
  return classes;
}

const diagonal = (P: IntMat3) => [1, 2, 3, 5, 6, 7].every((i) => P[i] === 0);
/** Twofold rotation about b, or nothing, up to inversion. */
const turned = (P: IntMat3) => diagonal(P) && P[0] === P[8];
const any = () => true;

const ORDERS: Readonly<Record<string, number>> = {
  "-1": 2,
  "2/m": 4,
  mmm: 8,
  "4/mmm": 16,
  "-3m": 12,
  "6/mmm": 24,
  "m-3": 24,
  "m-3m": 48,
};

/**
 * Index of the translations (of the discrete part, in polar groups), and crystal class, of the Euclidean normaliser for
 * a cell of general shape. Source: International Tables A, table of Euclidean normalisers (E. Koch, W. Fischer), from
 * memory.
 */
const NORMALISERS: readonly (readonly [number, translations: number, crystalClass: string])[] = [
  [2, 8, "-1"],
  [14, 8, "2/m"],
  [15, 4, "2/m"],
  [19, 8, "mmm"],
  [47, 8, "mmm"],
  [61, 8, "mmm"],
  [62, 8, "mmm"],
  [63, 4, "mmm"],
  [69, 2, "mmm"],
  [75, 2, "4/mmm"],
  [123, 4, "4/mmm"],
  [139, 2, "4/mmm"],
  [143, 3, "6/mmm"],
  [147, 2, "6/mmm"],
  [148, 2, "-3m"],
  [150, 2, "6/mmm"],
  [166, 2, "-3m"],
  [167, 2, "-3m"],
  [174, 6, "6/mmm"],
  [191, 2, "6/mmm"],
  [194, 2, "6/mmm"],
  [195, 2, "m-3m"],
  [198, 2, "m-3m"],
  [205, 2, "m-3"],
  [221, 2, "m-3m"],
  [216, 4, "m-3m"],
  [225, 2, "m-3m"],
  [227, 2, "m-3m"],
];

describe("the normaliser of a reference setting", () => {
  it.each(NORMALISERS)("of type %i has %i shifts of origin and the class %s", (number, translations, crystalClass) => {
    const family = groupProperties(number).crystalFamily;
    const free = family === "monoclinic" ? turned : family === "orthorhombic" ? diagonal : any;
    const rotations = ORDERS[crystalClass]! / referenceGroup(number).representatives.length;
    expect([normaliserShifts(number).length + 1, axisClasses(number, free)]).toEqual([translations, rotations]);
  });

  it("keeps the operations of every type", () => {
    for (let number = 1; number <= 230; number++) {
      for (const t of normaliserShifts(number)) {
        expect([number, t, keeps(number, [1, 0, 0, 0, 1, 0, 0, 0, 1], t)]).toEqual([number, t, true]);
      }
      const { crystalFamily } = groupProperties(number);
      for (const N of axisChanges(crystalFamily).slice(0, 24)) {
        const p = normalisingShift(number, N);
        if (p) expect([number, N, keeps(number, N, p)]).toEqual([number, N, true]);
      }
    }
  });

  it("does not turn an enantiomorphic type over", () => {
    const inversion: IntMat3 = [-1, 0, 0, 0, -1, 0, 0, 0, -1];
    for (const number of [76, 78, 91, 144, 152, 169, 212]) expect(normalisingShift(number, inversion)).toBeNull();
    for (const number of [19, 75, 150, 198, 207]) expect(normalisingShift(number, inversion)).not.toBeNull();
  });

  it("holds every rotation part of the group itself", () => {
    for (let number = 3; number <= 230; number += 4) {
      for (const { W } of referenceGroup(number).representatives) {
        if (determinant(W) === 1) expect([number, normalisingShift(number, W) === null]).toEqual([number, false]);
      }
    }
  });
});
