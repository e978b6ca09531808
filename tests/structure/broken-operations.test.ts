import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import {
  type AtomSite,
  brokenOperations,
  crystalFromBlock,
  readAtomSites,
  type Vec3,
} from "../../lib/structure/index.ts";
import { fixture } from "../support/crystals.ts";

/** Every atom of the cell as a row of its own. */
function wholeList(name: string): AtomSite[] {
  return fixture(name).sites.flatMap((site) =>
    site.images.map(({ position }, k) => ({ ...site, label: `${site.label}-${k + 1}`, position })),
  );
}

describe("the rows of an atom list under the declared operations", () => {
  it("obey them where the whole cell is listed as it should be", () => {
    for (const name of ["calcite", "gypsum", "spinel", "epsomite", "alpha-quartz"]) {
      expect(brokenOperations(fixture(name), wholeList(name))).toEqual({ wholeCell: true, share: 1, broken: [] });
    }
  });

  it("break every operation that moves a displaced atom, and no other", () => {
    const crystal = fixture("gypsum");
    const list = wholeList("gypsum");
    const moved = list.findIndex((row) => row.element === "Ca");
    const rows = list.map((row, i) =>
      i === moved ? { ...row, position: [row.position[0], row.position[1], row.position[2] + 0.03] as Vec3 } : row,
    );
    const { wholeCell, broken } = brokenOperations(crystal, rows);
    expect(wholeCell).toBe(true);
    // the calcium lies on a twofold axis of I 2/a or C 2/c, and no operation keeps the displaced one
    expect(broken).toHaveLength(crystal.group.operations.length - 1);
    for (const b of broken) {
      expect(b.displaced).toContain(list[moved]!.label);
      expect(b.displaced.length).toBeLessThanOrEqual(2);
      expect(b.unmatched).toEqual([]);
      expect(b.largest).toBeGreaterThan(0.05);
    }
  });

  it("name the atoms that have no partner where one is missing", () => {
    const list = wholeList("calcite");
    const { broken, wholeCell } = brokenOperations(fixture("calcite"), list.slice(1));
    expect(wholeCell).toBe(true);
    expect(broken.length).toBeGreaterThan(0);
    expect(broken.every((b) => b.unmatched.length === 1 && b.displaced.length === 0)).toBe(true);
  });

  it("say nothing where they are an asymmetric unit", () => {
    const folder = new URL("../../fixtures/", import.meta.url);
    for (const file of readdirSync(folder).filter((f) => f.endsWith(".cif"))) {
      const block = requireClean(readCif(readFileSync(new URL(file, folder), "utf8"))).blocks[0]!;
      const crystal = crystalFromBlock(block);
      expect([file, brokenOperations(crystal, readAtomSites(block, crystal.metric).sites).broken]).toEqual([file, []]);
    }
  });
});
