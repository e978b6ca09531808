import type { PointAnswer, PointSpeciesAnswer, PointTensorsAnswer } from "../vibrations/index.ts";
import { formatNumber } from "./format-number.ts";
import { productText, subgroupText } from "./point-parts-text.ts";
import { classText, functionText, type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";
import { tensorRows } from "./tensor-rows.ts";

const WIDTH = 110;

/** The whole answer of `point` for a person. */
export function pointText(answer: PointAnswer, write: SpeciesWriter = speciesWriter()): string {
  const parts = [
    subject(answer),
    characterTable(answer, write),
    footnotes(answer, write),
    functionTable(answer, write),
  ];
  if (answer.tensors) parts.push(tensorsText(answer.tensors, write));
  if (answer.products.length > 0) {
    parts.push(`Direct products\n${answer.products.map((p) => productText(p, answer, write)).join("\n")}`);
  }
  parts.push(...answer.subgroups.map((s) => subgroupText(s, answer, write)));
  return parts.filter(Boolean).join("\n\n");
}

function subject({ schoenflies, hermannMauguin, order, frame, axes }: PointAnswer): string {
  const international = hermannMauguin === null ? "" : ` (${hermannMauguin.replace("inf", "∞")})`;
  const size = order === null ? "infinite" : `order ${order}`;
  const lines = [
    `point group ${schoenflies.replace("inf", "∞")}${international}, ${size}`,
    `functions and tensors: ${frame}`,
    ...(axes ? [`labels: ${axes}`] : []),
  ];
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

function characterTable(answer: PointAnswer, write: SpeciesWriter): string {
  const closed = new Map(answer.closedForms.map((f) => [f.value.toFixed(6), f.text]));
  const columns: Column[] = [
    { heading: "" },
    ...answer.classes.map((c): Column => ({ heading: classText(c.name), align: "right" })),
  ];
  const rows = answer.species.map((s) => [
    `${write.label(s.label)}${s.complexPair ? "*" : ""}`,
    ...s.characters.map((c) => characterText(c, closed)),
  ]);
  return textTable(columns, answer.order === null ? [...rows, ["..."]] : rows);
}

/** Whole numbers and roots as they are, other numbers with three decimals; the footnotes give their closed forms. */
function characterText(c: number | string, closed: ReadonlyMap<string, string>): string {
  if (typeof c === "string") return c.replace("phi", "φ");
  if (Number.isInteger(c)) return String(c);
  const form = closed.get(c.toFixed(6)) ?? "";
  return form.includes("sqrt") ? form.replace("sqrt", "√") : formatNumber(c, 3);
}

function footnotes({ closedForms, classes, species, order, planeNaming }: PointAnswer, write: SpeciesWriter): string {
  const numbers = closedForms
    .filter((f) => !f.text.includes("sqrt"))
    .map((f) => `${formatNumber(f.value, 3)} = ${f.text.replace("pi", "π")}`);
  const pairs = species.filter((s) => s.complexPair).map((s) => write.label(s.label));
  const axes = directionsOf(classes.filter((c) => !c.name.includes("sigma")));
  const planes = directionsOf(classes.filter((c) => c.name.includes("sigma")));
  const lines = [
    ...(numbers.length > 0 ? [numbers.join(", ")] : []),
    ...(pairs.length > 0 ? [`* two complex conjugate species taken as one: ${pairs.join(", ")}`] : []),
    ...(order === null ? ["φ is any angle; S(φ) turns by φ and reflects at the plane normal to z"] : []),
    ...(axes.length > 0 ? [`axes: ${axes.join("; ")}`] : []),
    ...(planes.length > 0 ? [`planes, by their normals: ${planes.join("; ")}`] : []),
    ...namingLine(planeNaming),
  ];
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

/** Classes of one set of directions together, in the order of the table: `3σv [100] [010] [110], containing C₂″`. */
function directionsOf(classes: PointAnswer["classes"]): string[] {
  const named = new Map<string, string[]>();
  for (const c of classes) {
    const contained = c.containsAxes.length > 0 ? `, containing ${c.containsAxes.map(classText).join(" and ")}` : "";
    const key = axesText(c) + contained;
    if (key) named.set(key, [...(named.get(key) ?? []), classText(c.name)]);
  }
  return [...named].map(([text, names]) => `${names.join(", ")} ${text}`);
}

/** Where σv of one kind of table is σd of the other. */
function namingLine(naming: PointAnswer["planeNaming"]): string[] {
  if (naming === null) return [];
  const [here, there] =
    naming === "crystal"
      ? ["crystals, where σv is normal to C₂′", "molecules σv contains C₂′"]
      : ["molecules, where σv contains C₂′", "crystals σv is normal to C₂′"];
  return [`planes named as for ${here}; for ${there}, so that σv and σd change places; species are named alike`];
}

/** Most directions of one class that are listed. */
const SHOWN_DIRECTIONS = 6;

function axesText({ directions }: PointAnswer["classes"][number]): string {
  const shown = directions.slice(0, SHOWN_DIRECTIONS).join(" ");
  const left = directions.length - SHOWN_DIRECTIONS;
  return left > 0 ? `${shown} and ${left} more` : shown;
}

function functionTable({ species }: PointAnswer, write: SpeciesWriter): string {
  const columns: Column[] = [
    { heading: "species" },
    { heading: "vectors" },
    { heading: "rotations" },
    { heading: "quadratic functions" },
    { heading: "first order" },
    { heading: "hyper-Raman" },
  ];
  const list = (texts: readonly string[]) => texts.map(functionText).join(", ");
  const rows = species.map((s) => [
    write.label(s.label),
    list(s.vectors),
    list(s.rotations),
    list(s.quadratics),
    activityText(s),
    s.hyperRaman ? "yes" : s.hyperRamanGeneral ? "general tensor only" : "no",
  ]);
  return textTable(columns, rows);
}

function activityText({ infrared, raman }: PointSpeciesAnswer): string {
  return [...(infrared ? ["infrared"] : []), ...(raman ? ["Raman"] : [])].join(", ") || "silent";
}

function tensorsText({ dipoles, raman, hyperRaman }: PointTensorsAnswer, write: SpeciesWriter): string {
  const zero = (e: string) => (e === "." ? "0" : e);
  const dipoleLines = dipoles.map(({ irrep, directions }) => {
    return `  ${write.label(irrep)}: ${directions.map((d) => `(${d.map(zero).join(", ")})`).join(" and ")}`;
  });
  const hyperLines = hyperRaman.map(({ irrep, components, partners }) => {
    const texts = partners.map((p) => p.flatMap((e, c) => (e === "." ? [] : [`${components[c]} = ${e}`])).join(", "));
    return wrapText(`  ${write.label(irrep)}: ${texts.join(" | ")}`, WIDTH, "      ");
  });
  return [
    `Raman tensors (a dot is 0; letters are measured numbers):\n\n${raman.map((t) => tensorRows(write.label(t.irrep), t.tensor)).join("\n\n")}`,
    `Infrared dipoles:\n${dipoleLines.join("\n") || "  none"}`,
    `Hyper-Raman tensors (symmetric in all indices), partner by partner:\n${hyperLines.join("\n") || "  none"}`,
  ].join("\n\n");
}
