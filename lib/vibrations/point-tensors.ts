import { matrixEntries, type PointGroupTable, tensorForms } from "../representation/index.ts";

/** Forms of tensors with letters for measured numbers, by species. */
export interface PointTensorsAnswer {
  /** Direction of the dipole of every partner along x, y, z. */
  readonly dipoles: readonly { readonly irrep: string; readonly directions: readonly (readonly string[])[] }[];
  /** tensor[partner][row][column] */
  readonly raman: readonly {
    readonly irrep: string;
    readonly tensor: readonly (readonly (readonly string[])[])[];
  }[];
  /** Components of the totally symmetric third-rank tensor, partners[partner][component]. */
  readonly hyperRaman: readonly {
    readonly irrep: string;
    readonly components: readonly string[];
    readonly partners: readonly (readonly string[])[];
  }[];
}

/** The tensors of a table; `rename` gives the species of a linear group for those of the finite one in its place. */
export function tensorsAnswer(
  { group, matrices, vector, raman }: PointGroupTable,
  rename: (irrep: number) => string = (irrep) => group.irreps[irrep]!.label,
): PointTensorsAnswer {
  const hyper = tensorForms(group, matrices, "symmetric3");
  const entries = (form: { readonly partners: readonly { readonly entries: readonly string[] }[] }) =>
    form.partners.map((p) => p.entries);
  return {
    dipoles: vector.forms.map((f) => ({ irrep: rename(f.irrep), directions: entries(f) })),
    raman: raman.forms.map((f) => ({ irrep: rename(f.irrep), tensor: entries(f).map((e) => matrixEntries(e)) })),
    hyperRaman: hyper.forms.map((f) => ({
      irrep: rename(f.irrep),
      components: hyper.components,
      partners: entries(f),
    })),
  };
}
