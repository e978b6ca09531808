import { describe, expect, it } from "vitest";
import { arithmeticClasses, arithmeticClassOf } from "../../lib/symmetry/arithmetic-class.ts";
import { crystalFamily, geometricClass, geometricClassNames, signedOrder } from "../../lib/symmetry/geometric-class.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { operationKey, reduce } from "../../lib/symmetry/operation.ts";
import { formatOperation } from "../../lib/symmetry/operation-text.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { spaceGroupTypes } from "../../lib/symmetry/space-group-type.ts";

describe("the 73 arithmetic classes", () => {
  it("are 73 and hold each of the 230 types once", () => {
    const all = geometricClassNames().flatMap(arithmeticClasses);
    expect(all.length).toBe(73);
    expect(new Set(all.map((a) => a.name)).size).toBe(73);
    expect(all.flatMap((a) => a.types.map((t) => t.number)).sort((a, b) => a - b)).toEqual(
      Array.from({ length: 230 }, (_, i) => i + 1),
    );
  });

  it("generate the groups of the Hall symbols, operation by operation", () => {
    for (const { number, hall } of spaceGroupTypes()) {
      const ours = referenceGroup(number).operations.map(operationKey).sort();
      const theirs = operationsFromHall(hall)
        .operations.map((a) => operationKey(reduce(a)))
        .sort();
      expect(ours, `${number}`).toEqual(theirs);
    }
  });

  it("know their geometric class by counting rotations", () => {
    for (const { number } of spaceGroupTypes()) {
      const { representatives } = referenceGroup(number);
      const counted = geometricClass(representatives.map((a) => signedOrder(a.W)));
      expect(counted, `${number}`).toBe(arithmeticClassOf(number).geometric);
    }
  });

  it("belong to the crystal family of their number", () => {
    const bounds = [2, 15, 74, 142, 194, 230];
    const names = ["triclinic", "monoclinic", "orthorhombic", "tetragonal", "hexagonal", "cubic"];
    for (let n = 1; n <= 230; n++) {
      expect(crystalFamily(arithmeticClassOf(n).geometric)).toBe(names[bounds.findIndex((b) => n <= b)]);
    }
  });
});

describe("the order of the general position", () => {
  // International Tables for Crystallography A, the numbered triplets of the general position, from memory.
  it.each([
    [14, "x,y,z -x,y+1/2,-z+1/2 -x,-y,-z x,-y+1/2,z+1/2"],
    [62, "x,y,z -x+1/2,-y,z+1/2 -x,y+1/2,-z x+1/2,-y+1/2,-z+1/2 -x,-y,-z x+1/2,y,-z+1/2 x,-y+1/2,z -x+1/2,y+1/2,z+1/2"],
    [113, "x,y,z -x,-y,z y,-x,-z -y,x,-z -x+1/2,y+1/2,-z x+1/2,-y+1/2,-z -y+1/2,-x+1/2,z y+1/2,x+1/2,z"],
    [
      178,
      "x,y,z -y,x-y,z+1/3 -x+y,-x,z+2/3 -x,-y,z+1/2 y,-x+y,z+5/6 x-y,x,z+1/6 y,x,-z+1/3 x-y,-y,-z -x,-x+y,-z+2/3 -y,-x,-z+5/6 -x+y,y,-z+1/2 x,x-y,-z+1/6",
    ],
    [
      198,
      "x,y,z -x+1/2,-y,z+1/2 -x,y+1/2,-z+1/2 x+1/2,-y+1/2,-z z,x,y z+1/2,-x+1/2,-y -z+1/2,-x,y+1/2 -z,x+1/2,-y+1/2 y,z,x -y,z+1/2,-x+1/2 y+1/2,-z+1/2,-x -y+1/2,-z,x+1/2",
    ],
  ])("of type %i is the printed one", (number, text) => {
    expect(referenceGroup(number).representatives.map(formatOperation).join(" ")).toBe(text);
  });

  it("of the face-centred diamond type with centre at origin is the printed one", () => {
    const first = referenceGroup(227).representatives.slice(0, 16).map(formatOperation);
    expect(first.slice(0, 4)).toEqual(["x,y,z", "-x+3/4,-y+1/4,z+1/2", "-x+1/4,y+1/2,-z+3/4", "x+1/2,-y+3/4,-z+1/4"]);
    expect(first.slice(12)).toEqual(["y+3/4,x+1/4,-z+1/2", "-y,-x,-z", "y+1/4,-x+1/2,z+3/4", "-y+1/2,x+3/4,z+1/4"]);
  });
});
