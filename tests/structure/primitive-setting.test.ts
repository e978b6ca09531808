import { describe, expect, test } from "vitest";
import { vetAnswer } from "../../lib/audit/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { crystalFromBlock, latticeFromBlock } from "../../lib/structure/index.ts";
import { problemOf } from "../support/problem-of.ts";

type Vector = readonly [number, number, number];

/** Six parameters of a cell by its Cartesian vectors, to the digits that files give. */
function parametersOf(vectors: readonly Vector[], stretch = 1): string[] {
  const dot = (u: Vector, v: Vector) => u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
  const lengths = vectors.map((v) => Math.sqrt(dot(v, v)));
  const angle = (i: number, j: number) =>
    (Math.acos(dot(vectors[i]!, vectors[j]!) / (lengths[i]! * lengths[j]!)) * 180) / Math.PI;
  return [lengths[0]! * stretch, lengths[1]!, lengths[2]!, angle(1, 2), angle(0, 2), angle(0, 1)].map((x) =>
    x.toFixed(3),
  );
}

/** A block with a name for its symmetry and nothing else; atoms as `Na 0 0 0`. */
function blockOf(name: string, parameters: readonly string[], atoms: readonly string[]) {
  const names = ["length_a", "length_b", "length_c", "angle_alpha", "angle_beta", "angle_gamma"];
  const items = parameters.map((value, i) => `_cell_${names[i]} ${value}`);
  const columns = ["label", "fract_x", "fract_y", "fract_z"].map((c) => `_atom_site_${c}`);
  const text = ["data_x", ...items, `_space_group_name_H-M_alt '${name}'`, "loop_", ...columns, ...atoms, ""];
  return readCif(text.join("\n")).value.blocks[0]!;
}

const [a, b, c] = [4, 5, 9];
const SALT = ["Na 0 0 0", "Cl .5 .5 .5"];
const F: Vector[] = [
  [0, a / 2, a / 2],
  [a / 2, 0, a / 2],
  [a / 2, a / 2, 0],
];
const I: Vector[] = [
  [-a / 2, a / 2, c / 2],
  [a / 2, -a / 2, c / 2],
  [a / 2, a / 2, -c / 2],
];
const BODY: Vector[] = [
  [a, 0, 0],
  [0, a, 0],
  [a / 2, a / 2, a / 2],
];
const C: Vector[] = [
  [a / 2, -b / 2, 0],
  [a / 2, b / 2, 0],
  [0, 0, c],
];
const H = Math.sqrt(3) / 2;
const R: Vector[] = [
  [a / 2, (a * H) / 3, c / 3],
  [-a / 2, (a * H) / 3, c / 3],
  [0, (-2 * a * H) / 3, c / 3],
];

describe("a name alone over the primitive cell of its lattice", () => {
  test.each([
    ["F m -3 m", F, 48],
    ["F -4 3 m", F, 24],
    ["I 4/m m m", I, 16],
    ["I m -3 m", BODY, 48],
    ["C m m m", C, 8],
    ["R -3 m :H", R, 12],
  ] as const)("%s: all operations are kept over its axes", (name, vectors, order) => {
    const { group, sites, notes, disagreements } = crystalFromBlock(blockOf(name, parametersOf(vectors), SALT));
    expect(group.centrings).toHaveLength(1);
    expect(group.operations).toHaveLength(order);
    expect(sites[0]!.images).toHaveLength(1);
    expect(notes.join("\n")).toContain("but the primitive one, with axes");
    expect(notes.join("\n")).not.toContain("not invariant");
    expect(disagreements.map((d) => [d.kind, d.level])).toEqual([["name", "setting"]]);
  });

  test("is a doubt of vet, not a contradiction", () => {
    const { findings, counts } = vetAnswer(blockOf("F m -3 m", parametersOf(F), SALT));
    expect(counts.contradiction).toBe(0);
    expect(findings.map((f) => f.id)).toContain("group-name-setting");
  });

  test("gives reduce a lattice without centrings", () => {
    expect(latticeFromBlock(blockOf("F m -3 m", parametersOf(F), SALT)).centrings).toHaveLength(1);
  });

  test("is taken within one per cent of the shape", () => {
    expect(crystalFromBlock(blockOf("F m -3 m", parametersOf(F, 1.004), SALT)).group.operations).toHaveLength(48);
    expect(problemOf(() => crystalFromBlock(blockOf("F m -3 m", parametersOf(F, 1.02), SALT))).code).toBe(
      "cell-not-of-group",
    );
  });
});

describe("a name that does not fit the cell", () => {
  const odd = ["4", "5", "6", "90", "90", "90"];

  test("is refused with its strain and what to do", () => {
    const problem = problemOf(() => crystalFromBlock(blockOf("F m -3 m", odd, SALT)));
    expect(problem.code).toBe("cell-not-of-group");
    expect(problem.message).toMatch(/does not have the shape that the name F m -3 m needs \(strain \d+\.\d %\)/);
    expect(problem.span).not.toBeNull();
    expect(problem.hint).toContain("list the operations");
  });

  test("is a contradiction of vet, which goes on with the group named", () => {
    const { findings } = vetAnswer(blockOf("F m -3 m", odd, SALT));
    expect(findings[0]).toMatchObject({ id: "cell-shape", severity: "contradiction" });
  });

  test("is taken with a note where the strain may be a misprint", () => {
    const { notes, group } = crystalFromBlock(blockOf("F m -3 m", ["4", "4", "4.05", "90", "90", "90"], SALT));
    expect(group.centrings).toHaveLength(4);
    expect(notes.join("\n")).toContain("not invariant");
  });
});
