import { describe, expect, it } from "vitest";
import { ratDeterminant } from "../../lib/algebra/index.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { identify } from "../../lib/symmetry/identification.ts";
import { IDENTITY_OPERATION, type Operation, operationKey } from "../../lib/symmetry/operation.ts";
import { parseOperation } from "../../lib/symmetry/operation-text.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { IDENTITY_TRANSFORMATION, type Transformation } from "../../lib/symmetry/transformation.ts";
import { formatTransformation, parseTransformation } from "../../lib/symmetry/transformation-text.ts";
import { inSetting, randomSetting, seeded } from "./random-setting.ts";

const ALL = Array.from({ length: 230 }, (_, i) => i + 1);

/** Keys of the operations carried by t, those of the old cell's translations included, sorted. */
function carried(operations: readonly Operation[], t: Transformation): string[] {
  return inSetting({ operations }, t)!.map(operationKey).sort();
}

describe("identify", () => {
  it("leaves a group in its reference setting alone, whatever the order of its operations", () => {
    for (const number of ALL) {
      const found = identify([...referenceGroup(number).operations].reverse());
      expect(found.number).toBe(number);
      expect(found.transformation, `${number}`).toEqual(IDENTITY_TRANSFORMATION);
    }
  });

  it("finds the type and an exact way to the reference setting in 20 random settings of each type", () => {
    const random = seeded(20240229);
    for (const number of ALL) {
      const group = referenceGroup(number);
      const expected = group.operations.map(operationKey).sort();
      for (let k = 0; k < 20; k++) {
        const { t, operations } = randomSetting(group, random);
        const { number: found, transformation } = identify(operations);
        expect(found, `${number} in ${formatTransformation(t)}`).toBe(number);
        expect(ratDeterminant(transformation.P).n).toBeGreaterThan(0);
        expect(carried(operations, transformation), `${number} in ${formatTransformation(t)}`).toEqual(expected);
      }
    }
  });

  it.each([
    [76, 78],
    [91, 95],
    [92, 96],
    [144, 145],
    [151, 153],
    [152, 154],
    [169, 170],
    [171, 172],
    [178, 179],
    [180, 181],
    [212, 213],
  ])("takes types %i and %i for each other when axes are left-handed", (one, other) => {
    const mirrored = parseTransformation("-a,-b,-c;0,0,0");
    expect(identify(inSetting(referenceGroup(one), mirrored)!).number).toBe(other);
    expect(identify(inSetting(referenceGroup(other), mirrored)!).number).toBe(one);
  });

  it("knows only the eleven pairs of enantiomorphic types", () => {
    const mirrored = parseTransformation("-a,-b,-c;0,0,0");
    const changed = ALL.filter((n) => identify(inSetting(referenceGroup(n), mirrored)!).number !== n);
    expect(changed.length).toBe(22);
  });

  it.each([
    ["-P 2yn", 14],
    ["-P 2yab", 14],
    ["-P 2c 2ab", 62], // P b n m by its Hall symbol's own axes
    ["-P 2c 2n", 62],
    ["-I 2yc", 15],
    ["F 4d 2 3 -1d", 227],
    ["P 3* 2", 155],
  ])("knows the other setting %s as type %i", (hall, number) => {
    expect(identify(operationsFromHall(hall).operations).number).toBe(number);
  });

  it("goes from P 21/n to P 21/c by the change of c alone", () => {
    const { transformation } = identify(operationsFromHall("-P 2yn").operations);
    expect(formatTransformation(transformation)).toBe("a,b,a+c;0,0,0");
  });

  it("goes from origin choice 1 to 2 of F d -3 m by an eighth of the diagonal", () => {
    const { transformation } = identify(operationsFromHall("F 4d 2 3 -1d").operations);
    expect(formatTransformation(transformation)).toBe("a,b,c;1/8,1/8,1/8");
  });

  it("gives the same answer whatever the order of the operations", () => {
    const random = seeded(7);
    for (const number of [14, 62, 148, 227]) {
      const { operations } = randomSetting(referenceGroup(number), random);
      const shuffled = [...operations].sort((a, b) => (operationKey(a) < operationKey(b) ? -1 : 1));
      expect(identify(shuffled)).toEqual(identify(operations));
    }
  });

  it("refuses a list that is no group", () => {
    const half = [IDENTITY_OPERATION, parseOperation("-x,-y,z"), parseOperation("x+1/2,y+1/2,z+1/2")];
    expect(() => identify(half)).toThrow("not every rotation part comes with every centring translation");
    const loose = [IDENTITY_OPERATION, parseOperation("-x,-y,z"), parseOperation("-x,y,-z")];
    expect(() => identify(loose)).toThrow("not those of a crystallographic point group");
  });
});
