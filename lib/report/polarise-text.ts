import type {
  AngleLaw,
  DipoleAnswer,
  GeometryAnswer,
  PolariseAnswer,
  RamanTensorAnswer,
  RotationLaw,
} from "../vibrations/index.ts";
import { formatNumber } from "./format-number.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";
import { tensorRows } from "./tensor-rows.ts";

const WIDTH = 110;

/** The whole answer of `polarise` for a person, below the heading. */
export function polariseText(answer: PolariseAnswer, write: SpeciesWriter = speciesWriter()): string {
  const parts = [
    subject(answer),
    `Raman tensors (a dot is 0; letters are measured numbers):\n\n${answer.tensors.map((t) => tensorText(t, write)).join("\n\n")}`,
    `Infrared dipoles (letters anew):\n${answer.dipoles.map((d) => dipoleText(d, write)).join("\n") || "  none"}`,
  ];
  if (answer.geometries.length > 0) parts.push(`Geometries asked for:\n${geometryTable(answer.geometries, write)}`);
  parts.push(`Backscattering, light along z, x and y:\n${geometryTable(answer.faces, write)}`);
  if (answer.naturalFaces.length > 0) {
    const head = wrapText(`Backscattering from the natural faces of a monoclinic crystal; ${NATURAL}:`, WIDTH);
    parts.push(`${head}\n${geometryTable(answer.naturalFaces, write)}`);
  }
  parts.push(separatingText(answer, write));
  if (answer.rotation) parts.push(rotationText(answer.rotation, write));
  parts.push(wrapText(CAUTION, WIDTH));
  return parts.join("\n\n");
}

const NATURAL =
  "(hkl) is the normal of a face, [uvw] a direction of the lattice of the file, tensor elements are in the frame above";

const CAUTION =
  "These are rules for the ideal crystal inside the sample: a birefringent crystal turns polarisations that do not lie along its optical directions, and wide-aperture objectives mix geometries. Lasers blind and heat: keep to the laser rules of your laboratory, and start dark or toxic pigments at the lowest power.";

function subject({ frame, labelAxes, factorGroup, piezoelectric }: PolariseAnswer): string {
  const lines = [
    `frame: ${frame}`,
    `factor group ${factorGroup.hermannMauguin} (${factorGroup.schoenflies})${labelAxes ? `; ${labelIntroduction(labelAxes)}: ${labelAxes}` : ""}`,
  ];
  if (piezoelectric) lines.push("piezoelectric class: polar species that are Raman active split into LO and TO");
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

/** Two sets of x, y, z in one answer must not be taken for one. */
function labelIntroduction(labelAxes: string): string {
  const isFrame = !/x along (?!\[100\])|z along (?!\[001\])/.test(labelAxes);
  return isFrame ? "labels" : "labels refer to axes of their own, tensors to the frame";
}

function tensorText({ irrep, modes, tensor }: RamanTensorAnswer, write: SpeciesWriter): string {
  return tensorRows(`${write.label(irrep)} (${modes} optic)`, tensor);
}

function dipoleText({ irrep, modes, directions, raman }: DipoleAnswer, write: SpeciesWriter): string {
  const along = directions.map((d) => `(${d.map((e) => (e === "." ? "0" : e)).join(", ")})`).join(" and ");
  return `  ${write.label(irrep)} (${modes} optic): ${along}${raman ? ", LO and TO differ in Raman too" : ""}`;
}

function geometryTable(geometries: readonly GeometryAnswer[], write: SpeciesWriter): string {
  const columns: Column[] = [
    { heading: "  geometry" },
    { heading: "species seen, with tensor element and amplitude of each partner" },
  ];
  return textTable(
    columns,
    geometries.map((g) => [`  ${g.geometry}`, g.allowed.map((a) => allowedText(a, write)).join("; ") || "nothing"]),
  );
}

function allowedText(a: GeometryAnswer["allowed"][number], write: SpeciesWriter): string {
  const part = a.part === null ? "" : ` ${a.part === "undetermined" ? "LO or TO" : a.part}`;
  return `${write.label(a.irrep)}${part} ${a.element}: ${a.tensor.join(" | ")}`;
}

function separatingText({ separating, tensors }: PolariseAnswer, write: SpeciesWriter): string {
  if (separating === null) return "No five of the axial geometries tell all Raman species apart.";
  if (!tensors.some((t) => t.modes > 0)) return "No mode of this crystal is Raman active in first order.";
  const list = separating.map((g) => g.geometry).join(", ");
  return `Shortest set that tells all Raman species with modes apart: ${list}\n${geometryTable(separating, write)}`;
}

function rotationText(rotation: NonNullable<PolariseAnswer["rotation"]>, write: SpeciesWriter): string {
  const { angles, curves } = rotation;
  const shown = curves.filter((c) => [...c.parallel, ...c.crossed].some((e) => e > 1e-9));
  const columns: Column[] = [
    { heading: "  angle", align: "right" },
    ...shown.flatMap((c): Column[] => [
      { heading: `${write.label(c.label)} parallel`, align: "right" },
      { heading: "crossed", align: "right" },
    ]),
  ];
  const rows = angles.map((angle, i) => [
    String(angle),
    ...shown.flatMap((c) => [formatNumber(c.parallel[i]!, 4), formatNumber(c.crossed[i]!, 4)]),
  ]);
  const head = `Intensity while the crystal turns about ${rotation.about}, polarisation at 0 degrees along ${rotation.zero}, with ${rotation.letters}:`;
  const laws = rotation.laws.flatMap((law) => lawLines(law, write));
  return `${wrapText(head, WIDTH)}\n${textTable(columns, rows)}\n\n${LAW}\n${laws.join("\n")}`;
}

const LAW =
  "At the angle φ, right-handed about the light, in the letters of the tensors (intensities; partners are added):";

function lawLines({ label, partners }: RotationLaw, write: SpeciesWriter): string[] {
  const sum = (squares: readonly string[]) => squares.filter(Boolean).join(" + ") || "0";
  const parallel = sum(partners.map((p) => square(...parallelTerms(p.parallel))));
  const crossed = sum(partners.map((p) => square(p.crossed, ["cos2φ", "sin2φ"])));
  const lines = [`${write.label(label)} parallel: ${parallel}`, `${write.label(label)} crossed: ${crossed}`];
  return lines.map((line) => `  ${wrapText(line.replaceAll("sqrt", "√"), WIDTH - 2, "      ")}`);
}

/** Coefficients and functions, shorter where those of cos²φ and sin²φ are equal or opposite. */
function parallelTerms([u, v, w]: AngleLaw["parallel"]): [string[], string[]] {
  if (u !== "0" && u === w)
    return [
      [u, v],
      ["", "sin2φ"],
    ];
  if (u !== "0" && (w === `-${u}` || u === `-${w}`))
    return [
      [u, v],
      ["cos2φ", "sin2φ"],
    ];
  return [
    [u, v, w],
    ["cos²φ", "sin2φ", "sin²φ"],
  ];
}

/** `(a cos²φ + (b-c) sin²φ)²`; empty where all is 0. */
function square(coefficients: readonly string[], functions: readonly string[]): string {
  const terms = coefficients.flatMap((c, i) => {
    if (c === "0") return [];
    return [`${/.[+-]/.test(c) ? `(${c})` : c} ${functions[i]}`.trim()];
  });
  return terms.length === 0 ? "" : `(${terms.join(" + ").replaceAll("+ -", "- ")})²`;
}
