import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { type PointGroupTable, pointGroupTable } from "../../lib/representation/index.ts";
import { type BareTable, matchTables } from "../support/character-match.ts";
import { runGap } from "./gap/run-gap.ts";

/*
 * Classes, power maps and characters of the 32 crystallographic point groups, of S8, D4d, D5d, D6d and of the
 * icosahedral groups as GAP 4 computes them from generating matrices, without knowledge of our tables.
 * point-groups.txt is the output of point-groups.g, which says what a line holds.
 */
const LINES = readFileSync(new URL("./gap/point-groups.txt", import.meta.url), "utf8")
  .trim()
  .split("\n");

/** International symbols of the crystallographic groups. */
const INTERNATIONAL: Readonly<Record<string, string>> = {
  ...{ C1: "1", Ci: "-1", Cs: "m", C2: "2", C2h: "2/m", D2: "222", C2v: "mm2", D2h: "mmm", C4: "4", S4: "-4" },
  ...{ C4h: "4/m", D4: "422", C4v: "4mm", D2d: "-42m", D4h: "4/mmm", C3: "3", S6: "-3", D3: "32", C3v: "3m" },
  ...{ D3d: "-3m", C6: "6", C3h: "-6", C6h: "6/m", D6: "622", C6v: "6mm", D3h: "-6m2", D6h: "6/mmm", T: "23" },
  ...{ Th: "m-3", O: "432", Td: "-43m", Oh: "m-3m" },
};

type Complex = readonly [re: number, im: number];

/** A sum of roots of unity as GAP writes it: `2`, `-1-E(8)+E(8)^3`. */
function cyclotomic(text: string): Complex {
  let [re, im] = [0, 0];
  for (const term of text.match(/[+-]?[^+-]+/g) ?? []) {
    const match = /^([+-]?)(?:(\d+)|(?:(\d+)\*)?E\((\d+)\)(?:\^(\d+))?)$/.exec(term);
    if (!match) throw new RangeError(`${text} is not a sum of roots of unity`);
    const [, sign, whole, factor = "1", n = "1", power = "1"] = match;
    const size = (sign === "-" ? -1 : 1) * Number(whole ?? factor);
    const angle = whole === undefined ? (2 * Math.PI * Number(power)) / Number(n) : 0;
    re += size * Math.cos(angle);
    im += size * Math.sin(angle);
  }
  return [re, im];
}

/** Pairs of complex conjugate rows become one, their sum; real rows stay. */
function physical(rows: readonly (readonly Complex[])[]): number[][] {
  const isReal = (row: readonly Complex[]) => row.every(([, im]) => Math.abs(im) < 1e-9);
  const conjugate = (a: readonly Complex[], b: readonly Complex[]) =>
    a.every(([re, im], k) => Math.hypot(re - b[k]![0], im + b[k]![1]) < 1e-9);
  return rows.flatMap((row, i) => {
    if (isReal(row)) return [row.map(([re]) => re)];
    const partner = rows.findIndex((other) => conjugate(row, other));
    return i < partner ? [row.map(([re]) => 2 * re)] : [];
  });
}

function readLine(line: string): { readonly name: string; readonly table: BareTable } {
  const [name, classes, powers, characters] = line.split("|") as [string, string, string, string];
  const maps = powers === "" ? [] : powers.split(";");
  return {
    name,
    table: {
      classes: classes.split(" ").map((c) => {
        const [size, order, determinant, trace] = c.split(":").map((t) => cyclotomic(t)[0]);
        return [size!, order!, determinant!, trace!] as const;
      }),
      powers: new Map(
        maps.map((text) => {
          const [p, list] = text.split(":") as [string, string];
          return [Number(p), list.split(" ").map((k) => Number(k) - 1)];
        }),
      ),
      characters: physical(characters.split(";").map((row) => row.split(" ").map(cyclotomic))),
    },
  };
}

/** Our table with its names taken off; power maps from the multiplication table. */
function bareTable({ group, matrices }: PointGroupTable): BareTable {
  const { order, identity, products, classes, classOf } = group;
  const times = (i: number, j: number) => products[order * i + j]!;
  const power = (g: number, p: number) => Array.from({ length: p }).reduce<number>((h) => times(h, g), identity);
  const orderOf = (g: number) => Array.from({ length: order }, (_, n) => n + 1).find((n) => power(g, n) === identity)!;
  const first = classes.map((c) => c.members[0]!);
  const primes = [2, 3, 5].filter((p) => order % p === 0);
  return {
    classes: classes.map(({ size }, k) => {
      const M = matrices[first[k]!]!;
      return [size, orderOf(first[k]!), determinant(M), M[0] + M[4] + M[8]] as const;
    }),
    powers: new Map(primes.map((p) => [p, first.map((g) => classOf[power(g, p)]!)])),
    characters: group.irreps.map((r) => r.characters),
  };
}

function determinant(M: readonly number[]): number {
  const [a, b, c, d, e, f, g, h, i] = M as [number, number, number, number, number, number, number, number, number];
  return a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g);
}

describe("GAP and this library agree on classes, power maps and characters", () => {
  const cases = LINES.map(readLine);

  it("of 38 groups, all crystallographic ones among them", () => {
    expect(cases).toHaveLength(38);
    expect(cases.map((c) => c.name)).toEqual(expect.arrayContaining(Object.keys(INTERNATIONAL)));
    expect(Object.keys(INTERNATIONAL)).toHaveLength(32);
  });

  it.each(cases)("of $name in the orientation of molecules", ({ name, table }) => {
    expect(matchTables(bareTable(pointGroupTable(name)), table)).not.toBeNull();
  });

  it.each(cases.filter((c) => c.name in INTERNATIONAL))("of $name as a crystal class", ({ name, table }) => {
    expect(matchTables(bareTable(pointGroupTable(INTERNATIONAL[name]!)), table)).not.toBeNull();
  });

  it("and the comparison tells groups apart that differ in little", () => {
    const tables = cases.map((c) => c.table);
    tables.forEach((a, i) => {
      tables.forEach((b, j) => {
        expect(matchTables(a, b) !== null, `${cases[i]!.name} and ${cases[j]!.name}`).toBe(i === j);
      });
    });
    const { table } = cases.find((c) => c.name === "D4d")!;
    const [first, ...rest] = table.characters;
    const changed = { ...table, characters: [first!.map((x, k) => (k === first!.length - 1 ? -x : x)), ...rest] };
    expect(matchTables(changed, table)).toBeNull();
  });
});

describe("the stored output of the GAP script", () => {
  it("is what GAP finds today, where it is installed", () => {
    const quick = ["D2d", "C3h", "Td", "D6d", "I"];
    const run = runGap("./point-groups.g", `NAMES := [ ${quick.map((n) => `"${n}"`).join(", ")} ];;`);
    if ("reason" in run) {
      console.info(`stored output not renewed: ${run.reason}`);
      expect(run.reason).toMatch(/GAP/);
      return;
    }
    const found = run.lines.map(readLine);
    expect(found.map((f) => f.name)).toEqual(quick);
    for (const { name, table } of found) {
      const stored = LINES.map(readLine).find((l) => l.name === name)!;
      expect(matchTables(table, stored.table), name).not.toBeNull();
    }
  }, 120_000);
});
