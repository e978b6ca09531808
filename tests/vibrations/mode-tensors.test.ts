import { describe, expect, test } from "vitest";
import { modesAnswer, polariseAnswer, withRamanTensors } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";
import { runCommand } from "../support/run-command.ts";

describe("the document of modes", () => {
  test.each(["calcite", "gypsum", "alpha-quartz", "spinel"])(
    "holds the Raman tensors that polarise gives: %s",
    (name) => {
      const crystal = fixture(name);
      const modes = withRamanTensors(crystal, modesAnswer(crystal));
      const polarise = polariseAnswer(crystal);
      const tensors = modes.irreps.flatMap(({ label, ramanTensor }) =>
        ramanTensor ? [{ label, ...ramanTensor }] : [],
      );
      expect(tensors).toEqual(
        polarise.tensors.map(({ irrep, letters, tensor }) => ({ label: irrep, letters, tensor })),
      );
      expect(modes.irreps.filter((s) => s.ramanTensor !== null)).toEqual(modes.irreps.filter((s) => s.raman));
      expect(modes.tensorFrame).toBe(polarise.frame);
    },
  );

  test("is printed with them", async () => {
    const { out } = await runCommand("modes", ["fixtures/rutile.cif", "--json"]);
    const document = JSON.parse(out);
    expect(document.irreps.find((s: { label: string }) => s.label === "B1g").ramanTensor).toEqual({
      letters: ["c"],
      tensor: [
        [
          ["c", ".", "."],
          [".", "-c", "."],
          [".", ".", "."],
        ],
      ],
    });
    expect(document.irreps.find((s: { label: string }) => s.label === "A2u").ramanTensor).toBeNull();
  });
});
