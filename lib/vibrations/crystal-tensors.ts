import { type PointGroup, pointGroup, type TensorForm, type TensorKind, tensorForms } from "../representation/index.ts";
import { type Crystal, type CrystalFrame, crystalFrame } from "../structure/index.ts";
import { rotationParts } from "../symmetry/index.ts";

/** Tensors of every species of the factor group in the Cartesian frame of the crystal. */
export interface CrystalTensors {
  readonly group: PointGroup;
  readonly frame: CrystalFrame;
  /** Form of the infrared dipole, by species that have one. */
  readonly dipoles: readonly TensorForm[];
  /** Form of the Raman tensor, by species that have one. */
  readonly raman: readonly TensorForm[];
}

/** Forms with free letters, by projection; as R. Loudon, Adv. Phys. 13 (1964) 423 and J. F. Nye tabulate them. */
export function crystalTensors(crystal: Crystal): CrystalTensors {
  const frame = crystalFrame(crystal);
  const group = pointGroup(rotationParts(crystal.group), frame.labels);
  const forms = (kind: TensorKind) => tensorForms(group, frame.matrices, kind).forms;
  return { group, frame, dipoles: forms("vector"), raman: forms("symmetric2") };
}

/** The hyper-Raman tensor of every species that has one, totally symmetric or symmetric in the last two indices. */
export function hyperRamanTensors(
  { group, frame }: CrystalTensors,
  kind: "symmetric3" | "hyperRamanGeneral",
): readonly TensorForm[] {
  return tensorForms(group, frame.matrices, kind).forms;
}
