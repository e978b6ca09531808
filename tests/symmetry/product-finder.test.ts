import { describe, expect, it } from "vitest";
import { compose, operationKey, productFinder, reduce } from "../../lib/symmetry/index.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";

describe("products found in the list of a group", () => {
  it.each([1, 2, 15, 62, 148, 167, 194, 205, 220, 227])("are those of composing and reducing, type %i", (number) => {
    const { operations } = referenceGroup(number);
    const product = productFinder(operations);
    const index = new Map(operations.map((a, i) => [operationKey(a), i]));
    for (const a of operations) {
      for (const b of operations) expect(product(a, b)).toBe(index.get(operationKey(reduce(compose(a, b)))));
    }
  });

  it("are found for operations with lattice translations too, as those that fix a point", () => {
    const { operations } = referenceGroup(230);
    const moved = { W: operations[5]!.W, w: { ...operations[5]!.w, n: [-9, 13, 2] as const } };
    const found = productFinder(operations)(operations[7]!, moved);
    const expected = operationKey(reduce(compose(operations[7]!, moved)));
    expect(found < 0 ? null : operationKey(operations[found]!)).toBe(
      operations.some((a) => operationKey(a) === expected) ? expected : null,
    );
  });

  it("are -1 where the list lacks them", () => {
    const { operations } = referenceGroup(62);
    const half = operations.slice(0, 2);
    const product = productFinder(half);
    expect(product(operations[2]!, half[1]!)).toBe(-1);
    expect(product(half[1]!, half[1]!)).toBe(0);
  });
});
