import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { type IntMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { dimension } from "../../lib/symmetry/affine-subspace.ts";
import { closeGroup } from "../../lib/symmetry/group-closure.ts";
import { identify } from "../../lib/symmetry/identification.ts";
import type { Operation } from "../../lib/symmetry/operation.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { enumerateWyckoff } from "../../lib/symmetry/wyckoff-enumeration.ts";
import { runGap } from "./gap/run-gap.ts";

/*
 * What the crystallographic groups of GAP say of the 230 types: GAP 4 with the package cryst (B. Eick, F. Gaehler,
 * W. Nickel, "Cryst - Computing with crystallographic groups"), an independent computation and independent tables.
 * space-groups.txt is the output of space-groups.g, which says what a line holds.
 */
const LINES = readFileSync(new URL("./gap/space-groups.txt", import.meta.url), "utf8")
  .trim()
  .split("\n");

interface Line {
  readonly number: number;
  readonly order: number;
  readonly latticePoints: number;
  /** dimension:multiplicity:order of the site group, one per Wyckoff position. */
  readonly positions: readonly string[];
  readonly generators: readonly Operation[];
}

function read(line: string): Line {
  const [number, order, points, positions, generators] = line.split("|") as [string, string, string, string, string];
  return {
    number: Number(number),
    order: Number(order),
    latticePoints: Number(points),
    positions: positions.split(" "),
    generators: generators.split(";").map(readGenerator),
  };
}

function readGenerator(text: string): Operation {
  const numbers = text.split(" ");
  const w = numbers.slice(9).map((t) => {
    const [n, d = "1"] = t.split("/") as [string, string?];
    return (Number(n) * 24) / Number(d);
  });
  return {
    W: numbers.slice(0, 9).map(Number) as unknown as IntMat3,
    w: ratVec3(w as unknown as [number, number, number], 24),
  };
}

describe("GAP and this library agree", () => {
  it("on the order of the point group and the lattice points per cell of all 230 types", () => {
    const ours = LINES.map((_, i) => {
      const { representatives, centrings } = referenceGroup(i + 1);
      return [i + 1, representatives.length, centrings.length];
    });
    expect(LINES.map(read).map((l) => [l.number, l.order, l.latticePoints])).toEqual(ours);
    expect(LINES.length).toBe(230);
  });

  it("on dimension, multiplicity and site-group order of all Wyckoff positions", () => {
    for (const { number, positions } of LINES.map(read)) {
      const ours = enumerateWyckoff(referenceGroup(number)).map((p) =>
        [dimension(p.representative), p.multiplicity, p.stabiliser.length].join(":"),
      );
      expect(ours.sort(), `${number}`).toEqual([...positions].sort());
    }
  });

  it("on the number of the type of every group that GAP generates, in the setting that GAP uses", () => {
    for (const { number, generators } of LINES.map(read)) {
      expect(identify(closeGroup(generators)).number).toBe(number);
    }
  });
});

/** A few types that GAP needs little time for, among them origin choices and hexagonal axes. */
const QUICK = [1, 4, 9, 14, 19, 33, 43, 62, 76];

describe("the stored output of the GAP script", () => {
  it("is what GAP prints today, where it is installed", () => {
    const run = runGap("./space-groups.g", `NUMBERS := [ ${QUICK.join(", ")} ];;`);
    if ("reason" in run) {
      console.info(`stored output not renewed: ${run.reason}`);
      expect(run.reason).toMatch(/GAP/);
      return;
    }
    expect(run.lines).toEqual(QUICK.map((n) => LINES[n - 1]));
  }, 120_000);
});
