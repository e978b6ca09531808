import type { SymmetriseAnswer } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { groupName } from "./heading.ts";
import { occupancyText } from "./positions-text.ts";
import { cellCells } from "./reduce-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const right = { align: "right" } as const;
/** Lines of operations beyond the tolerance that are printed; the JSON document has more. */
const SHOWN_ADDITIONAL = 8;

/** The whole answer of `symmetrise` for a person, below the heading. */
export function symmetriseText(answer: SymmetriseAnswer): string {
  const parts = [verdict(answer), operationTable(answer), beyondText(answer), structureTable(answer)];
  return parts.filter(Boolean).join("\n\n");
}

function verdict(answer: SymmetriseAnswer): string {
  const { found, index, transformation, originShift, tolerance, translations, notKept } = answer;
  const way = `axes ${transformation.P}, origin ${transformation.p}, in terms of the cell of the file`;
  const lines = [
    `found within ${tolerance.displacement} Å: ${groupName(found)}; ${way}`,
    ...(originShift.some((e) => e !== 0)
      ? [`the origin of the file is first moved by ${originShift.map((e) => formatNumber(e, 5)).join(", ")}`]
      : []),
    indexText(index),
    ...translations.map(
      (t) => `translation not declared: ${t.vector} of the file, displaces atoms by up to ${distance(t.largest)} Å`,
    ),
    ...(notKept.length > 0
      ? [`declared, but not found, since they strain the cell or displace atoms: ${notKept.join("  ")}`]
      : []),
  ];
  return lines.map((line) => wrapText(line, WIDTH, "  ")).join("\n");
}

function indexText(index: number): string {
  if (index === 1) return "as many operations as the file declares";
  if (index > 1) return `${factor(index)} times as many operations as the file declares: symmetry is missed`;
  return `fewer operations than the file declares, by a factor of ${factor(1 / index)}`;
}

function factor(x: number): string {
  return String(Number(formatNumber(x, 2)));
}

function operationTable({ operations, cellChoice, found }: SymmetriseAnswer): string {
  const same = cellChoice === "given";
  const rows = operations.map((a) => [
    a.xyz,
    ...(same ? [] : [a.inGivenCell]),
    a.declared ? "declared" : "",
    distance(a.largest),
    distance(a.mean),
  ]);
  const columns = [
    { heading: "operation" },
    ...(same ? [] : [{ heading: "in the cell of the file" }]),
    { heading: "" },
    { heading: "largest/Å", ...right },
    { heading: "mean/Å", ...right },
  ];
  const centrings = found.centrings.map((t) => `(${t})+`).join("  ");
  const each = found.centrings.length > 1 ? `, each with ${centrings}` : "";
  return `Operations${each}, with the distances from images to atoms\n${textTable(columns, rows)}`;
}

function beyondText({ additional, additionalComplete, higher, tolerance }: SymmetriseAnswer): string {
  if (additional.length === 0) return `nothing more within 0.5 Å and 3 % of strain of the cell`;
  const more = additional.length - SHOWN_ADDITIONAL;
  const rest = more > 0 ? `\nand ${more} more${additionalComplete ? "" : ", and others that were not looked for"}` : "";
  const rows = additional
    .slice(0, SHOWN_ADDITIONAL)
    .map((a) => [a.xyz, distance(a.largest), distance(a.mean), formatNumber(100 * a.strain, 2)]);
  const columns = [
    { heading: "operation" },
    { heading: "largest/Å", ...right },
    { heading: "mean/Å", ...right },
    { heading: "strain/%", ...right },
  ];
  const steps = higher.map((h) => {
    const strain = h.strain > tolerance.strain ? ` and a strain of ${formatNumber(100 * h.strain, 2)} %` : "";
    const name = `${h.hermannMauguin} (No. ${h.number}), ${factor(h.index)} times as many operations`;
    return `with ${formatNumber(h.tolerance, 3)} Å${strain}: ${name}`;
  });
  return [`Beyond the tolerance, in the cell of the answer\n${textTable(columns, rows)}${rest}`, ...steps].join("\n");
}

function structureTable({ cell, sites, moved, cellChoice }: SymmetriseAnswer): string {
  const rows = sites.map((s) => [
    s.label,
    s.element ?? "?",
    occupancyText(s.occupancy),
    `${s.multiplicity}${s.wyckoff}`,
    s.siteSymmetry,
    ...s.position.map((e) => formatNumber(e, 5)),
    distance(s.moved),
    labelsText(s.labels.slice(1)),
  ]);
  const columns = [
    { heading: "label" },
    { heading: "element" },
    { heading: "occ.", ...right },
    { heading: "position", ...right },
    { heading: "site symmetry" },
    { heading: "x", ...right },
    { heading: "y", ...right },
    { heading: "z", ...right },
    { heading: "moved/Å", ...right },
    { heading: "stands also for" },
  ];
  const where = cellChoice === "given" ? "cell of the file, made symmetric" : "conventional cell";
  const head = `Symmetrised structure, ${where}: ${cellCells(cell).join(" ")}`;
  const tail = `atoms moved by ${distance(moved.mean)} Å on average, ${distance(moved.largest)} Å at most`;
  return `${head}\n${tail}\n${textTable(columns, rows)}`;
}

function labelsText(labels: readonly string[]): string {
  return labels.length > 6 ? `${labels.slice(0, 5).join(" ")} and ${labels.length - 5} more` : labels.join(" ");
}

function distance(x: number): string {
  return formatNumber(x, 4);
}
