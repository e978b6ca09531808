import { describe, expect, it } from "vitest";
import { ratVec3 } from "../../lib/algebra/index.ts";
import { cellOfMetric, metricOf, reduceAnswer } from "../../lib/structure/index.ts";

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
