import { describe, expect, it } from "vitest";
import { identifyGroup, namedGroup } from "../../lib/symmetry/index.ts";
import { problemOf } from "../support/problem-of.ts";

const summaryOf = (text: string) => identifyGroup(namedGroup(text).settings[0].group).summary;

describe("a group called by name", () => {
  it.each([
    ["62", 62, "P n m a", "reference"],
    ["P n a m", 62, "P n a m", "a-cb"],
    ["P21/n", 14, "P 21/n", "b2"],
    ["R -3 c:R", 167, "R -3 c", ":R"],
    ["D2h^16", 62, "P n m a", "reference"],
    ['-R 3 2"c', 167, "R -3 c", "reference"],
    ["-P 2ac 2n", 62, "P n m a", "reference"],
    ["P 2yb", 4, "P 21", "reference"],
    ["Hall: P 2", 3, "P 1 1 2", "c"],
    ["Pbnm (No. 62)", 62, "P b n m", "cab"],
    ["P b n m, #62", 62, "P b n m", "cab"],
    ["R-3c (167)", 167, "R -3 c", "reference"],
    ["No. 62", 62, "P n m a", "reference"],
    ["I 41/a (2)", 88, "I 41/a", "reference"],
    ["hall -P 2ybc", 14, "P 21/c", "reference"],
  ])("%s is No. %i, %s, setting %s", (text, number, symbol, setting) => {
    const { number: n, hermannMauguin, settingName } = summaryOf(text);
    expect([n, hermannMauguin, settingName]).toEqual([number, symbol, setting]);
  });

  it("tells what it leaves open, all settings with it", () => {
    const { settings, ambiguity } = namedGroup("F d -3 m");
    expect(ambiguity).toEqual(["origin choice"]);
    expect(settings.map((s) => s.name)).toEqual(["F 41/d -3 2/m:2", "F 41/d -3 2/m:1"]);
    expect(settings.map((s) => identifyGroup(s.group).number)).toEqual([227, 227]);
  });

  it.each([
    ["P q", "group-name-unreadable", 2],
    ["-Q 2", "hall-unreadable", 1],
    ["hall  -Q 2", "hall-unreadable", 7],
    ["231", "group-name-unknown", 0],
    ["P 21/c (No. 62)", "group-name-contradiction", 12],
  ])("%j is refused: %s at character %i", (text, code, start) => {
    const problem = problemOf(() => namedGroup(text));
    expect([problem.code, problem.span!.start]).toEqual([code, start]);
  });
});
