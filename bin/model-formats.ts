import { extendedXyz, mmcifText, pdbText, positionsCsv, structureCif, xyzText } from "../lib/report/index.ts";
import { type AtomModel, coordinateList, listedStructure, modelPositions } from "../lib/structure/index.ts";
import type { FileFormat, Format } from "./positions-options.ts";
import { UsageProblem } from "./problems.ts";
import { VERSION } from "./version.ts";

/** Those of coordinates hold no symmetry. */
const WRITERS: Readonly<Record<FileFormat, (model: AtomModel) => string>> = {
  cif: (model) => cif(model, "1.1"),
  cif2: (model) => cif(model, "2.0"),
  xyz: (model) => xyzText(coordinateList(model)),
  extxyz: (model) => extendedXyz(coordinateList(model)),
  csv: (model) => positionsCsv(modelPositions(model)),
  pdb: (model) => pdbText(coordinateList(model)),
  mmcif: (model) => mmcifText(coordinateList(model)),
};

/** Formats that list every atom without operations. */
export const PLAIN_FORMATS: readonly Format[] = ["xyz", "extxyz", "pdb", "mmcif"];

/** The text of a model in a format. */
export function modelText(model: AtomModel, format: FileFormat): string {
  return WRITERS[format](model);
}

function cif(model: AtomModel, version: "1.1" | "2.0"): string {
  if (model.content === "range") {
    throw new UsageProblem("a range of coordinates is no cell that repeats, which a CIF needs; write xyz, csv or pdb");
  }
  const { transformation, symmetry } = model;
  const unchanged = transformation.P.d === 1 && transformation.P.n.join() === "1,0,0,0,1,0,0,0,1";
  const comment = [
    `Made by sitefold ${VERSION}${unchanged ? "" : ", in another cell than that of the file"}.`,
    ...(symmetry === "none" ? ["All atoms of the cell are listed, without symmetry."] : []),
    ...model.notes,
  ].join("\n");
  return structureCif(listedStructure(model), version, { comment, ending: "" });
}
