import { describe, expect, it } from "vitest";
import { ratVec3 } from "../../lib/algebra/index.ts";
import { reduceText, symmetriseText } from "../../lib/report/index.ts";
import { crystalOf, metricOf, reduceAnswer, symmetriseAnswer } from "../../lib/structure/index.ts";
import { spaceGroup } from "../../lib/symmetry/index.ts";
import { fixture } from "../support/crystals.ts";

/** A fixture as a list of all its atoms without symmetry. */
function unsymmetric(name: string) {
  const { metric, sites } = fixture(name);
  const rows = sites.flatMap((s) =>
    s.images.map(({ position }, k) => ({ ...s, label: `${s.label}${String.fromCharCode(97 + k)}`, position })),
  );
  return crystalOf({ name, metric, group: spaceGroup([]), sites: rows });
}

describe("the text of symmetrise", () => {
  it("names what is missed: group, factor, translations, sites that are one", () => {
    const text = symmetriseText(symmetriseAnswer(unsymmetric("halite")));
    expect(text).toContain("F m -3 m (No. 225");
    expect(text).toContain("192 times as many operations as the file declares: symmetry is missed");
    expect(text.match(/translation not declared/g)).toHaveLength(2);
    expect(text).toMatch(/^Naa +Na +1 +4a +m-3m .*Nab Nac Nad$/m);
  });

  it("says so where nothing is missed", () => {
    const text = symmetriseText(symmetriseAnswer(fixture("calcite"), { cell: "given" }));
    expect(text).toContain("as many operations as the file declares");
    expect(text).toContain("nothing more within");
    expect(text).not.toContain("missed");
  });

  it("tells what a larger tolerance finds", () => {
    const text = symmetriseText(symmetriseAnswer(fixture("barium-titanate")));
    expect(text).toMatch(
      /with 0\.\d{3} Å and a strain of 2\.\d\d %: P m -3 m \(No\. 221\), 6 times as many operations/,
    );
  });

  it("holds no NaN and no undefined", () => {
    for (const name of ["halite", "alpha-quartz", "benzene", "barium-titanate"]) {
      const answer = symmetriseAnswer(unsymmetric(name));
      expect(symmetriseText(answer)).not.toMatch(/NaN|undefined|Infinity/);
      expect(JSON.parse(JSON.stringify(answer))).toEqual(answer);
    }
  });
});

describe("the text of reduce", () => {
  it("has a line for every cell, and marks the lattice taken", () => {
    const metric = metricOf({ a: 5, b: 5.05, c: 8, alpha: 90, beta: 90.4, gamma: 90 });
    const answer = reduceAnswer(metric, [ratVec3([0, 0, 0])]);
    const text = reduceText(answer, { source: { file: "wall.cif", block: "a" }, notes: ["a note"] });
    expect(text).toMatch(/^wall\.cif, block a\n- a note\n/);
    for (const name of ["given (P)", "Niggli", "Delaunay", "conventional (mP)"]) expect(text).toContain(`\n${name}  `);
    expect(text).toMatch(/^mP \* +0\.000/m);
    expect(text).toMatch(/^oP +0\.400/m);
    expect(JSON.parse(JSON.stringify(answer))).toEqual(answer);
  });
});
