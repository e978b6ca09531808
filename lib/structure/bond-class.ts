import {
  HALIDE_METALS,
  HALOGENS,
  LIGAND_METALS,
  METAL_PAIRS,
  NON_METALS,
  ORGANOMETALS,
  SHORT_BONDS,
  TETRAHEDRAL_METALS,
} from "./tables/bond-classes.ts";

/** The classes of elements that the choice of bonds speaks of. */
export interface BondClasses {
  readonly nonMetal: ReadonlySet<string>;
  readonly halogen: ReadonlySet<string>;
  readonly halideMetal: ReadonlySet<string>;
  readonly ligandMetal: ReadonlySet<string>;
  readonly organometal: ReadonlySet<string>;
  readonly tetrahedralMetal: ReadonlySet<string>;
  /** By `Metal-Ligand`: largest shortest bond, angstrom. */
  readonly shortBond: ReadonlyMap<string, number>;
  /** By `Metal-Metal`: largest distance, angstrom. */
  readonly metalPair: ReadonlyMap<string, number>;
}

let decoded: BondClasses | null = null;

export function bondClasses(): BondClasses {
  decoded ??= {
    nonMetal: words(NON_METALS),
    halogen: words(HALOGENS),
    halideMetal: words(HALIDE_METALS),
    ligandMetal: words(LIGAND_METALS),
    organometal: words(`${LIGAND_METALS} ${ORGANOMETALS}`),
    tetrahedralMetal: words(TETRAHEDRAL_METALS),
    shortBond: distances(SHORT_BONDS),
    metalPair: distances(METAL_PAIRS),
  };
  return decoded;
}

function words(text: string): ReadonlySet<string> {
  return new Set(text.split(" "));
}

function distances(text: string): ReadonlyMap<string, number> {
  const list = text.split(" ");
  return new Map(list.flatMap((pair, i) => (i % 2 === 0 ? [[pair, Number(list[i + 1])] as const] : [])));
}

/** Whether a symbol is hydrogen or one of its isotopes. */
export function isHydrogen(symbol: string | null): boolean {
  return symbol === "H" || symbol === "D" || symbol === "T";
}
