import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { determinant, type IntMat3, multiply, type RatMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { type Cell, cellOfMetric, type Mat3, metricOf, multiply3, reduceAnswer } from "../../lib/structure/index.ts";
import { operationsFromHall, parseTransformation, primitiveBasis } from "../../lib/symmetry/index.ts";
import { unimodular } from "../support/crystals.ts";

const P = [ratVec3([0, 0, 0])];

/** The cell of the axes (a, b, c) M. */
function changed(cell: Cell, M: readonly number[], d = 1): Cell {
  const m = M.map((e) => e / d) as unknown as Mat3;
  const t = [0, 3, 6, 1, 4, 7, 2, 5, 8].map((k) => m[k]!) as unknown as Mat3;
  return cellOfMetric(multiply3(t, multiply3(metricOf(cell).g, m)));
}

function numbers({ a, b, c, alpha, beta, gamma }: Cell): number[] {
  return [a, b, c, alpha, beta, gamma];
}

function expectCell(found: readonly number[], expected: readonly number[], digits = 5): void {
  found.forEach((e, i) => {
    expect(e).toBeCloseTo(expected[i]!, digits);
  });
}

/** Numbers in [0, 1) without the liking of fast-check for ends of ranges and for repetition, where cells get symmetric. */
const scattered: fc.Arbitrary<(min: number, max: number) => number> = fc
  .integer({ min: 1, max: 2 ** 31 - 2 })
  .map((n) => {
    let state = n;
    return (min, max) => {
      state = (state * 48271) % 2147483647;
      return min + ((max - min) * state) / 2147483647;
    };
  });

const triclinic: fc.Arbitrary<Cell> = scattered.map((next) => {
  const [length, angle] = [() => next(3, 20), () => next(65, 115)];
  return { a: length(), b: length(), c: length(), alpha: angle(), beta: angle(), gamma: angle() };
});

const skew: fc.Arbitrary<IntMat3> = fc.tuple(unimodular, unimodular).map(([m, n]) => multiply(m, n));

/** Conditions on a Niggli cell, from the conditions printed with it rather than from the steps that lead to it. */
function niggliFaults([a, b, c, alpha, beta, gamma]: readonly number[]): string[] {
  const cos = (x: number) => Math.cos((x * Math.PI) / 180);
  const [A, B, C, D, E, F] = [
    a! ** 2,
    b! ** 2,
    c! ** 2,
    b! * c! * cos(alpha!),
    a! * c! * cos(beta!),
    a! * b! * cos(gamma!),
  ];
  const eps = 6e-4 * (A * B * C) ** (1 / 3); // the tolerance of the reduction, with room
  const acute = D > 0 && E > 0 && F > 0;
  const rules: [string, boolean][] = [
    ["a <= b <= c", A <= B + eps && B <= C + eps],
    ["angles all acute or none", acute || (D <= eps && E <= eps && F <= eps)],
    ["|D| <= B/2", Math.abs(D) <= B / 2 + eps],
    ["|E| <= A/2", Math.abs(E) <= A / 2 + eps],
    ["|F| <= A/2", Math.abs(F) <= A / 2 + eps],
    ["body diagonal", acute || A + B + 2 * (D + E + F) >= -eps],
  ];
  return rules.filter(([, holds]) => !holds).map(([name]) => name);
}

describe("reduced cells", () => {
  it("depend on the lattice, not on the basis it is given in", () => {
    fc.assert(
      fc.property(triclinic, skew, (cell, M) => {
        const one = reduceAnswer(metricOf(cell), P);
        const other = reduceAnswer(metricOf(changed(cell, M)), P);
        expectCell(other.niggli.cell, one.niggli.cell, 4);
        expectCell(other.delaunay.cell, one.delaunay.cell, 4);
      }),
    );
  });

  it("are reached by the change of basis they name, which keeps volume and handedness", () => {
    fc.assert(
      fc.property(triclinic, skew, (cell, M) => {
        const start = changed(cell, M);
        const answer = reduceAnswer(metricOf(start), P);
        for (const { cell: found, P: text, volume } of [answer.niggli, answer.delaunay, ...answer.lattices]) {
          const { n, d } = parseTransformation(text).P;
          expectCell(found, numbers(changed(start, n, d)), 4);
          expect(determinant(n)).toBeGreaterThan(0);
          expect(metricOf(cellFrom(found)).volume / volume).toBeCloseTo(1, 6);
        }
        expect(answer.niggli.volume / metricOf(start).volume).toBeCloseTo(1, 9);
        expect(answer.delaunay.volume / metricOf(start).volume).toBeCloseTo(1, 9);
      }),
    );
  });

  it("obey the conditions of a Niggli cell", () => {
    fc.assert(
      fc.property(triclinic, skew, (cell, M) => {
        expect(niggliFaults(reduceAnswer(metricOf(changed(cell, M)), P).niggli.cell)).toEqual([]);
      }),
    );
  });

  it("hold, as Delaunay's, the three shortest vectors that span the lattice, their angles all acute or none", () => {
    fc.assert(
      fc.property(triclinic, skew, (cell, M) => {
        const { delaunay, niggli } = reduceAnswer(metricOf(changed(cell, M)), P);
        const sum = (c: readonly number[]) => c[0]! ** 2 + c[1]! ** 2 + c[2]! ** 2;
        // the Niggli cell is a Buerger cell, so no basis has a smaller sum
        expect(Math.abs(sum(delaunay.cell) / sum(niggli.cell) - 1)).toBeLessThan(2e-3);
        const angles = delaunay.cell.slice(3);
        expect(angles.every((x) => x < 90.3) || angles.every((x) => x > 89.7)).toBe(true);
      }),
    );
  });
});

function cellFrom([a, b, c, alpha, beta, gamma]: readonly number[]): Cell {
  return { a: a!, b: b!, c: c!, alpha: alpha!, beta: beta!, gamma: gamma! };
}

const right = { alpha: 90, beta: 90, gamma: 90 };
const abc = scattered.map((next): [number, number, number] => [next(3, 9), next(3, 9), next(3, 9)]);
const monoclinic = scattered.map((next) => ({
  a: next(3, 9),
  b: next(3, 9),
  c: next(3, 9),
  ...right,
  beta: next(91, 118),
}));

/** Conventional cells of each type, and the letter of their centring. */
const TYPES: Readonly<Record<string, readonly [letter: string, cell: fc.Arbitrary<Cell>]>> = {
  aP: ["P", triclinic],
  mP: ["P", monoclinic],
  mS: ["C", monoclinic],
  oP: ["P", abc.map(([a, b, c]) => ({ a, b, c, ...right }))],
  oS: ["C", abc.map(([a, b, c]) => ({ a, b, c, ...right }))],
  oI: ["I", abc.map(([a, b, c]) => ({ a, b, c, ...right }))],
  oF: ["F", abc.map(([a, b, c]) => ({ a, b, c, ...right }))],
  tP: ["P", abc.map(([a, , c]) => ({ a, b: a, c, ...right }))],
  tI: ["I", abc.map(([a, , c]) => ({ a, b: a, c, ...right }))],
  hP: ["P", abc.map(([a, , c]) => ({ a, b: a, c, ...right, gamma: 120 }))],
  hR: ["R", abc.map(([a, , c]) => ({ a, b: a, c, ...right, gamma: 120 }))],
  cP: ["P", abc.map(([a]) => ({ a, b: a, c: a, ...right }))],
  cI: ["I", abc.map(([a]) => ({ a, b: a, c: a, ...right }))],
  cF: ["F", abc.map(([a]) => ({ a, b: a, c: a, ...right }))],
};

/** Narrow enough that no random cell of lower symmetry comes so near to a higher one; degrees. */
const NARROW = 1e-5;

describe.each(Object.entries(TYPES))("a lattice %s", (type, [letter, cells]) => {
  const { centrings } = operationsFromHall(`${letter} 1`);
  const primitive: RatMat3 = primitiveBasis(centrings);

  test("is recognised in any primitive basis, with the volume of its conventional cell", () => {
    fc.assert(
      fc.property(cells, skew, (cell, M) => {
        const given = changed(cell, multiply(primitive.n, M), primitive.d);
        const { conventional } = reduceAnswer(metricOf(given), P, NARROW);
        expect(conventional.lattice).toBe(type);
        expect(conventional.volume / metricOf(cell).volume).toBeCloseTo(1, 6);
        expect(conventional.deviation).toBeLessThan(NARROW);
      }),
    );
  });

  test("gives the same cells from its conventional cell with the centrings", () => {
    fc.assert(
      fc.property(cells, skew, (cell, M) => {
        const given = changed(cell, multiply(primitive.n, M), primitive.d);
        const centred = reduceAnswer(metricOf(cell), centrings, NARROW);
        const skewed = reduceAnswer(metricOf(given), P, NARROW);
        expectCell(skewed.niggli.cell, centred.niggli.cell, 4);
        expectCell(skewed.delaunay.cell, centred.delaunay.cell, 4);
        expectCell(skewed.conventional.cell, centred.conventional.cell, 4);
      }),
    );
  });
});

describe("the conventional cell", () => {
  it("tells which higher symmetries a lattice nearly has, and by how much", () => {
    const { conventional, lattices } = reduceAnswer(metricOf({ a: 5, b: 5.05, c: 8, ...right, beta: 90.4 }), P);
    expect(conventional.lattice).toBe("mP");
    const steps = lattices.map((l) => [l.lattice, Number(l.deviation.toFixed(2))]);
    expect(steps).toEqual([
      ["mP", 0],
      ["oP", 0.4],
      ["tP", 0.64],
    ]);
  });

  it("of a monoclinic lattice has short axes and no acute beta", () => {
    fc.assert(
      fc.property(TYPES["mS"]![1], skew, (cell, M) => {
        const primitive = primitiveBasis(operationsFromHall("C 1").centrings);
        const given = changed(cell, multiply(primitive.n, M), primitive.d);
        const [a, , c, , beta] = reduceAnswer(metricOf(given), P, NARROW).conventional.cell;
        expect(beta).toBeGreaterThan(90 - 1e-6);
        expect(a ** 2 + c ** 2).toBeLessThan(cell.a ** 2 + cell.c ** 2 + 1e-6);
      }),
    );
  });

  it("of an orthorhombic lattice has its axes in order", () => {
    const cell = reduceAnswer(metricOf({ a: 9, b: 4, c: 6, ...right }), P).conventional.cell;
    expectCell(cell, [4, 6, 9, 90, 90, 90]);
  });
});
