/** Numbers by label of a species; species that do not occur are left out. */
export type SpeciesCounts = Readonly<Record<string, number>>;

/** Numbers in the order of the species, by label. */
export function countsOf(irreps: readonly { readonly label: string }[], numbers: readonly number[]): SpeciesCounts {
  return Object.fromEntries(irreps.flatMap((r, i) => (numbers[i]! !== 0 ? [[r.label, numbers[i]!]] : [])));
}
