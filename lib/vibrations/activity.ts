import {
  decompose,
  hyperRamanGeneralCharacter,
  type Matrix3,
  type MolecularGroup,
  type PointGroup,
  symmetricCubeCharacter,
  symmetricSquareCharacter,
  vectorCharacter,
} from "../representation/index.ts";

/** What a species can do in first order; a property of the species, whether or not a mode belongs to it. */
export interface Activity {
  /** Contains a component of a polar vector. */
  readonly infrared: boolean;
  /** Contains a component of a symmetric second-rank tensor. */
  readonly raman: boolean;
  /**
   * Contains a component of a totally symmetric third-rank tensor (hyper-Raman off resonance).
   * Source: S. J. Cyvin, J. E. Rauch and J. C. Decius, J. Chem. Phys. 43 (1965) 4083.
   */
  readonly hyperRaman: boolean;
  /** Contains a component of a third-rank tensor symmetric in its last two indices only. */
  readonly hyperRamanGeneral: boolean;
}

/** Activity of each species of a point group, in the order of its irreps. */
export function activities(group: PointGroup | MolecularGroup): Activity[] {
  const elements: readonly Matrix3[] = group.elements;
  const holds = (character: (W: Matrix3) => number) => decompose(group, elements.map(character));
  const infrared = holds(vectorCharacter);
  const raman = holds(symmetricSquareCharacter);
  const hyper = holds(symmetricCubeCharacter);
  const general = holds(hyperRamanGeneralCharacter);
  return group.irreps.map((_, i) => ({
    infrared: infrared[i]! > 0,
    raman: raman[i]! > 0,
    hyperRaman: hyper[i]! > 0,
    hyperRamanGeneral: general[i]! > 0,
  }));
}
