import { describe, expect, test } from "vitest";
import { polariseText } from "../../lib/report/index.ts";
import { parseTransformation } from "../../lib/symmetry/index.ts";
import { polariseAnswer } from "../../lib/vibrations/index.ts";
import { fixture, inSetting } from "../support/crystals.ts";

/** Value of a sum of letters such as `-a/2+d/2`, `0.5 b`, `sqrt3/2 c`. */
function numberOf(sum: string, letters: ReadonlyMap<string, number>): number {
  if (sum === "0") return 0;
  const terms = sum.match(/[+-]?[^+-]+/g)!;
  return terms.reduce((total, term) => {
    const letter = /[a-z]\d*(?=(?:\/\d+)?$)/.exec(term)![0];
    const factor = term
      .replace(letter, "1")
      .replace(/^\+/, "")
      .replace(/^-/, "-1*")
      .replace(/sqrt(\d+)/g, "$1**0.5")
      .replace(/(\d) +(?=1)/g, "$1*");
    return total + new Function(`return ${factor}`)() * letters.get(letter)!;
  }, 0);
}

describe("the law of rotation in letters", () => {
  const values = new Map([..."abcdefgh"].map((l, i) => [l, 0.4 + 0.35 * i]));

  test.each([
    ["gypsum", "y"],
    ["gypsum", "(100)"],
    ["calcite", "(104)"],
    ["calcite", "z"],
    ["alpha-quartz", "x"],
    ["rutile", "[110]"],
    ["barite", "x"],
  ] as const)("gives the intensities of the table: %s about %s", (name, about) => {
    const { rotation } = polariseAnswer(fixture(name), { rotation: { about, zero: null, letters: values, step: 15 } });
    const { angles, curves, laws } = rotation!;
    for (const { label, parallel, crossed } of curves) {
      const partners = laws.find((l) => l.label === label)?.partners ?? [];
      angles.forEach((angle, i) => {
        const phi = (angle * Math.PI) / 180;
        const [c, s, c2, s2] = [Math.cos(phi), Math.sin(phi), Math.cos(2 * phi), Math.sin(2 * phi)];
        const along = partners.map(({ parallel: [u, v, w] }) =>
          [u, v, w].reduce((sum, t, k) => sum + numberOf(t, values) * [c * c, s2, s * s][k]!, 0),
        );
        const across = partners.map(({ crossed: [u, v] }) => numberOf(u, values) * c2 + numberOf(v, values) * s2);
        const intensity = (amplitudes: readonly number[]) => amplitudes.reduce((sum, a) => sum + a * a, 0);
        expect(intensity(along)).toBeCloseTo(parallel[i]!, 3);
        expect(intensity(across)).toBeCloseTo(crossed[i]!, 3);
      });
    }
  });

  test("reads as textbooks write it", () => {
    const answer = polariseAnswer(fixture("rutile"), {
      rotation: { about: "y", zero: "z", letters: new Map(), step: 15 },
    });
    const text = polariseText(answer);
    expect(text).toContain("A₁g parallel: (b cos²φ + a sin²φ)²");
    expect(text).toContain("B₁g parallel: (c sin²φ)²");
    expect(text).toContain("Eg crossed: ");
  });
});

describe("natural faces of a monoclinic crystal", () => {
  test("are told by their normals, with an axis and its perpendicular in each", () => {
    const { naturalFaces } = polariseAnswer(fixture("gypsum"));
    expect(naturalFaces.map((g) => g.geometry)).toEqual([
      "(100)([010][010])-(100)",
      "(100)([010][001])-(100)",
      "(100)([001][001])-(100)",
      "(010)((100)(100))-(010)",
      "(010)((100)[001])-(010)",
      "(010)([001][001])-(010)",
      "(001)([100][100])-(001)",
      "(001)([100][010])-(001)",
      "(001)([010][010])-(001)",
    ]);
    const bands = (i: number) => naturalFaces[i]!.allowed.map((a) => a.irrep);
    expect(bands(1)).toEqual(["Bg"]);
    for (const i of [0, 2, 3, 4, 5]) expect(bands(i)).toEqual(["Ag"]);
    expect(polariseText(polariseAnswer(fixture("gypsum")))).toContain("natural faces of a monoclinic crystal");
  });

  test("are not listed where the cell is skew, and its indices are not those of the faces", () => {
    const gypsum = fixture("gypsum");
    const primitive = inSetting(gypsum, parseTransformation("1/2a+1/2b+1/2c,b,c;0,0,0"))!;
    expect(polariseAnswer(primitive).naturalFaces).toEqual([]);
  });

  test("are not listed for other crystals", () => {
    for (const name of ["calcite", "barite"]) expect(polariseAnswer(fixture(name)).naturalFaces).toEqual([]);
  });
});
