import { type CifBlock, type CifLoop, cellOf, findLoop, numbOf } from "../cif/index.ts";
import { TENSOR_COMPONENTS } from "../symmetry/index.ts";

/**
 * Displacement parameters of a site, square angstrom. `u`: U11 U22 U33 U12 U13 U23 on the reciprocal axes scaled by
 * their lengths, as `_atom_site_aniso.U_ij`; `iso`: equivalent isotropic U.
 */
export type DisplacementTensor =
  | { readonly kind: "isotropic"; readonly iso: number; readonly su: number | null }
  | {
      readonly kind: "anisotropic";
      readonly u: readonly [number, number, number, number, number, number];
      readonly su: readonly (number | null)[];
    };

/** U = B / 8 pi^2. */
export const EIGHT_PI_SQUARED = 8 * Math.PI * Math.PI;

/**
 * Displacement parameters by row of the atom list (key: row number): anisotropic ones where the block has
 * them under the site's label, else U or B isotropic. Values that are no numbers are passed over.
 */
export function readDisplacements(block: CifBlock, atoms: CifLoop): ReadonlyMap<number, DisplacementTensor> {
  const tensors = anisotropic(block);
  const out = new Map<number, DisplacementTensor>();
  for (let row = 0; row < atoms.rowCount; row++) {
    const label = cellOf(atoms, row, "_atom_site.label");
    const tensor = label?.kind === "text" ? tensors.get(label.text.trim()) : undefined;
    const found = tensor ?? isotropic(atoms, row);
    if (found) out.set(row, found);
  }
  return out;
}

function isotropic(atoms: CifLoop, row: number): DisplacementTensor | null {
  const u = numbOf(cellOf(atoms, row, "_atom_site.U_iso_or_equiv"));
  if (u) return { kind: "isotropic", iso: u.value, su: u.su };
  const b = numbOf(cellOf(atoms, row, "_atom_site.B_iso_or_equiv"));
  return b
    ? { kind: "isotropic", iso: b.value / EIGHT_PI_SQUARED, su: b.su === null ? null : b.su / EIGHT_PI_SQUARED }
    : null;
}

function anisotropic(block: CifBlock): Map<string, DisplacementTensor> {
  const out = new Map<string, DisplacementTensor>();
  const loop = findLoop(block, "_atom_site_aniso.label");
  if (!loop) return out;
  for (let row = 0; row < loop.rowCount; row++) {
    const label = cellOf(loop, row, "_atom_site_aniso.label");
    const tensor = tensorOf(loop, row, "U", 1) ?? tensorOf(loop, row, "B", EIGHT_PI_SQUARED);
    if (label?.kind === "text" && tensor) out.set(label.text.trim(), tensor);
  }
  return out;
}

function tensorOf(loop: CifLoop, row: number, letter: "U" | "B", divisor: number): DisplacementTensor | null {
  const read = TENSOR_COMPONENTS.map((c) => numbOf(cellOf(loop, row, `_atom_site_aniso.${letter}_${c}`)));
  if (read.some((n) => n === null)) return null;
  return {
    kind: "anisotropic",
    u: read.map((n) => n!.value / divisor) as unknown as readonly [number, number, number, number, number, number],
    su: read.map((n) => (n!.su === null ? null : n!.su / divisor)),
  };
}
