import { axialCharacters } from "./axial-characters.ts";
import { formatAxis, type Matrix3, type Vector3 } from "./cartesian.ts";
import { type CharacterTable, tabulate } from "./character-table.ts";
import { cubicCharacters, icosahedralCharacters } from "./cubic-characters.ts";
import { labelMarks, nameClasses } from "./group-naming.ts";
import { analyseMolecular, type MolecularAnalysis } from "./molecular-analysis.ts";
import { molecularMatrices, molecularName } from "./molecular-matrices.ts";
import { mullikenLabels } from "./mulliken.ts";

/** Right-handed Cartesian axes to which the labels of a molecular group refer. */
export interface MolecularAxes {
  readonly x: Vector3;
  readonly y: Vector3;
  readonly z: Vector3;
  /** In words; empty where they are those of the matrices. */
  readonly text: string;
}

/** A finite group of orthogonal matrices, with its classes and physically irreducible species. */
export interface MolecularGroup extends CharacterTable {
  readonly schoenflies: string;
  /** Orthogonal matrices on Cartesian columns. */
  readonly elements: readonly Matrix3[];
  readonly axes: MolecularAxes;
}

/**
 * The group formed by orthogonal matrices, of order up to 240, in any orientation.
 * Labels follow R. S. Mulliken, J. Chem. Phys. 23 (1955) 1997, with the axes chosen as in `orientMolecule`.
 * @throws RangeError if the matrices are not orthogonal or do not form such a group
 */
export function orthogonalGroup(matrices: readonly Matrix3[]): MolecularGroup {
  const analysis = analyseMolecular(matrices);
  const { x, y, z } = analysis.orientation;
  const characters = charactersOf(analysis);
  const own = [x, y, z].map(formatAxis).join() === "x,y,z";
  const text = own ? "" : [x, y, z].map((v, i) => `${"xyz"[i]} along ${formatAxis(v)}`).join(", ");
  return {
    schoenflies: analysis.schoenflies === "C3i" ? "S6" : analysis.schoenflies,
    elements: matrices,
    axes: { x, y, z, text },
    ...tabulate(analysis.table, nameClasses(analysis), characters, mullikenLabels(characters, labelMarks(analysis))),
  };
}

function charactersOf(a: MolecularAnalysis) {
  if (a.kind === "cubic") return cubicCharacters(a.elements, a.table);
  if (a.kind === "icosahedral") return icosahedralCharacters(a.elements);
  return axialCharacters(a.axial, a.turns, a.table);
}

/**
 * A molecular point group by its Schoenflies symbol, in standard orientation: z along the principal axis, C2' (else a
 * vertical plane) along x; x, y, z along perpendicular axes of order 4 or 2 of cubic and icosahedral groups.
 * @param name C1, Cs, Ci, Cn, Cnv, Cnh, Dn, Dnh, Dnd, Sn of any n up to order 240, T, Td, Th, O, Oh, I, Ih
 * @throws RangeError if the name is not known; the linear groups are not finite, see `linearSpecies`
 */
export function molecularGroup(name: string): MolecularGroup {
  return orthogonalGroup(molecularMatrices(molecularName(name)));
}
