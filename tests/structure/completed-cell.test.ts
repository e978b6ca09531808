import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import {
  type CellParameter,
  type CellParameters,
  cellInOrder,
  cellOfMetric,
  completedCell,
  formatCellParameters,
  metricOf,
  parseCellParameters,
} from "../../lib/structure/index.ts";
import { namedGroup, type SpaceGroup, settingOperations, settingsOf, spaceGroup } from "../../lib/symmetry/index.ts";
import { invariantMetric } from "../support/crystals.ts";
import { problemOf } from "../support/problem-of.ts";
import { randomNumbers } from "../support/random-structures.ts";

const NAMES = ["a", "b", "c", "alpha", "beta", "gamma"] as const;
const groupOf = (name: string) => namedGroup(name).settings[0].group;
const complete = (text: string, name: string) => {
  const { values, spans } = parseCellParameters(text);
  return completedCell(values, groupOf(name), { groupName: name, spans }).cell;
};

test("parameters of a cell read back as they are written", () => {
  const value = fc.integer({ min: 1, max: 2_000_000 }).map((n) => n / 10_000);
  const some = fc.record(Object.fromEntries(NAMES.map((n) => [n, value])), { requiredKeys: [] });
  fc.assert(
    fc.property(
      some.filter((v) => Object.keys(v).length > 0),
      (values) => {
        expect(parseCellParameters(formatCellParameters(values as CellParameters)).values).toEqual({ ...values });
      },
    ),
  );
});

describe("the text of a cell", () => {
  it.each([
    ["a=4.99 c=17.06", { a: 4.99, c: 17.06 }],
    ["a = 4.990(2), c = 17.06(1) \u00c5", { a: 4.99, c: 17.06 }],
    ["5 6 7 90 100.5 90", { a: 5, b: 6, c: 7, alpha: 90, beta: 100.5, gamma: 90 }],
    ["a 6.3 \u03b1 46.1\u00b0", { a: 6.3, alpha: 46.1 }],
    ["A=5; Beta=101", { a: 5, beta: 101 }],
  ])("%j is read", (text, values) => expect(parseCellParameters(text).values).toEqual(values));

  it.each([
    ["a=4.99 d=17", 7],
    ["a=x", 2],
    ["5 6 x", 4],
    ["5 6 7 90 100 90 1", 16],
    ["", 0],
    ["a=-5", 2],
    ["a=5 a=6", 4],
  ])("%j is refused at character %i", (text, start) => {
    const { code, span } = problemOf(() => parseCellParameters(text));
    expect([code, span!.start]).toEqual(["cell-unreadable", start]);
  });
});

describe("numbers without names", () => {
  const inOrder = (text: string, name: string) => cellInOrder(parseCellParameters(text), groupOf(name), name);

  it.each([
    ["5.64", "F m -3 m", { a: 5.64 }],
    ["4.99 17.06", "R -3 c:H", { a: 4.99, c: 17.06 }],
    ["6.36, 46.1", "R -3 c:R", { a: 6.36, alpha: 46.1 }],
    ["7.5 5.4 9.1", "P b c a", { a: 7.5, b: 5.4, c: 9.1 }],
    ["5.68 15.2 6.5 118.4", "C 2/c", { a: 5.68, b: 15.2, c: 6.5, beta: 118.4 }],
  ])("%j in %s are the free parameters in order", (text, name, values) => {
    expect(inOrder(text, name).values).toEqual(values);
  });

  it("are refused where they are not as many as the group leaves free", () => {
    const { code, span, message } = problemOf(() => inOrder("5.6 5.6", "F m -3 m"));
    expect([code, span]).toEqual(["cell-incomplete", { start: 0, end: 7 }]);
    expect(message).toContain("leaves 1 free: a");
  });
});

