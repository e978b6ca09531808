import { describe, expect, it } from "vitest";
import { molecularGroup, orientedSymbols } from "../../lib/representation/index.ts";
import { activities, pointAnswer, readPointName, type SubgroupAnswer } from "../../lib/vibrations/index.ts";
import { problemOf } from "../support/problem-of.ts";

const MOLECULAR = "C1 Cs Ci C5 C3v C5v C4h C5h D3 D2d D4d D5d D3h D6h S4 S8 T Td Th O Oh I Ih".split(" ");

/** `A1 + 2E`. */
const sum = (counts: Readonly<Record<string, number>>): string =>
  Object.entries(counts)
    .map(([label, n]) => (n > 1 ? n : "") + label)
    .join(" + ");

const rows = ({ table }: SubgroupAnswer): string => table.map((r) => `${r.species} > ${sum(r.to)}`).join("; ");

describe("names of point groups", () => {
  it.each([
    ["d_{3d}", "D3d"],
    ["OH", "Oh"],
    ["4/m m m", "4/mmm"],
    ["−4m2", "-4m2"],
    ["3̅m", "-3m"],
    ["m3̅m", "m-3m"],
  ])("%s is %s", (text, name) => expect(readPointName(text)).toEqual({ kind: "finite", name }));

  it.each(["Cinfv", "C∞v", "Coov", "C*v", "∞m"])("%s is Cinfv", (text) => {
    expect(readPointName(text)).toEqual({ kind: "linear", name: "Cinfv" });
  });

  it.each(["Dinfh", "D∞h", "dooh", "∞/mm"])("%s is Dinfh", (text) => {
    expect(readPointName(text)).toEqual({ kind: "linear", name: "Dinfh" });
  });

  it.each(["Kh", "C∞h", "5m", "D3v", "C500", ""])("%s is refused with advice", (text) => {
    const problem = problemOf(() => pointAnswer(text));
    expect(problem.code).toBe("unknown-point-group");
    expect(problem.hint).not.toBe("");
  });
});

describe("the table of a point group", () => {
  it("names classes with their directions and what the species transform like", () => {
    const answer = pointAnswer("-4m2");
    expect(answer).toMatchObject({ schoenflies: "D2d", hermannMauguin: "-4m2", order: 8 });
    expect(answer.classes.map((c) => [c.name, ...c.directions].join(" "))).toEqual([
      "E",
      "2S4 [001]",
      "C2 [001]",
      "2C2' [110] [1-10]",
      "2sigma_d [100] [010]",
    ]);
    const b2 = answer.species.find((s) => s.label === "B2")!;
    expect(b2).toMatchObject({ vectors: ["z"], quadratics: ["x2-y2"], infrared: true, raman: true });
  });

  it.each([
    ["Ih", ["2cos(pi/5)", "2cos(2pi/5)", "2cos(3pi/5)", "2cos(4pi/5)"]],
    ["D4d", ["sqrt2", "-sqrt2"]],
    ["C7v", ["2cos(2pi/7)", "2cos(4pi/7)", "2cos(6pi/7)"]],
    ["Oh", []],
  ])("of %s gives closed forms of the characters that are not whole", (name, expected) => {
    const { closedForms } = pointAnswer(name);
    expect(closedForms.map((f) => f.text)).toEqual(expected);
    for (const { value, text } of closedForms) {
      const [, times, n] = /2cos\((\d*)pi\/(\d+)\)/.exec(text) ?? [];
      const exact = n ? 2 * Math.cos((Number(times || 1) * Math.PI) / Number(n)) : Math.sign(value) * Math.SQRT2;
      expect(value).toBeCloseTo(exact, 12);
    }
  });

  it.each([...MOLECULAR, ...orientedSymbols()])("of %s: functions agree with activities", (name) => {
    for (const s of pointAnswer(name).species) {
      expect(s.vectors.length > 0).toBe(s.infrared);
      expect(s.quadratics.length > 0).toBe(s.raman);
    }
  });

  it("of Td, C3v, Ih and D4d has the hyper-Raman species published", () => {
    // S. J. Cyvin, J. E. Rauch and J. C. Decius, J. Chem. Phys. 43 (1965) 4083, table of selection rules (from memory)
    const active = (name: string) =>
      pointAnswer(name)
        .species.filter((s) => s.hyperRaman)
        .map((s) => s.label)
        .join(" ");
    expect(active("Td")).toBe("A1 T1 T2");
    expect(active("C3v")).toBe("A1 A2 E");
    expect(active("Ih")).toBe("T1u T2u Gu");
    expect(active("D6h")).toBe("A2u B1u B2u E1u E2u");
  });
});

