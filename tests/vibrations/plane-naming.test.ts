import { describe, expect, test } from "vitest";
import { pointText } from "../../lib/report/index.ts";
import { pointAnswer } from "../../lib/vibrations/index.ts";

const named = (name: string, cls: string) => pointAnswer(name).classes.find((c) => c.name.replace(/^\d+/, "") === cls)!;

const characters = (name: string, label: string) => {
  const { classes, species } = pointAnswer(name);
  const row = species.find((s) => s.label === label)!;
  return Object.fromEntries(classes.map((c, i) => [c.name.replace(/^\d+/, ""), row.characters[i]]));
};

describe("vertical planes", () => {
  test.each([
    ["D6h", "sigma_v", ["C2'"]],
    ["D6h", "sigma_d", ["C2''"]],
    ["6/mmm", "sigma_v", ["C2''"]],
    ["6/mmm", "sigma_d", ["C2'"]],
    ["D4h", "sigma_v", ["C2'"]],
    ["4/mmm", "sigma_v", ["C2'"]],
    ["4/mmm", "sigma_d", ["C2''"]],
    ["D3h", "sigma_v", ["C2'"]],
    ["C6v", "sigma_v", []],
    ["D3d", "sigma_d", []],
    ["Oh", "sigma_d", []],
  ] as const)("of %s called %s contain %j", (name, planes, axes) => {
    expect(named(name, planes).containsAxes).toEqual(axes);
  });

  test.each([
    ["6/mmm", "crystal"],
    ["D6h", "molecule"],
    ["4/mmm", null],
    ["D4h", null],
    ["6mm", null],
    ["-3m", null],
    ["D10h", null],
    ["Oh", null],
    ["Dinfh", null],
  ] as const)("of %s are named otherwise elsewhere: %s", (name, expected) => {
    expect(pointAnswer(name).planeNaming).toBe(expected);
  });

  test("are told with the directions of their normals and the axes in them, and with the other naming", () => {
    const text = pointText(pointAnswer("6/mmm"));
    expect(text).toContain("3σv [100] [010] [110], containing C₂″");
    expect(text).toContain("planes named as for crystals, where σv is normal to C₂′");
    expect(pointText(pointAnswer("4/mmm"))).not.toContain("change places");
  });
});

// R. S. Mulliken, J. Chem. Phys. 23 (1955) 1997: B1 is symmetric to C2', B2 to C2'' (from memory); the characters under
// planes as in E. B. Wilson, J. C. Decius, P. C. Cross, Molecular Vibrations (1955), table X-6 (from memory)
describe("species of D4h and D6h", () => {
  test.each(["D4h", "D6h", "4/mmm", "6/mmm"])("%s: B1 is symmetric to C2', B2 to C2''", (name) => {
    for (const parity of ["g", "u"]) {
      expect(characters(name, `B1${parity}`)).toMatchObject({ "C2'": 1, "C2''": -1 });
      expect(characters(name, `B2${parity}`)).toMatchObject({ "C2'": -1, "C2''": 1 });
    }
  });

  test("D6h of molecules: B1g has -1 under sigma_v and 1 under sigma_d; in crystals the columns change places", () => {
    expect(characters("D6h", "B1g")).toMatchObject({ sigma_v: -1, sigma_d: 1 });
    expect(characters("D6h", "B2u")).toMatchObject({ sigma_v: -1, sigma_d: 1 });
    expect(characters("6/mmm", "B1g")).toMatchObject({ sigma_v: 1, sigma_d: -1 });
  });

  test("D4h: B1g has 1 under sigma_v and -1 under sigma_d in both tables", () => {
    for (const name of ["D4h", "4/mmm"]) expect(characters(name, "B1g")).toMatchObject({ sigma_v: 1, sigma_d: -1 });
  });
});