/** The parameters that are needed, found by leaving out each that follows from those before it. */
function needed(cell: Readonly<Record<CellParameter, number>>, group: SpaceGroup): CellParameters {
  let given: CellParameters = {};
  for (const p of NAMES) {
    const { hint } = problemOfCell(given, group);
    if (hint.includes(`${p}=`)) given = { ...given, [p]: cell[p] };
  }
  return given;
}

function problemOfCell(given: CellParameters, group: SpaceGroup): { hint: string } {
  try {
    completedCell(given, group, { groupName: "the group", spans: {} });
    return { hint: "" };
  } catch (e) {
    return e as { hint: string };
  }
}

describe("a cell of which the free parameters are given", () => {
  it.each(Array.from({ length: 230 }, (_, i) => i + 1))("is completed in any setting, type %i", (number) => {
    const random = randomNumbers(number);
    const settings = settingsOf(number);
    for (const setting of new Set([settings[0]!, settings[number % settings.length]!])) {
      const group = spaceGroup(settingOperations(setting));
      const { cell } = metricOf(cellOfMetric(invariantMetric(group, [random(), random(), random()])));
      const given = needed(cell, group);
      const completed = completedCell(given, group, { groupName: "", spans: {} }).cell;
      for (const p of NAMES) expect(completed[p]).toBeCloseTo(cell[p], 6);
      // and nothing of it is idle
      for (const p of Object.keys(given)) {
        const fewer = { ...given, [p]: undefined };
        expect(problemOf(() => completedCell(fewer, group, { groupName: "", spans: {} })).code).toBe("cell-incomplete");
      }
    }
  });

  it.each([
    ["a=4.99 c=17.06", "R -3 c", [4.99, 4.99, 17.06, 90, 90, 120]],
    ["a=6.37 alpha=46.1", "R -3 c:R", [6.37, 6.37, 6.37, 46.1, 46.1, 46.1]],
    ["a=5 b=6 c=7 beta=101", "P 21/c", [5, 6, 7, 90, 101, 90]],
    ["a=5 b=6 c=7 gamma=101", "P 1 1 21/b", [5, 6, 7, 90, 90, 101]],
    ["c=8", "F m -3 m", [8, 8, 8, 90, 90, 90]],
    ["8 8 8 90 90 90", "F m -3 m", [8, 8, 8, 90, 90, 90]],
    ["b=4 c=5 gamma=120", "P 6", [4, 4, 5, 90, 90, 120]],
  ])("%s in %s", (text, name, cell) => expect(NAMES.map((p) => complete(text, name)[p])).toEqual(cell));

  it.each([
    ["a=5 b=5.1 c=6", "P 4", "b", "5 with a = 5, c = 6"],
    ["a=5 c=6 gamma=119", "P 6", "gamma", "120"],
    ["a=5 b=6 c=7 alpha=91", "P n m a", "alpha", "90"],
  ])("%s contradicts %s: %s must be %s", (text, name, parameter, value) => {
    const { code, message, span } = problemOf(() => complete(text, name));
    expect([code, text.slice(span!.start).startsWith(parameter)]).toEqual(["cell-contradiction", true]);
    expect(message).toContain(`makes it ${value}`);
  });

  it.each([
    ["a=5", "P 4", "c"],
    ["a=5 b=6 c=7", "P 21/c", "beta"],
    ["beta=100", "P 1", "a, b, c, alpha, gamma"],
    ["a=5 c=7 gamma=45", "P 2 2 2 (a,a+b,c)", "b"], // it would follow, but not by linear equations
  ])("%s is not enough for %s: %s is missing", (text, name, missing) => {
    const { code, message } = problemOf(() => complete(text, name));
    expect([code, message.includes(`lacks ${missing}:`)]).toEqual(["cell-incomplete", true]);
  });

  it.each([
    ["a=0 c=6", "P 4"],
    ["a=5 b=6 c=7 beta=180", "P 21/c"],
    ["5 6 7 20 20 90", "P 1"],
  ])("%s is impossible in %s", (text, name) => {
    expect(problemOf(() => complete(text, name)).code).toBe("cell-impossible");
  });
});
