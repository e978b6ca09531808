import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { componentsOf, type PeriodicEdge } from "../../lib/structure/index.ts";

const edge = (first: number, second: number, ...shift: [number, number, number]): PeriodicEdge => ({
  first,
  second,
  shift,
});

describe("componentsOf", () => {
  test.each([
    ["a molecule across a cell edge", [edge(0, 1, -1, 0, 0)], 0],
    ["a chain of two atoms", [edge(0, 1, 0, 0, 0), edge(1, 0, 0, 0, 1)], 1],
    [
      "a ring, which closes without a translation",
      [edge(0, 1, 1, 0, 0), edge(1, 2, 0, 1, 0), edge(2, 0, -1, -1, 0)],
      0,
    ],
    ["a square net of one atom", [edge(0, 0, 1, 0, 0), edge(0, 0, 0, 1, 0)], 2],
    ["a net whose translations are dependent", [edge(0, 0, 1, 1, 0), edge(0, 0, 2, 2, 0)], 1],
    ["diamond", [edge(0, 1, 0, 0, 0), edge(0, 1, -1, 0, 0), edge(0, 1, 0, -1, 0), edge(0, 1, 0, 0, -1)], 3],
  ])("gives the dimension of %s", (_, edges, dimension) => {
    const [component] = componentsOf(3, edges);
    expect(component!.translations).toHaveLength(dimension);
  });

  test("gathers a molecule so that every bond spans no cell", () => {
    const edges = [edge(2, 1, 0, 0, -1), edge(1, 0, 3, 0, 0)];
    const [component] = componentsOf(3, edges);
    expect(component!.members).toEqual([
      { atom: 0, shift: [0, 0, 0] },
      { atom: 1, shift: [-3, 0, 0] },
      { atom: 2, shift: [-3, 0, 1] },
    ]);
  });

  test("does not depend on which image of each node is meant", () => {
    const shift = fc.tuple(
      fc.integer({ min: -2, max: 2 }),
      fc.integer({ min: -2, max: 2 }),
      fc.integer({ min: -2, max: 2 }),
    );
    const node = fc.nat({ max: 5 });
    fc.assert(
      fc.property(
        fc.array(fc.tuple(node, node, shift), { maxLength: 9 }),
        fc.array(shift, { minLength: 6, maxLength: 6 }),
        (list, moves) => {
          const edges = list.map(([a, b, t]) => edge(a, b, ...t));
          const moved = list.map(([a, b, t]) => {
            const s = (i: 0 | 1 | 2) => t[i] + moves[b]![i] - moves[a]![i];
            return edge(a, b, s(0), s(1), s(2));
          });
          const before = componentsOf(6, edges);
          const after = componentsOf(6, moved);
          expect(after.map((c) => c.translations)).toEqual(before.map((c) => c.translations));
          expect(after.map((c) => c.members.map((m) => m.atom))).toEqual(
            before.map((c) => c.members.map((m) => m.atom)),
          );
        },
      ),
    );
  });
});
