import { InputProblem } from "../problem.ts";
import type { Matrix3 } from "./cartesian.ts";
import { cartesianMatrices } from "./cartesian-matrices.ts";
import { crystalMatrices } from "./crystal-matrices.ts";
import { type SpeciesFunctions, speciesFunctions } from "./functions.ts";
import { type MolecularGroup, molecularGroup } from "./molecular-group.ts";
import { type PointGroup, pointGroup } from "./point-group.ts";
import { type TensorForms, tensorForms } from "./tensor-forms.ts";

/** A point group by name, with the functions that transform like its species. */
export interface PointGroupTable {
  readonly group: PointGroup | MolecularGroup;
  /** Matrices of the elements in the Cartesian frame of the functions. */
  readonly matrices: readonly Matrix3[];
  /** The Cartesian frame in words. */
  readonly frame: string;
  /** One per species, in the order of the species. */
  readonly functions: readonly SpeciesFunctions[];
  readonly vector: TensorForms;
  readonly axial: TensorForms;
  readonly raman: TensorForms;
}

/** Other spellings of International symbols. */
const SPELLINGS: Readonly<Record<string, string>> = {
  "32": "321",
  "3m": "3m1",
  "-3m": "-3m1",
  m3: "m-3",
  m3m: "m-3m",
  "43m": "-43m",
  "121": "2",
  "1m1": "m",
  "12/m1": "2/m",
  "2/m2/m2/m": "mmm",
  "4/m2/m2/m": "4/mmm",
  "6/m2/m2/m": "6/mmm",
  "-32/m": "-3m1",
  "-32/m1": "-3m1",
  "-312/m": "-31m",
  "2/m-3": "m-3",
  "4/m-32/m": "m-3m",
};

/**
 * Table of a point group by its name.
 * @param name an International symbol, also oriented (`-4m2`, `31m`, `m2m`, `112/m`), in conventional crystal axes; or
 * a Schoenflies symbol, of any order up to 240 (`D2d`, `Ih`, `D5h`), in the standard orientation of molecules
 * @throws InputProblem `unknown-point-group` if the name is neither; Cinfv and Dinfh have `linearGroupTable`
 */
export function pointGroupTable(name: string): PointGroupTable {
  const plain = name.replace(/\s+/g, "");
  if (/^[A-Z]/.test(plain)) {
    const group = named(() => molecularGroup(plain));
    return tableOf(group, group.elements, "x, y, z of the standard orientation: z along the principal axis");
  }
  const symbol = Object.hasOwn(SPELLINGS, plain) ? SPELLINGS[plain]! : plain;
  const group = named(() => pointGroup(crystalMatrices(symbol)));
  const frame = "x along a, y in the plane of a and b, z along c*, in conventional axes";
  return tableOf(group, cartesianMatrices(group.elements), frame);
}

/** The group, or the refusal of its name as a fault of the input. */
function named<G>(make: () => G): G {
  try {
    return make();
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    const hint = "Write a Schoenflies symbol such as D3d, or an International symbol such as -3m or -4m2.";
    throw new InputProblem("unknown-point-group", `There is no such table: ${error.message}.`, null, hint);
  }
}

function tableOf(group: PointGroup | MolecularGroup, matrices: readonly Matrix3[], frame: string): PointGroupTable {
  const vector = tensorForms(group, matrices, "vector");
  const axial = tensorForms(group, matrices, "axial");
  const raman = tensorForms(group, matrices, "symmetric2");
  const functions = speciesFunctions(group, { vector, axial, symmetric2: raman });
  return { group, matrices, frame, functions, vector, axial, raman };
}
