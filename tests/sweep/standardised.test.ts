import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { decodeCif, readCif } from "../../lib/cif/index.ts";
import { InputProblem } from "../../lib/problem.ts";
import { type Crystal, compareStructures, crystalFromBlock, standardisedCrystal } from "../../lib/structure/index.ts";
import { CORPUS, CORPUS_FILES } from "../support/corpus.ts";

/** Every structure of the corpus that can be read, with its place. */
function structures(): { readonly place: string; readonly crystal: Crystal }[] {
  return CORPUS_FILES.flatMap((path) => {
    const { blocks } = readCif(decodeCif(readFileSync(join(CORPUS, path))).text).value;
    return blocks.flatMap((block) => {
      try {
        return [{ place: `${path} ${block.name}`, crystal: crystalFromBlock(block) }];
      } catch (e) {
        if (e instanceof InputProblem) return []; // no structure, or a damaged one
        throw e;
      }
    });
  });
}

/** Cell and sites, to be compared. */
function told({ metric, sites }: Crystal): string[] {
  const numbers = (values: readonly number[], decimals: number) =>
    values.map((e) => (Number(e.toFixed(decimals)) + 0).toFixed(decimals)).join(" ");
  return [
    numbers(Object.values(metric.cell), 3),
    ...sites.map((s) => `${s.label} ${s.images.length} ${numbers(s.symmetry.point, 5)}`),
  ];
}

if (CORPUS_FILES.length > 0) {
  describe("every structure of the corpus", () => {
    it("is standardised, is the same structure then, and standardised again stays as it is", {
      timeout: 300_000,
    }, () => {
      const found = structures();
      expect(found.length).toBeGreaterThan(100);
      for (const { place, crystal } of found) {
        const { crystal: standard, description } = standardisedCrystal(crystal);
        expect([place, Number.isFinite(description.gamma), standard.identified.number]).toEqual([
          place,
          true,
          crystal.identified.number,
        ]);
        const { answer } = compareStructures(crystal, standard);
        expect([place, answer.verdict, answer.hand]).toEqual([place, "same", "same"]);
        expect([place, told(standardisedCrystal(standard).crystal)]).toEqual([place, told(standard)]);
      }
    });
  });
} else {
  describe("the corpus", () => {
    it("is not beside this repository, so no structure of it was standardised", () => expect(CORPUS_FILES).toEqual([]));
  });
}
