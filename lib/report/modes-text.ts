import type { IrrepAnswer, ModesAnswer } from "../vibrations/index.ts";
import { formatNumber } from "./format-number.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** The whole answer of `modes` for a person, below the heading. */
export function modesText(answer: ModesAnswer, write: SpeciesWriter = speciesWriter()): string {
  const parts = [subject(answer, write), sums(answer, write), bothText(answer), speciesTable(answer, write)];
  return [...parts, siteText(answer, write), polarText(answer, write)].filter(Boolean).join("\n\n");
}

/** What was reduced, and the axes of the labels. */
function subject(answer: ModesAnswer, write: SpeciesWriter): string {
  const { factorGroup, formulaUnits: units, labelsInReference } = answer;
  const axes =
    answer.labelAxes === "file" ? "axes of the file" : "axes of the reference setting (the file's cell is skew)";
  const formula = units ? `: ${units.inPrimitiveCell} ${units.formula}` : "";
  const lines = [
    `${vibrating(answer)} in the primitive cell${formula}`,
    ...average(answer),
    reduction(answer),
    `factor group ${factorGroup.hermannMauguin} (${factorGroup.schoenflies}); labels in the ${axes}${factorGroup.axes ? `: ${factorGroup.axes}` : ""}`,
  ];
  const swaps = Object.entries(labelsInReference).map(([a, b]) => `${write.label(a)} is ${write.label(b)}`);
  if (swaps.length > 0) lines.push(`in the axes of the reference setting ${swaps.join(", ")}`);
  lines.push(...exchangeable(answer, write));
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

/** `10 vibrating atoms`, or `20 places of vibrating atoms, 16 atoms by their occupancy`. */
function vibrating({ atomsInPrimitiveCell: places, atomsByOccupancy: atoms }: ModesAnswer): string {
  if (places === atoms) return `${places} vibrating ${places === 1 ? "atom" : "atoms"}`;
  const shown = Number.isInteger(atoms) ? String(atoms) : formatNumber(atoms, 2);
  return `${places} places of vibrating atoms, ${shown} ${atoms === 1 ? "atom" : "atoms"} by their occupancy,`;
}

function average({ atomsInPrimitiveCell: places, atomsByOccupancy: atoms }: ModesAnswer): string[] {
  return places === atoms ? [] : ["all counts are those of the average structure, with every place filled"];
}

/** Groups with two kinds of lateral axes or planes, alike but for their names. */
const TWO_KINDS = /^(?:D[46]h?|C[46]v)$/;

/** Handbooks differ in which kind is the first: without a word, B2g of graphite elsewhere and B1g here look like a fault. */
function exchangeable({ factorGroup, irreps }: ModesAnswer, write: SpeciesWriter): string[] {
  const present = irreps.filter((s) => s.label.startsWith("B") && s.total > 0);
  if (present.length === 0 || !TWO_KINDS.test(factorGroup.schoenflies)) return [];
  const kinds = factorGroup.schoenflies.startsWith("C") ? "sigma_v and sigma_d" : "C2' and C2''";
  const other = (label: string) => label.replace(/^B[12]/, (b) => (b === "B1" ? "B2" : "B1"));
  const list = present.map(({ label }) => `${write.label(label)} is ${write.label(other(label))}`);
  return [`with ${kinds} exchanged, as some authors have them, ${list.join(", ")}`];
}

/** Translations shown of a cell much larger than the primitive one. */
const SHOWN_CENTRINGS = 4;

function reduction({ primitiveCellsInCell: cells, centrings }: ModesAnswer): string {
  if (cells === 1) return "the cell of the file is primitive";
  const shown = centrings.slice(0, SHOWN_CENTRINGS).map((t) => `(${t})`);
  const more = centrings.length > shown.length ? ` and ${centrings.length - shown.length} more` : "";
  return `the cell of the file holds ${cells} primitive cells, apart by ${shown.join(", ")}${more}`;
}

/** Species and activity as papers write them, with the number of bands. */
function sums(answer: ModesAnswer, write: SpeciesWriter): string {
  const activity = new Map(
    answer.irreps.map((s) => [s.label, [...(s.raman ? ["R"] : []), ...(s.infrared ? ["IR"] : [])]]),
  );
  const line = (name: string, pick: (s: IrrepAnswer) => number, unit: "modes" | "bands", marked = false) => {
    const counts = Object.fromEntries(answer.irreps.map((s) => [s.label, pick(s)]));
    const number = answer.irreps.reduce((n, s) => n + pick(s) * (unit === "modes" ? s.dimension : 1), 0);
    const sum = write.sum(counts, marked ? (label) => activity.get(label) ?? [] : undefined);
    const counted = number === 0 ? "" : `: ${number} ${number === 1 ? unit.slice(0, -1) : unit}`;
    return wrapText(`Γ(${name}) = ${sum}${counted}`, WIDTH, "    ");
  };
  const only = (keep: (s: IrrepAnswer) => boolean) => (s: IrrepAnswer) => (keep(s) ? s.optic : 0);
  const lines = [
    line("total", (s) => s.total, "modes"),
    line("acoustic", (s) => s.acoustic, "modes"),
    `${line("optic", (s) => s.optic, "bands", true)} from ${answer.totals.opticModes} modes`,
    line(
      "Raman",
      only((s) => s.raman),
      "bands",
    ),
    line(
      "infrared",
      only((s) => s.infrared),
      "bands",
    ),
    line(
      "silent",
      only((s) => s.silent),
      "bands",
    ),
  ];
  if (answer.totals.silent > 0) {
    lines.push(
      line(
        "silent, but hyper-Raman active",
        only((s) => s.silent && s.hyperRaman),
        "bands",
      ),
    );
  }
  return lines.join("\n");
}

/** What infrared and Raman have in common. */
function bothText({ totals }: ModesAnswer): string {
  if (totals.mutualExclusion) {
    return "No band is both infrared and Raman active (mutual exclusion). A degenerate species is one band.";
  }
  const bands = `${totals.coincident} band${totals.coincident === 1 ? " is" : "s are"}`;
  return `${bands} both infrared and Raman active. A degenerate species is one band.`;
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

/** Which species each site reaches, one column per species of the factor group, and sites that a method cannot see. */
function siteText(answer: ModesAnswer, write: SpeciesWriter): string {
  const columns: Column[] = [
    { heading: "site" },
    { heading: "position" },
    { heading: "symmetry" },
    { heading: "atoms", align: "right" },
    { heading: "displacement in the site group" },
    ...answer.irreps.map((s): Column => ({ heading: write.label(s.label), align: "right" })),
    { heading: "reaches" },
  ];
  const rows = answer.sites.map((site) => [
    site.label,
    site.referencePosition,
    `${site.siteSymmetry} (${site.schoenflies})`,
    String(site.atoms),
    write.sum(site.siteSpecies),
    ...answer.irreps.map((s) => String(site.contributions[s.label] ?? ".")),
    [...(site.raman ? ["R"] : []), ...(site.infrared ? ["IR"] : [])].join(",") || "silent",
  ]);
  const still = (method: string, moves: (s: ModesAnswer["sites"][number]) => boolean) => {
    const labels = answer.sites.filter((s) => !moves(s)).map((s) => s.label);
    return labels.length > 0 ? [wrapText(`no ${method} active mode moves ${labels.join(", ")}`, WIDTH, "    ")] : [];
  };
  return [textTable(columns, rows), ...still("Raman", (s) => s.raman), ...still("infrared", (s) => s.infrared)].join(
    "\n",
  );
}

/** Polar species, whose bands depend on the direction of the wave. */
function polarText({ polarSpecies }: ModesAnswer, write: SpeciesWriter): string {
  if (polarSpecies.length === 0) return "";
  const sum = (list: ModesAnswer["polarSpecies"]) => write.sum(Object.fromEntries(list.map((s) => [s.label, s.modes])));
  const seen = polarSpecies.filter((s) => s.raman);
  const raman =
    seen.length === 0
      ? "none of them is Raman active"
      : `Raman shows LO or TO of ${seen.map((s) => write.label(s.label)).join(", ")} as the geometry has it (sitefold polarise)`;
  return wrapText(`LO and TO parts differ in the polar species ${sum(polarSpecies)}; ${raman}`, WIDTH, "    ");
}
