import { describe, expect, it } from "vitest";
import { directionElements } from "../../lib/symmetry/direction-elements.ts";
import { closeGroup } from "../../lib/symmetry/group-closure.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import {
  directionSystem,
  formatSymbol,
  splitSymbol,
  symmetryDirections,
} from "../../lib/symmetry/hermann-mauguin-symbol.ts";
import { type Operation, operationKey, reduce } from "../../lib/symmetry/operation.ts";
import { settingHall, settingOperations } from "../../lib/symmetry/setting-group.ts";
import { type Setting, settingsOf } from "../../lib/symmetry/settings.ts";
import { spaceGroupTypes } from "../../lib/symmetry/space-group-type.ts";
import { transformOperation } from "../../lib/symmetry/transformation.ts";

const numbers = Array.from({ length: 230 }, (_, i) => i + 1);
const keys = (operations: readonly Operation[]) => operations.map(operationKey).sort();
const hexagonal = (s: Pick<Setting, "number" | "choice">) => s.number >= 143 && s.number <= 194 && s.choice !== "R";

/** Types whose twofold axes along a, b, c nowhere meet in one point: the subgroup I 21 21 21, not I 2 2 2. */
const SKEW_AXES = new Set([73, 74, 206]);

describe("the table of types", () => {
  it.each(numbers)("has for type %i the full symbol that its operations give", (number) => {
    const type = spaceGroupTypes()[number - 1]!;
    const { operations } = operationsFromHall(type.hall);
    const short = splitSymbol(type.hermannMauguin);
    const directions = symmetryDirections(directionSystem(number));
    const parts = short.parts.map((part, i) => {
      if (part.axis !== null) return part;
      const { axes } = directionElements(operations, directions[i]!, hexagonal({ number, choice: "" }));
      const axis = SKEW_AXES.has(number) ? axes.at(-1) : axes[0];
      return { axis: axis ?? null, plane: part.plane };
    });
    expect(formatSymbol({ lattice: short.lattice, parts })).toBe(type.fullHermannMauguin);
  });
});

describe("settingsOf", () => {
  it("begins with the reference setting, which changes nothing", () => {
    for (const number of numbers) {
      const [first, ...rest] = settingsOf(number);
      expect(first).toMatchObject({ reference: true, number });
      expect(rest.some((s) => s.reference)).toBe(false);
      expect(settingHall(first!)).toBe(spaceGroupTypes()[number - 1]!.hall);
    }
  });

  it("names every setting once", () => {
    for (const number of numbers) {
      const names = settingsOf(number).map((s) => s.name);
      expect(new Set(names).size).toBe(names.length);
    }
  });

  it.each(numbers)("finds, for type %i, every letter of each symbol among the elements of its setting", (number) => {
    for (const setting of settingsOf(number)) {
      const operations = settingOperations(setting);
      const { parts } = splitSymbol(setting.hermannMauguin.full);
      const directions = symmetryDirections(directionSystem(number), setting.choice === "R");
      for (const [i, part] of parts.entries()) {
        const direction = directions[i];
        if (!direction || part.axis === "1") continue;
        const found = directionElements(operations, direction, hexagonal(setting));
        if (part.axis !== null) expect(found.axes).toContain(part.axis);
        // International Tables write R 3 c on rhombohedral axes too, where the same plane is an n glide.
        const letter = setting.choice === "R" && part.plane === "c" ? "n" : part.plane;
        if (letter) expect(found.planes.flat()).toContain(letter);
      }
    }
  });

  it.each(numbers)("has, for type %i, Hall symbols of exactly the operations of each setting", (number) => {
    for (const setting of settingsOf(number)) {
      const operations = settingOperations(setting);
      expect(keys(operationsFromHall(settingHall(setting)).operations)).toEqual(keys(operations));
    }
  });

  it("carries the operations of every setting onto those of the reference setting", () => {
    for (const number of numbers) {
      const reference = keys(settingOperations(settingsOf(number)[0]!));
      for (const setting of settingsOf(number)) {
        const { toReference } = setting;
        const moved = settingOperations(setting).map((a) => reduce(transformOperation(a, toReference)!));
        const known = new Set(reference);
        expect(moved.every((a) => known.has(operationKey(a)))).toBe(true);
        expect(closeGroup(moved).length).toBeLessThanOrEqual(reference.length);
      }
    }
  });
});
