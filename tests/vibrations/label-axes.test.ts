import { describe, expect, test } from "vitest";
import { splitText } from "../../lib/report/index.ts";
import { splitAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

/** Axes of the free unit and of the site, as told for the first unit of a fixture. */
const axesOf = (name: string) => {
  const { units } = splitAnswer(fixture(name));
  return [units[0]!.freeAxes, units[0]!.siteAxes];
};

describe("axes of labels that depend on them", () => {
  test("a free unit and its site of the same group may name B1 and B2 differently: both say after which axes", () => {
    const [unit] = splitAnswer(fixture("sodium-nitrite")).units;
    expect(unit!.internal.find((m) => m.name === "nu3")).toMatchObject({ species: "B2", site: { B1: 1 } });
    expect(axesOf("sodium-nitrite")).toEqual([
      "z along C2, x normal to the plane",
      "x along [001], y along [100], z along [010]",
    ]);
  });

  test("molecules that no handbook entry describes follow a rule that is told", () => {
    expect(axesOf("naphthalene")).toEqual(["x normal to the plane of most atoms, z through most atoms", ""]);
    expect(axesOf("beryl")[0]).toBe("C2' through most atoms");
  });

  test("nothing is told where no label depends on axes, in the text as well", () => {
    expect(axesOf("calcite")).toEqual(["", ""]);
    expect(splitText(splitAnswer(fixture("calcite")))).not.toContain("axes of the labels");
  });
});
