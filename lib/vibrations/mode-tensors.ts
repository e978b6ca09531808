import { matrixEntries } from "../representation/index.ts";
import type { Crystal } from "../structure/index.ts";
import { crystalTensors } from "./crystal-tensors.ts";
import type { IrrepAnswer, ModesAnswer } from "./modes-answer.ts";

/** A species of the factor group with the form of its Raman tensor. */
export interface TensorIrrep extends IrrepAnswer {
  /** `tensor[partner][row][column]`, letters for measured numbers, a dot for 0; null where there is none. */
  readonly ramanTensor: {
    readonly letters: readonly string[];
    readonly tensor: readonly (readonly (readonly string[])[])[];
  } | null;
}

/** The answer of `modes` with the tensors of its species. */
export interface TensorModes extends ModesAnswer {
  /** The Cartesian frame of the tensors in words. */
  readonly tensorFrame: string;
  readonly irreps: readonly TensorIrrep[];
}

/** Adds the form of the Raman tensor to every species. @param answer `modesAnswer` of the same crystal */
export function withRamanTensors(crystal: Crystal, answer: ModesAnswer): TensorModes {
  const { raman, frame } = crystalTensors(crystal);
  const irreps = answer.irreps.map((irrep): TensorIrrep => {
    const form = raman.find((f) => f.label === irrep.label);
    const tensor = form?.partners.map((p) => matrixEntries(p.entries));
    return { ...irrep, ramanTensor: form && tensor ? { letters: form.letters, tensor } : null };
  });
  return { ...answer, tensorFrame: frame.text, irreps };
}
