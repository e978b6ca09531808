import type { ConfigurationList } from "./ordered-configurations.ts";

/** An ordered structure in a list. */
export interface ConfigurationRow {
  /** Its place in the list, from 1. */
  readonly number: number;
  readonly degeneracy: number;
  readonly spaceGroup: { readonly number: number; readonly hermannMauguin: string };
  /** Its sites in that group. */
  readonly sites: readonly { readonly label: string; readonly multiplicity: number }[];
}

/** The ordered structures of a disordered cell. */
export interface ConfigurationsAnswer {
  readonly arrangements: string;
  readonly inequivalent: string;
  readonly excluded: number;
  readonly places: ConfigurationList["places"];
  readonly list: readonly ConfigurationRow[];
}

/**
 * @example
 * ```ts
 * const half = composedCrystal(parseSiteTable("group 221\ncell a=4.1\nCs 1a\nCl 1b occ=0.5\nBr 1b occ=0.5"));
 * const square = changeOfCell(half, multiplesOf(2, 2, 1)).crystal;
 * const { arrangements, list } = configurationsAnswer(orderedConfigurations(square));
 * arrangements; // "6"
 * list.map((row) => [row.degeneracy, row.spaceGroup.hermannMauguin]); // [[2, "P 4/m m m"], [4, "P m m m"]]
 * ```
 */
export function configurationsAnswer(found: ConfigurationList): ConfigurationsAnswer {
  const { arrangements, inequivalent, excluded, places, configurations } = found;
  const list = configurations.map(({ crystal, degeneracy }, i): ConfigurationRow => {
    const { number, hermannMauguin } = crystal.identified.summary;
    const sites = crystal.sites.map(({ label, images }) => ({ label, multiplicity: images.length }));
    return { number: i + 1, degeneracy, spaceGroup: { number, hermannMauguin }, sites };
  });
  return { arrangements, inequivalent, excluded, places, list };
}