describe("direct products", () => {
  it("multiply dimensions, and a square is its symmetric and its antisymmetric part", () => {
    for (const name of MOLECULAR) {
      const { species } = pointAnswer(name);
      const dimension = new Map(species.map((s) => [s.label, s.dimension]));
      const size = (counts: Readonly<Record<string, number>>) =>
        Object.entries(counts).reduce((n, [label, k]) => n + k * dimension.get(label)!, 0);
      const products = species.flatMap((a) => species.map((b) => `${a.label} x ${b.label}`));
      for (const p of pointAnswer(name, { products }).products) {
        const [a, b] = p.factors.map((f) => dimension.get(f)!) as [number, number];
        expect(size(p.sum)).toBe(a * b);
        expect(p.symmetric !== null).toBe(p.factors[0] === p.factors[1]);
        if (!p.symmetric || !p.antisymmetric) continue;
        expect(size(p.symmetric)).toBe((a * (a + 1)) / 2);
        for (const { label } of species) {
          expect((p.symmetric[label] ?? 0) + (p.antisymmetric[label] ?? 0)).toBe(p.sum[label] ?? 0);
        }
      }
    }
  });

  it("are those of the textbooks (Wilson, Decius and Cross 1955, appendix X; from memory)", () => {
    const [p, q, r] = pointAnswer("Td", { products: ["E x E", "f2×f2", "T1*T2*E"] }).products;
    expect([sum(p!.sum), sum(p!.symmetric!), sum(p!.antisymmetric!)]).toEqual(["A1 + A2 + E", "A1 + E", "A2"]);
    expect([sum(q!.sum), sum(q!.symmetric!), sum(q!.antisymmetric!)]).toEqual([
      "A1 + E + T1 + T2",
      "A1 + E + T2",
      "T1",
    ]);
    expect(sum(r!.sum)).toBe("A1 + A2 + 2E + 2T1 + 2T2");
  });

  it.each(["E", "E x", "E x Q", "x".repeat(12)])("refuse %s", (text) => {
    expect(problemOf(() => pointAnswer("Td", { products: [text] })).hint).not.toBe("");
  });
});

describe("correlation with subgroups", () => {
  it("gives every inequivalent embedding once, with what it keeps", () => {
    const { subgroups } = pointAnswer("4/mmm", { subgroups: ["mmm"] });
    expect(subgroups.map((s) => [s.kept, s.conjugates])).toEqual([
      ["E, C2, 2C2', i, sigma_h, 2sigma_v", 1],
      ["E, C2, 2C2'', i, sigma_h, 2sigma_d", 1],
    ]);
    expect(subgroups[0]!.directions).toContain("C2' [010] [100]");
  });

  it("reads names of either kind and finds S6 where crystallographers say C3i", () => {
    const names = ["S6", "C3i", "-3"];
    for (const name of ["Oh", "m-3m"]) {
      const lists = names.map((n) => pointAnswer(name, { subgroups: [n] }).subgroups);
      expect(lists[0]).toHaveLength(1);
      expect(lists[1]).toEqual(lists[0]);
      expect(lists[2]).toEqual(lists[0]);
    }
  });

  it("lists all with `all`, and says which there are where there is none", () => {
    expect(pointAnswer("-43m", { subgroups: ["all"] }).subgroups).toHaveLength(11);
    expect(problemOf(() => pointAnswer("D3", { subgroups: ["Oh"] })).hint).toBe("It has D3, C3, C2, C1.");
  });
});

