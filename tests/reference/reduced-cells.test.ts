import { describe, expect, it } from "vitest";
import { applyRow, type IntMat3, type IntVec3, inverseRatMat, mod, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { cellOfMetric, type Mat3, metricOf, reduceAnswer } from "../../lib/structure/index.ts";

const P = [ratVec3([0, 0, 0])];

describe("the worked example of Krivy and Gruber, Acta Cryst. A32 (1976) 297 (numbers from memory)", () => {
  it("a cell of metric 9, 27, 4, -5, -4, -22 reduces to 4, 9, 9, 9, 3, 4", () => {
    const given = cellOfMetric([9, -11, -2, -11, 27, -2.5, -2, -2.5, 4]);
    // as printed: 3, 5.196, 2; 103 deg 55', 109 deg 28', 134 deg 53'
    expect(given.b).toBeCloseTo(5.196, 3);
    expect([given.alpha, given.beta, given.gamma].map((x) => x.toFixed(1))).toEqual(["103.9", "109.5", "134.9"]);
    const { niggli } = reduceAnswer(metricOf(given), P);
    [2, 3, 3, 60, 75.5225, 70.5288].forEach((e, i) => {
      expect(niggli.cell[i]).toBeCloseTo(e, 4);
    });
  });

  it("so does the cell in rounded numbers", () => {
    const given = metricOf({ a: 3, b: 5.196, c: 2, alpha: 103.92, beta: 109.47, gamma: 134.88 });
    const rounded = reduceAnswer(given, P).niggli.cell.map((e) => Number(e.toFixed(1)));
    expect(rounded).toEqual([2, 3, 3, 60, 75.5, 70.5]);
  });
});

/**
 * The 44 lattice characters: A, B, C, then D = b.c, E = a.c, F = a.b of a Niggli cell that obeys the conditions of the
 * row, and the type of lattice the row names (C and I monoclinic, C orthorhombic: S).
 * Source: International Tables for Crystallography A (2016), table 3.1.3.1, after P. M. de Wolff (conditions from memory).
 */
const CHARACTERS: readonly (readonly [number, string, readonly [number, number, number, number, number, number]])[] = [
  [1, "cF", [9, 9, 9, 4.5, 4.5, 4.5]],
  [2, "hR", [9, 9, 9, 3, 3, 3]],
  [3, "cP", [9, 9, 9, 0, 0, 0]],
  [4, "hR", [9, 9, 9, -2, -2, -2]],
  [5, "cI", [9, 9, 9, -3, -3, -3]],
  [6, "tI", [9, 9, 9, -2.5, -2.5, -4]],
  [7, "tI", [9, 9, 9, -2, -3.5, -3.5]],
  [8, "oI", [9, 9, 9, -2, -3, -4]],
  [9, "hR", [9, 9, 16, 4.5, 4.5, 4.5]],
  [10, "mS", [9, 9, 16, 3, 3, 2]],
  [11, "tP", [9, 9, 16, 0, 0, 0]],
  [12, "hP", [9, 9, 16, 0, 0, -4.5]],
  [13, "oS", [9, 9, 16, 0, 0, -2]],
  [14, "mS", [9, 9, 16, -2, -2, -3]],
  [15, "tI", [9, 9, 16, -4.5, -4.5, 0]],
  [16, "oF", [9, 9, 16, -3.5, -3.5, -2]],
  [17, "mS", [9, 9, 16, -2.5, -3.5, -3]],
  [18, "tI", [9, 16, 16, 2.25, 4.5, 4.5]],
  [19, "oI", [9, 16, 16, 3.5, 4.5, 4.5]],
  [20, "mS", [9, 16, 16, 5, 3, 3]],
  [21, "tP", [9, 16, 16, 0, 0, 0]],
  [22, "hP", [9, 16, 16, -8, 0, 0]],
  [23, "oS", [9, 16, 16, -3, 0, 0]],
  [24, "hR", [9, 16, 16, -6.5, -3, -3]],
  [25, "mS", [9, 16, 16, -5, -3, -3]],
  [26, "oF", [9, 16, 25, 2.25, 4.5, 4.5]],
  [27, "mS", [9, 16, 25, 5, 4.5, 4.5]],
  [28, "mS", [9, 16, 25, 1.5, 4.5, 3]],
  [29, "mS", [9, 16, 25, 1.5, 3, 4.5]],
  [30, "mS", [9, 16, 25, 8, 2, 4]],
  [31, "aP", [9, 16, 25, 5, 3, 2]],
  [32, "oP", [9, 16, 25, 0, 0, 0]],
  [33, "mP", [9, 16, 25, 0, -2, 0]],
  [34, "mP", [9, 16, 25, 0, 0, -2]],
  [35, "mP", [9, 16, 25, -2, 0, 0]],
  [36, "oS", [9, 16, 25, 0, -4.5, 0]],
  [37, "mS", [9, 16, 25, -3, -4.5, 0]],
  [38, "oS", [9, 16, 25, 0, 0, -4.5]],
  [39, "mS", [9, 16, 25, -3, 0, -4.5]],
  [40, "oS", [9, 16, 25, -8, 0, 0]],
  [41, "mS", [9, 16, 25, -8, -2, 0]],
  [42, "oI", [9, 16, 25, -8, -4.5, 0]],
  [43, "mS", [9, 16, 25, -7, -3.5, -2]],
  [44, "aP", [9, 16, 25, -4, -2, -3]],
];

/**
 * The centring and the conventional basis of each character: rows of digits, minus before the digit, each row a
 * conventional basis vector in terms of the reduced basis.
 * Source: International Tables for Crystallography A (2016), table 3.1.3.1, last columns (from memory).
 */
const CONVENTIONAL = [
  ...`
F 1-11/11-1/-111    R 1-10/-101/-1-1-1   P 100/010/001       R 1-10/-101/-1-1-1  I 101/110/011
I 011/101/110       I 101/110/011        I -1-10/-10-1/0-1-1 R 100/-110/-1-13    C 110/1-10/00-1
P 100/010/001       P 100/010/001        C 110/-110/001      C 110/-110/001      I 100/010/112
F -1-10/1-10/112    C 1-10/110/-10-1     I 0-11/1-1-1/100    I -100/0-11/-111    C 011/01-1/-100
P 010/001/100       P 010/001/100        C 011/0-11/100      R 121/0-11/100      C 011/0-11/100
F 100/-120/-102     C -120/-100/0-11     C -100/-102/010     C 100/1-20/00-1     C 010/01-2/-100
P 100/010/001       P 100/010/001        P 100/010/001       P -100/00-1/0-10    P 0-10/-100/00-1
C 100/-10-2/010     C 102/100/010        C -100/120/00-1     C -1-20/-100/00-1   C 0-10/012/-100
C 0-1-2/0-10/-100   I -100/0-10/112      I -100/-1-1-2/0-10  P 100/010/001`.matchAll(/([PCIFR]) (\S+)/g),
].map(([, letter, rows]) => [letter!, rows!] as const);

/** Lattice points of the conventional cell that are not its corners; R obverse. */
const CENTRINGS: Readonly<Record<string, readonly string[]>> = {
  P: [],
  C: ["0.500,0.500,0.000"],
  I: ["0.500,0.500,0.500"],
  F: ["0.000,0.500,0.500", "0.500,0.000,0.500", "0.500,0.500,0.000"],
  R: ["0.333,0.667,0.667", "0.667,0.333,0.333"],
};

describe.each(CHARACTERS)(
  "the conventional basis that International Tables print, character %i",
  (number, type, form) => {
    const [letter, rows] = CONVENTIONAL[number - 1]!;
    const [A, B, C, D, E, F] = form;
    const M = [...rows.matchAll(/-?\d/g)].map((m) => Number(m[0])) as unknown as IntMat3;
    const conventional = conjugate([A, F, E, F, B, D, E, D, C], M);
    const printed = cellOfMetric(conventional);

    it("has the centring of its letter", () => {
      const { n, d } = inverseRatMat(ratMat3(M));
      const corners = [-2, -1, 0, 1, 2].flatMap((u) =>
        [-2, -1, 0, 1, 2].flatMap((v) => [-1, 0, 1].map((w) => [u, v, w])),
      );
      const points = corners.map((u) =>
        applyRow(u as unknown as IntVec3, n)
          .map((e) => (mod(e, d) / d).toFixed(3))
          .join(),
      );
      expect([...new Set(points)].filter((p) => p !== "0.000,0.000,0.000").sort()).toEqual(CENTRINGS[letter]);
    });

    it("is the conventional cell found, but for the order of axes that are alike", () => {
      const found = reduceAnswer(metricOf(cellOfMetric([A, F, E, F, B, D, E, D, C])), P).conventional;
      const [a, b, c] = found.cell;
      expect(found.volume).toBeCloseTo(metricOf(printed).volume, 6);
      if (type === "aP") return;
      if (type[0] === "m") {
        // the setting in the plane is a choice; the unique axis is none
        expect([printed.alpha, printed.gamma, found.cell[3], found.cell[5]].map((e) => e.toFixed(6))).toEqual(
          Array(4).fill("90.000000"),
        );
        expect(b).toBeCloseTo(printed.b, 6);
        return;
      }
      const sorted = (lengths: readonly number[]) => lengths.map((e) => e.toFixed(6)).sort();
      const [ab, abPrinted] = [
        [a, b],
        [printed.a, printed.b],
      ];
      expect(sorted(type === "oS" ? ab : [...ab, c])).toEqual(
        sorted(type === "oS" ? abPrinted : [...abPrinted, printed.c]),
      );
      if (type === "oS") expect(c).toBeCloseTo(printed.c, 6);
      expect([found.cell[3], found.cell[4], found.cell[5]].map((e) => e.toFixed(6))).toEqual(
        [printed.alpha, printed.beta, printed.gamma].map((e) => e.toFixed(6)),
      );
    });
  },
);

/** M G M^T: the metric on the axes that the rows of M are. */
function conjugate(g: readonly number[], M: IntMat3): Mat3 {
  const row = (i: number) => [M[3 * i]!, M[3 * i + 1]!, M[3 * i + 2]!];
  const dot = (u: readonly number[], v: readonly number[]) =>
    u.reduce((s, x, i) => s + v.reduce((t, y, j) => t + x * y * g[3 * i + j]!, 0), 0);
  return [0, 1, 2].flatMap((i) => [0, 1, 2].map((j) => dot(row(i), row(j)))) as unknown as Mat3;
}

describe("the 44 lattice characters of International Tables", () => {
  it.each(CHARACTERS)("character %i is a lattice %s", (_, type, [A, B, C, D, E, F]) => {
    const cell = cellOfMetric([A, F, E, F, B, D, E, D, C]);
    const { niggli, conventional } = reduceAnswer(metricOf(cell), P);
    expect(conventional.lattice).toBe(type);
    const form = metricOf({
      a: niggli.cell[0],
      b: niggli.cell[1],
      c: niggli.cell[2],
      alpha: niggli.cell[3],
      beta: niggli.cell[4],
      gamma: niggli.cell[5],
    }).g;
    // the cell obeys all conditions already, so it is its own Niggli cell
    [form[0], form[4], form[8], form[5], form[2], form[1]].forEach((e, i) => {
      expect(e).toBeCloseTo([A, B, C, D, E, F][i]!, 9);
    });
  });
});
