import { describe, expect, it } from "vitest";
import { cellOfMetric, metricOf, siteSymmetry, type Vec3 } from "../../lib/structure/index.ts";
import {
  assignWyckoff,
  identifyGroup,
  readGroupName,
  settingOperations,
  spaceGroup,
} from "../../lib/symmetry/index.ts";
import { invariantMetric } from "../support/crystals.ts";
import { PUBLISHED_LETTERS } from "./published-letters.data.ts";

/** Coordinates are printed to three decimals or more in cells of about 9 angstrom. */
const PRINTED = 0.01;

interface Published {
  readonly name: string;
  readonly symbol: string;
  readonly sites: readonly { readonly element: string; readonly position: string; readonly x: Vec3 }[];
}

function parse(line: string): Published {
  const [name = "", , symbol = "", sites = ""] = line.split(" | ");
  return {
    name,
    symbol,
    sites: sites.split(", ").map((text) => {
      const [element = "", position = "", ...xyz] = text.split(" ");
      return { element, position, x: xyz.map(number) as unknown as Vec3 };
    }),
  };
}

function number(text: string): number {
  const [n, d] = text.split("/");
  return d === undefined ? Number(n) : Number(n) / Number(d);
}

/** Multiplicities and letters of the sites, in the setting that the symbol names. */
function letters({ symbol, sites }: Published): string[] {
  const first = readGroupName(symbol).candidates[0]!;
  const group = spaceGroup(settingOperations({ number: first.number, toReference: first.transformation }));
  const identified = identifyGroup(group);
  const metric = metricOf(cellOfMetric(invariantMetric(group, [4, 2, 7])));
  return sites.map(({ element, x }) => {
    const { operations } = siteSymmetry(group.operations, metric, x, PRINTED);
    const { letter, multiplicity } = assignWyckoff(identified, operations);
    return `${element} ${multiplicity}${letter}`;
  });
}

describe("letters of Wyckoff positions as published (from memory, sources in the data)", () => {
  const published = PUBLISHED_LETTERS.map(parse);

  it("covers at least 60 structures", () => expect(new Set(published.map((p) => p.name)).size).toBeGreaterThan(60));

  it.each(published.map((p) => [p.name, p.symbol, p] as const))("of %s in %s", (_name, _symbol, p) => {
    expect(letters(p)).toEqual(p.sites.map((s) => `${s.element} ${s.position}`));
  });
});
