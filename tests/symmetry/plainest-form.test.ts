import { describe, expect, test } from "vitest";
import { groupAnswer, identifyGroup, readGroupName, settingOperations, spaceGroup } from "../../lib/symmetry/index.ts";

/** First coordinates of every position of a group by name, letter by letter. */
function firstCoordinates(name: string): Record<string, string> {
  const { number, transformation } = readGroupName(name).candidates[0]!;
  const group = spaceGroup(settingOperations({ number, toReference: transformation }));
  const { wyckoff } = groupAnswer(identifyGroup(group)).spaceGroup;
  return Object.fromEntries(wyckoff.map((w) => [`${w.multiplicity}${w.letter}`, w.coordinates[0]!]));
}

describe("positions in settings other than the reference one", () => {
  test("are written as International Tables A write origin choice 1 (from memory)", () => {
    expect(firstCoordinates("F d -3 m :1")).toMatchObject({
      "8a": "0,0,0",
      "8b": "1/2,1/2,1/2",
      "16c": "1/8,1/8,1/8",
      "16d": "5/8,5/8,5/8",
      "32e": "x,x,x",
      "48f": "x,0,0",
      "96g": "x,x,z",
    });
    expect(firstCoordinates("I 41/a :1")).toMatchObject({
      "4a": "0,0,0",
      "4b": "0,0,1/2",
      "8c": "0,1/4,1/8",
      "8d": "0,1/4,5/8",
      "8e": "0,0,z",
    });
    expect(firstCoordinates("P 4/n m m :1")).toMatchObject({ "2a": "0,0,0", "2b": "0,0,1/2", "2c": "0,1/2,z" });
    expect(firstCoordinates("R -3 c :R")).toMatchObject({ "2a": "1/4,1/4,1/4", "4c": "x,x,x", "6e": "x,-x+1/2,1/4" });
  });

  test("take centring translations to get rid of large constants", () => {
    expect(firstCoordinates("I 1 2/c 1")).toMatchObject({ "4c": "1/4,1/4,1/4", "4e": "0,y,1/4" });
  });
});
