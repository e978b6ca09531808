import { describe, expect, it } from "vitest";
import { apply, ratVec3 } from "../../lib/algebra/index.ts";
import { directionsOfForm, formatForm, formThrough, parseForm } from "../../lib/symmetry/affine-form.ts";
import { subspaceThrough } from "../../lib/symmetry/affine-subspace.ts";
import { primitiveGroup } from "../../lib/symmetry/primitive-group.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { enumerateWyckoff } from "../../lib/symmetry/wyckoff-enumeration.ts";
import { tabulated, wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";

const ALL = Array.from({ length: 230 }, (_, i) => i + 1);
const enumerated = new Map(ALL.map((n) => [n, enumerateWyckoff(referenceGroup(n))]));

/** Key, in primitive coordinates of the group, of the subspace that a printed triplet runs through. */
function keyOf(number: number, text: string): string {
  const { toPrimitive } = primitiveGroup(referenceGroup(number));
  const form = parseForm(text);
  const directions = directionsOfForm(form).map((v) => apply(toPrimitive, v));
  return subspaceThrough(ratVec3(apply(toPrimitive, form.t.n), form.t.d), directions).key;
}

describe("Wyckoff positions found from the operations", () => {
  it("are 1731 in all", () => {
    expect([...enumerated.values()].reduce((n, positions) => n + positions.length, 0)).toBe(1731);
  });

  it("have site-symmetry groups that share the fixed subspace and no other operation", () => {
    for (const number of ALL) {
      for (const p of enumerated.get(number)!) {
        expect(referenceGroup(number).representatives.length % p.stabiliser.length).toBe(0);
        expect(p.keys).toContain(p.representative.key);
      }
    }
  });
});

describe("the table of letters", () => {
  it("names every position found from the operations exactly once", () => {
    for (const number of ALL) {
      const positions = enumerated.get(number)!;
      const orbit = new Map(positions.flatMap((p, i) => p.keys.map((key) => [key, i] as const)));
      const named = tabulated(number).map((t) => orbit.get(keyOf(number, t.representative)) ?? t.representative);
      expect(named.sort(), `${number}`).toEqual(positions.map((_, i) => i).sort());
    }
  });

  it("states the multiplicity and the oriented site symmetry that the operations give", () => {
    for (const number of ALL) {
      const computed = wyckoffPositions(number).map((p) => `${p.multiplicity}${p.letter} ${p.siteSymmetry}`);
      expect(computed, `${number}`).toEqual(
        tabulated(number).map((t) => `${t.multiplicity}${t.letter} ${t.siteSymmetry}`),
      );
    }
  });

  it("orders letters by multiplicity, in the alphabet and one letter beyond", () => {
    for (const number of ALL) {
      const positions = wyckoffPositions(number);
      expect(positions.map((p) => p.letter).join("")).toBe("abcdefghijklmnopqrstuvwxyzA".slice(0, positions.length));
      const multiplicities = positions.map((p) => p.multiplicity);
      expect(multiplicities).toEqual([...multiplicities].sort((a, b) => a - b));
    }
  });

  it("prints first triplets as the parametrisation by letters would, but for one known turn of sign", () => {
    const other = ALL.flatMap((number) =>
      wyckoffPositions(number)
        .filter((p) => formatForm(formThrough(p.form.t, directionsOfForm(p.form))) !== p.representative)
        .map((p) => `${number}${p.letter} ${p.representative}`),
    );
    expect(other).toEqual(["98e -x,x,0"]);
  });
});

describe("wyckoffPositions", () => {
  it("lists as many triplets as the multiplicity asks for, centrings aside, all in one orbit", () => {
    for (const number of ALL) {
      const { centrings } = referenceGroup(number);
      const positions = enumerated.get(number)!;
      const orbit = new Map(positions.flatMap((p, i) => p.keys.map((key) => [key, i] as const)));
      for (const p of wyckoffPositions(number)) {
        expect(p.coordinates.length * centrings.length, `${number}${p.letter}`).toBe(p.multiplicity);
        expect(new Set(p.coordinates.map((text) => orbit.get(keyOf(number, text)))).size).toBe(1);
        expect(p.coordinates[0]).toBe(formatForm(p.form));
      }
    }
  });

  // International Tables for Crystallography A (2016), chapter 2.3, from memory.
  it.each([
    [62, "c", "x,1/4,z -x+1/2,3/4,z+1/2 -x,3/4,-z x+1/2,1/4,-z+1/2"],
    [62, "a", "0,0,0 1/2,0,1/2 0,1/2,0 1/2,1/2,1/2"],
    [136, "f", "x,x,0 -x,-x,0 -x+1/2,x+1/2,1/2 x+1/2,-x+1/2,1/2"],
    [167, "e", "x,0,1/4 0,x,1/4 -x,-x,1/4 -x,0,3/4 0,-x,3/4 x,x,3/4"],
    [194, "h", "x,2x,1/4 -2x,-x,1/4 x,-x,1/4 -x,-2x,3/4 2x,x,3/4 -x,x,3/4"],
    [227, "c", "0,0,0 3/4,1/4,1/2 1/4,1/2,3/4 1/2,3/4,1/4"],
    [
      205,
      "c",
      "x,x,x -x+1/2,-x,x+1/2 -x,x+1/2,-x+1/2 x+1/2,-x+1/2,-x -x,-x,-x x+1/2,x,-x+1/2 x,-x+1/2,x+1/2 -x+1/2,x+1/2,x",
    ],
  ])("prints the triplets of type %i, position %s, in the printed order", (number, letter, text) => {
    expect(
      wyckoffPositions(number)
        .find((p) => p.letter === letter)!
        .coordinates.join(" "),
    ).toBe(text);
  });
});
