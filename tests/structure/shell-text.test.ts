import fc from "fast-check";
import { expect, it, test } from "vitest";
import { formatShellPattern, parseShellPattern } from "../../lib/structure/index.ts";
import { problemOf } from "../support/problem-of.ts";

test("a centre with a distance reads back as it is written", () => {
  const centre = fc.stringMatching(/^[A-Z][a-z]?[A-Za-z0-9'()*< _-]{0,6}$/).filter((s) => s.trim() === s);
  const below = fc.option(fc.integer({ min: 1, max: 900 }).map((n) => n / 100));
  fc.assert(
    fc.property(centre, below, (name, limit) => {
      const pattern = { centre: name, below: limit };
      expect(parseShellPattern(formatShellPattern(pattern))).toEqual(pattern);
    }),
  );
});

it.each(["", "<3", "Ti<", "Ti<x", "Ti O", "Ti<3<4"])("refuses %j", (text) => {
  expect(problemOf(() => parseShellPattern(text)).code).toBe("polyhedron-unreadable");
});
