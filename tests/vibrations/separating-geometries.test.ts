import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  BACKSCATTERING,
  type GeometryAnswer,
  type PolariseAnswer,
  polariseAnswer,
} from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

/** Right-angle scattering along x, y, z: every polarisation across the light, every two directions. */
const RIGHT_ANGLE = ["x", "y", "z"].flatMap((ki) => {
  const across = (k: string) => ["x", "y", "z"].filter((axis) => axis !== k);
  return across(ki).flatMap((ks) => across(ki).flatMap((ei) => across(ks).map((es) => `${ki}(${ei}${es})${ks}`)));
});
const LARGEST = 5;

const NAMES = readdirSync(new URL("../../fixtures/", import.meta.url))
  .filter((name) => name.endsWith(".cif"))
  .map((name) => name.slice(0, -".cif".length));

/** Per species, in how many and which of the geometries it shows, as bits. */
function columns(geometries: readonly GeometryAnswer[], species: readonly string[]): number[] {
  return species.map((label) =>
    geometries.reduce((bits, g, i) => (g.allowed.some((a) => a.irrep === label) ? bits | (1 << i) : bits), 0),
  );
}

function separates(geometries: readonly GeometryAnswer[], species: readonly string[]): boolean {
  const found = columns(geometries, species);
  return found.every((bits) => bits !== 0) && new Set(found).size === species.length;
}

/** Whether any set of so many of the geometries separates the species; tries all of them. */
function anySet(size: number, from: readonly GeometryAnswer[], species: readonly string[]): boolean {
  const patterns = new Map(from.map((g) => [g.allowed.map((a) => a.irrep).join(), g]));
  const extend = (chosen: readonly GeometryAnswer[], rest: readonly GeometryAnswer[]): boolean => {
    if (chosen.length === size) return separates(chosen, species);
    return rest.some((g, i) => extend([...chosen, g], rest.slice(i + 1)));
  };
  return extend([], [...patterns.values()]); // geometries that show the same species are as good as each other
}

const present = (answer: PolariseAnswer) => answer.tensors.filter((t) => t.modes > 0).map((t) => t.irrep);

describe("the recommended set of geometries", () => {
  it.each(NAMES)("tells the Raman species of %s apart, and no smaller set does", (name) => {
    const answer = polariseAnswer(fixture(name), { geometries: [...BACKSCATTERING, ...RIGHT_ANGLE] });
    const species = present(answer);
    const backscattering = answer.geometries.slice(0, BACKSCATTERING.length);
    const { separating } = answer;
    expect(separating).not.toBeNull();
    // a diagonal is proposed only where no geometries along the axes will do, as in cubic crystals with A1 and E
    if (separating!.some((g) => g.geometry.includes("["))) {
      for (let size = 1; size <= LARGEST; size++) expect(anySet(size, backscattering, species)).toBe(false);
    }
    expect(separates(separating!, species)).toBe(true);
    for (let size = 0; size < separating!.length; size++) expect(anySet(size, backscattering, species)).toBe(false);
  });

  it("is what it says: the geometries asked for one by one show the same", () => {
    for (const name of ["rutile", "alpha-quartz", "barite", "gypsum"]) {
      const { separating } = polariseAnswer(fixture(name));
      const geometries = separating!.map((g) => g.geometry);
      expect(polariseAnswer(fixture(name), { geometries }).geometries).toEqual(separating);
    }
  });

  it("tells A1 and E of a cubic crystal apart along the diagonals of a face", () => {
    for (const name of ["spinel", "pyrite", "hexamethylenetetramine"]) {
      const seen = polariseAnswer(fixture(name)).separating!.map((g) => [g.geometry, g.allowed.map((a) => a.irrep[0])]);
      expect(Object.fromEntries(seen)).toMatchObject({ "z([110][1-10])-z": ["E"], "z(xy)-z": ["T"] });
    }
  });

  it("is empty where nothing is Raman active", () => {
    for (const name of ["halite", "caesium-chloride", "strontium-titanate"]) {
      expect(polariseAnswer(fixture(name)).separating).toEqual([]);
    }
  });
});
