import { IDENTITY_TRANSFORMATION } from "../symmetry/index.ts";
import type { AtomModel } from "./atom-model.ts";
import { cellAtoms } from "./cell-atoms.ts";
import type { Crystal } from "./crystal.ts";
import type { ExpandedAtom } from "./expanded-atoms.ts";
import { wrapOf } from "./image-wrap.ts";

/** All atoms of the cell given: what `atomModel` answers without options, at the cost of reading them off. */
export function cellModel(crystal: Crystal): AtomModel {
  const atoms = cellAtoms(crystal).map((atom): ExpandedAtom => {
    const { operation } = crystal.sites[atom.site]!.images[atom.image]!;
    return { site: atom.site, operation, cells: wrapOf(crystal, atom), position: atom.position };
  });
  return {
    name: crystal.name,
    crystal,
    symmetry: "kept",
    content: "cell",
    metric: crystal.metric,
    transformation: IDENTITY_TRANSFORMATION,
    fromCrystal: IDENTITY_TRANSFORMATION,
    atoms,
    notes: [],
  };
}
