import type { IrrepAnswer, ModesAnswer } from "../vibrations/index.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** The whole answer of `modes` for a person, below the heading. */
export function modesText(answer: ModesAnswer, write: SpeciesWriter = speciesWriter()): string {
  const parts = [subject(answer, write), sums(answer, write), speciesTable(answer, write), siteTable(answer, write)];
  return [...parts, countsText(answer)].join("\n\n");
}

/** What was reduced, and the axes of the labels. */
function subject(answer: ModesAnswer, write: SpeciesWriter): string {
  const { factorGroup, primitiveCellsInCell: cells, labelsInReference } = answer;
  const reduced = cells === 1 ? "the cell is primitive" : `the cell of the file holds ${cells} primitive cells`;
  const axes =
    answer.labelAxes === "file" ? "axes of the file" : "axes of the reference setting (the file's cell is skew)";
  const lines = [
    `${answer.atomsInPrimitiveCell} vibrating atoms in the primitive cell (${reduced})`,
    `factor group ${factorGroup.hermannMauguin} (${factorGroup.schoenflies}); labels in the ${axes}${factorGroup.axes ? `: ${factorGroup.axes}` : ""}`,
  ];
  const swaps = Object.entries(labelsInReference).map(([a, b]) => `${write.label(a)} is ${write.label(b)}`);
  if (swaps.length > 0) lines.push(`in the axes of the reference setting ${swaps.join(", ")}`);
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

/** Species and activity as papers write them. */
function sums(answer: ModesAnswer, write: SpeciesWriter): string {
  const activity = new Map(
    answer.irreps.map((s) => [s.label, [...(s.raman ? ["R"] : []), ...(s.infrared ? ["IR"] : [])]]),
  );
  const marks = (label: string) => activity.get(label) ?? [];
  const line = (name: string, pick: (s: IrrepAnswer) => number, marked = false) => {
    const counts = Object.fromEntries(answer.irreps.map((s) => [s.label, pick(s)]));
    return wrapText(`Γ(${name}) = ${write.sum(counts, marked ? marks : undefined)}`, WIDTH, "    ");
  };
  const only = (keep: (s: IrrepAnswer) => boolean) => (s: IrrepAnswer) => (keep(s) ? s.optic : 0);
  return [
    line("total", (s) => s.total),
    line("acoustic", (s) => s.acoustic),
    line("optic", (s) => s.optic, true),
    line(
      "Raman",
      only((s) => s.raman),
    ),
    line(
      "infrared",
      only((s) => s.infrared),
    ),
    line(
      "silent",
      only((s) => s.silent),
    ),
  ].join("\n");
}

function speciesTable(answer: ModesAnswer, write: SpeciesWriter): string {
  const right = { align: "right" } as const;
  const columns: Column[] = [
    { heading: "species" },
    { heading: "dim", ...right },
    { heading: "total", ...right },
    { heading: "acoustic", ...right },
    { heading: "optic", ...right },
    { heading: "first order" },
    { heading: "hyper-Raman" },
  ];
  const rows = answer.irreps.map((s) => [
    write.label(s.label),
    String(s.dimension),
    String(s.total),
    String(s.acoustic),
    String(s.optic),
    [...(s.infrared ? ["infrared"] : []), ...(s.raman ? ["Raman"] : [])].join(", ") || "silent",
    s.hyperRaman ? "yes" : s.hyperRamanGeneral ? "general tensor only" : "no",
  ]);
  return textTable(columns, rows);
}

/** Which species each site reaches, one column per species of the factor group. */
function siteTable(answer: ModesAnswer, write: SpeciesWriter): string {
  const columns: Column[] = [
    { heading: "site" },
    { heading: "position" },
    { heading: "symmetry" },
    { heading: "atoms", align: "right" },
    { heading: "displacement in the site group" },
    ...answer.irreps.map((s): Column => ({ heading: write.label(s.label), align: "right" })),
  ];
  const rows = answer.sites.map((site) => [
    site.label,
    site.referencePosition,
    `${site.siteSymmetry} (${site.schoenflies})`,
    String(site.atoms),
    write.sum(site.siteSpecies),
    ...answer.irreps.map((s) => String(site.contributions[s.label] ?? ".")),
  ]);
  return textTable(columns, rows);
}

function countsText({ totals, irreps }: ModesAnswer): string {
  const optic = irreps.reduce((n, s) => n + s.optic, 0);
  const coincidence = totals.mutualExclusion
    ? "no species is active in both (mutual exclusion)"
    : `${totals.coincident} of them active in both`;
  return [
    `Bands (a degenerate species is one band): ${optic} optic, from ${totals.opticModes} modes`,
    `  infrared ${totals.infraredBands}, Raman ${totals.ramanBands}; ${coincidence}; silent in both ${totals.silent}`,
  ].join("\n");
}
