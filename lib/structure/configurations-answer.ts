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

export function configurationsAnswer(found: ConfigurationList): ConfigurationsAnswer {
  const { arrangements, inequivalent, excluded, places, configurations } = found;
  const list = configurations.map(({ crystal, degeneracy }, i): ConfigurationRow => {
    const { number, hermannMauguin } = crystal.identified.summary;
    const sites = crystal.sites.map(({ label, images }) => ({ label, multiplicity: images.length }));
    return { number: i + 1, degeneracy, spaceGroup: { number, hermannMauguin }, sites };
  });
  return { arrangements, inequivalent, excluded, places, list };
}