describe("linear groups", () => {
  it("have characters in terms of an angle, which at 120 degrees are those of D3h and C3v", () => {
    const value = (c: number | string, phi: number): number => {
      if (typeof c === "number") return c;
      const [, sign, lambda] = /^(-?)2cos\((\d*)phi\)$/.exec(c)!;
      return (sign ? -2 : 2) * Math.cos(Number(lambda || 1) * phi);
    };
    // Dinfh on E, C(phi), sigma_v, i, S(phi), C2'. S(120 degrees) of D3h is sigma_h times a third of a turn.
    for (const s of pointAnswer("Dinfh").species) {
      const [e, turn, plane, i, screw, axis] = s.characters.map((c) => value(c, (2 * Math.PI) / 3));
      const { subgroups } = pointAnswer("Dinfh", { subgroups: ["D3h", "D3d"] });
      const inGroup = (name: string, classes: readonly string[], expected: readonly number[]) => {
        const group = molecularGroup(name);
        const to = subgroups.find((x) => x.schoenflies === name)!.table.find((r) => r.species === s.label)!.to;
        classes.forEach((c, k) => {
          const column = group.classes.findIndex((x) => x.name === c);
          const found = group.irreps.reduce((t, r) => t + (to[r.label] ?? 0) * r.characters[column]!, 0);
          expect(found).toBeCloseTo(expected[k]!, 9);
        });
      };
      inGroup("D3h", ["E", "2C3", "3sigma_v", "2S3", "3C2'"], [e!, turn!, plane!, screw!, axis!]);
      inGroup("D3d", ["E", "2C3", "3sigma_d", "i", "3C2'"], [e!, turn!, plane!, i!, axis!]);
    }
  });

  it("share activities with finite groups of high order", () => {
    const active = (species: readonly { label: string; infrared: boolean; raman: boolean; hyperRaman: boolean }[]) => ({
      infrared: species.filter((s) => s.infrared).map((s) => s.label),
      raman: species.filter((s) => s.raman).map((s) => s.label),
      hyperRaman: species.filter((s) => s.hyperRaman).map((s) => s.label),
    });
    expect(active(pointAnswer("Dinfh").species)).toEqual({
      infrared: ["Sigmau+", "Piu"],
      raman: ["Sigmag+", "Pig", "Deltag"],
      hyperRaman: ["Sigmau+", "Piu", "Deltau", "Phiu"],
    });
    expect(activities(molecularGroup("D20h")).filter((a) => a.hyperRaman)).toHaveLength(4);
  });

  it("give products with their symmetric parts", () => {
    const [p, q] = pointAnswer("Dinfh", { products: ["Piu x Piu", "Sigma_u- × Δg"] }).products;
    expect([sum(p!.sum), sum(p!.symmetric!), sum(p!.antisymmetric!)]).toEqual([
      "Sigmag+ + Sigmag- + Deltag",
      "Sigmag+ + Deltag",
      "Sigmag-",
    ]);
    expect([sum(q!.sum), q!.symmetric]).toEqual(["Deltau", null]);
    expect(problemOf(() => pointAnswer("Dinfh", { products: ["Pi x Pi"] })).code).toBe("unknown-species");
  });

  it("split in finite groups, the molecule along the axis or across it", () => {
    // Sigma+, Sigma-, Pi, Delta of Cinfv in C2v and Cs (Wilson, Decius and Cross 1955, appendix X-8; from memory)
    const { subgroups } = pointAnswer("Cinfv", { subgroups: ["C2v", "Cs"] });
    expect(subgroups.map((s) => s.axes)).toEqual([
      "molecule along z of the subgroup",
      "molecule along x of the subgroup",
    ]);
    expect(rows(subgroups[0]!)).toMatch(/^Sigma\+ > A1; Sigma- > A2; Pi > B1 \+ B2; Delta > A1 \+ A2;/);
    expect(rows(subgroups[1]!)).toMatch(/^Sigma\+ > A'; Sigma- > A''; Pi > A' \+ A''; Delta > A' \+ A'';/);
    expect(problemOf(() => pointAnswer("Cinfv", { subgroups: ["C2h"] })).code).toBe("no-such-subgroup");
    expect(problemOf(() => pointAnswer("Dinfh", { subgroups: ["all"] })).code).toBe("no-such-subgroup");
  });
});

it("a name that is none is refused in one sentence that names it once", () => {
  const message = (name: string) => {
    try {
      pointAnswer(name);
    } catch (e) {
      return (e as Error).message;
    }
    return "";
  };
  expect(message("Th3")).toBe('There is no such table: "Th3" is not the name of a finite point group.');
  expect(message("5/m").match(/5\/m/g)).toHaveLength(1);
});
