import type { InternalMode, SpeciesCounts, SplitAnswer, UnitAnswer } from "../vibrations/index.ts";
import { bondLines } from "./bond-lines.ts";
import { speciesContentText, unitContentText } from "./content-text.ts";
import { correlationDiagram } from "./correlation-diagram.ts";
import { formatNumber } from "./format-number.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** More kinds of one unit are counted, not named; JSON names all. */
const MOST_KINDS = 24;

/** The whole answer of `split` for a person, below the heading. */
export function splitText(answer: SplitAnswer, diagrams = false, species: SpeciesWriter = speciesWriter()): string {
  const write = activeWriter(answer, species);
  const parts = [subject(answer), ...unitTexts(answer, write)];
  if (diagrams) parts.push(...answer.units.map((u) => correlationDiagram(u, answer.factorGroup, species)));
  if (answer.loneAtoms.length > 0) parts.push(loneText(answer, write));
  if (answer.extended.length > 0) parts.push(extendedText(answer, write));
  parts.push(sumsText(answer, write));
  return parts.join("\n\n");
}

function subject({ factorGroup, labelAxes, bonds, unitNotes }: SplitAnswer): string {
  const axes = labelAxes === "file" ? "axes of the file" : "axes of the reference setting (the file's cell is skew)";
  const lines = [
    `factor group ${factorGroup.hermannMauguin} (${factorGroup.schoenflies}); labels in the ${axes}${factorGroup.axes ? `: ${factorGroup.axes}` : ""}`,
    ...bondLines(bonds),
    ...unitNotes.map((n) => `- ${n}`),
  ];
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

/** Without the axes, B1 of the free unit and B1 of the site could be anything. */
function axesText({ freeAxes, siteAxes }: UnitAnswer): string[] {
  const parts = [...(freeAxes ? [`free unit: ${freeAxes}`] : []), ...(siteAxes ? [`site: ${siteAxes}`] : [])];
  return parts.length > 0 ? [`axes of the labels: ${parts.join("; ")}`] : [];
}

/** Units that differ in nothing but their atoms stand together: the waters of a hydrate are many. */
function unitTexts(answer: SplitAnswer, write: ActiveWriter): string[] {
  const alike = new Map<string, UnitAnswer[]>();
  for (const unit of answer.units) {
    const key = [unitName(unit), String(unit.count), siteText(unit, answer), unitBody(unit, write)].join("\n");
    const kinds = alike.get(key);
    if (kinds) kinds.push(unit);
    else alike.set(key, [unit]);
  }
  return [...alike.values()].map((kinds) => unitText(kinds, answer, write));
}

function unitText(kinds: readonly UnitAnswer[], answer: SplitAnswer, write: ActiveWriter): string {
  const [unit] = kinds as readonly [UnitAnswer];
  const count = kinds.length === 1 ? `${unit.count}` : `${kinds.length} kinds, ${unit.count} of each`;
  const more = kinds.length > MOST_KINDS ? `; and ${kinds.length - MOST_KINDS} more` : "";
  const labels =
    kinds
      .slice(0, MOST_KINDS)
      .map((k) => k.labels.join(" "))
      .join("; ") + more;
  const rows = kinds.length === 1 ? "" : "; the rows are for one kind";
  const head = `${unitName(unit)}, ${count} in the primitive cell${rows}: ${labels}`;
  const largest = Math.max(...kinds.map((k) => k.deviation.largest));
  const fit = `atoms at most ${formatNumber(largest, 3)} Å from it, ${formatNumber(unit.shapeTolerance, 2)} Å allowed`;
  const shape = wrapText(`free unit ${unit.pointGroup} (${fit}); ${siteText(unit, answer)}`, WIDTH - 2, "    ");
  return [wrapText(head, WIDTH, "    "), `  ${shape}`, unitBody(unit, write)].join("\n");
}

function unitName(unit: UnitAnswer): string {
  return `${unit.formula}${unit.freeName ? ` (${unit.freeName})` : ""}${averageText(unit)}`;
}

function siteText({ siteSymmetry, schoenflies }: UnitAnswer, { factorGroup }: SplitAnswer): string {
  return `site ${siteSymmetry} (${schoenflies}); factor group ${factorGroup.schoenflies}`;
}

function unitBody(unit: UnitAnswer, write: ActiveWriter): string {
  const lines = [
    ...axesText(unit),
    ...(unit.kinds.length > 0 ? [unitContentText(unit, write)] : []),
    ...(unit.freeSource ? [`wavenumbers of the free unit: ${unit.freeSource}`] : []),
  ];
  const columns: Column[] = [
    { heading: "  motion" },
    { heading: "free" },
    { heading: "cm⁻¹", align: "right" },
    { heading: "in the site" },
    { heading: "in the factor group" },
    { heading: "IR", align: "right" },
    { heading: "Raman", align: "right" },
    { heading: "what" },
  ];
  const rows = [
    ...unit.internal.map((m) => internalRow(m, unit, write)),
    ...librationRows(unit, write),
    motionRow("translations", write.sum(unit.translations.free), unit.translations, write),
  ];
  const above = lines.map((l) => `  ${wrapText(l, WIDTH - 2, "    ")}`);
  return [...above, textTable(columns, rows)].join("\n");
}

/** A shape that no unit has at a time must not pass for one. */
function averageText({ places, atomsByOccupancy: atoms }: UnitAnswer): string {
  if (places === atoms) return "";
  const shown = Number.isInteger(atoms) ? String(atoms) : formatNumber(atoms, 2);
  return `, the average of a disorder (${places} places, ${shown} atoms by occupancy)`;
}

/** Writes species, and sums over the factor group with their activity. */
interface ActiveWriter extends SpeciesWriter {
  readonly activeSum: (counts: SpeciesCounts) => string;
}

function activeWriter({ activity }: SplitAnswer, species: SpeciesWriter): ActiveWriter {
  const marks = new Map(
    activity.map((a) => [a.label, [...(a.raman ? ["R"] : []), ...(a.infrared ? ["IR"] : [])] as const]),
  );
  return { ...species, activeSum: (counts) => species.sum(counts, (label) => marks.get(label) ?? []) };
}

function internalRow(m: InternalMode, unit: UnitAnswer, write: ActiveWriter): string[] {
  const free = `${m.count > 1 ? m.count : ""}${write.label(m.species)}`;
  const marks = [...(m.free.raman ? ["R"] : []), ...(m.free.infrared ? ["IR"] : [])];
  return [
    `  ${m.name ? m.name.replace(/^nu/, "ν") : "internal"}`,
    free + (marks.length > 0 ? `(${marks.join(",")})` : ""),
    m.freeWavenumber === null ? "" : String(m.freeWavenumber),
    write.sum(m.site),
    write.activeSum(m.factorGroup),
    m.infrared === 0 ? "." : String(m.infrared),
    m.raman === 0 ? "." : String(m.raman),
    m.description ?? contentOf(m, unit),
  ];
}

/** What modes without a name are made of. */
function contentOf({ species, count }: InternalMode, { content }: UnitAnswer): string {
  const text = speciesContentText(content[species]);
  return count > 1 ? `${text}; the row is for one` : text;
}

/** Librations of water one by one, since each has a name. */
function librationRows(unit: UnitAnswer, write: ActiveWriter): string[][] {
  const named = unit.librationsBySpecies.filter((l) => l.name !== "libration");
  if (named.length === 0) return [motionRow("librations", write.sum(unit.librations.free), unit.librations, write)];
  return named.map((l) => motionRow(`libration, ${l.name}`, write.label(l.species), l, write));
}

type Motion = Pick<UnitAnswer["librations"], "site" | "factorGroup">;

function motionRow(what: string, free: string, m: Motion, write: ActiveWriter): string[] {
  return [`  ${what}`, free, "", write.sum(m.site), write.activeSum(m.factorGroup)];
}

function loneText(answer: SplitAnswer, write: ActiveWriter): string {
  const rows = answer.loneAtoms.map((a) => [
    `  ${a.label}`,
    String(a.count),
    a.siteSymmetry,
    write.activeSum(a.factorGroup),
  ]);
  return `Single atoms (translations only)\n${textTable(
    [
      { heading: "  atom" },
      { heading: "count", align: "right" },
      { heading: "site" },
      { heading: "in the factor group" },
    ],
    rows,
  )}`;
}

function extendedText(answer: SplitAnswer, write: ActiveWriter): string {
  return answer.extended
    .map((e) => {
      const along =
        e.direction === null ? "" : e.kind === "chain" ? ` along ${e.direction}` : ` parallel to ${e.direction}`;
      const head = `${e.kind} ${e.formula}${along}, ${e.count} in the primitive cell: ${e.labels.join(" ")}`;
      return wrapText(`${head}; its atoms together: ${write.activeSum(e.factorGroup)}`, WIDTH, "    ");
    })
    .join("\n");
}

function sumsText(answer: SplitAnswer, write: ActiveWriter): string {
  const { sums } = answer;
  const line = (name: string, counts: SpeciesCounts) =>
    wrapText(`Γ(${name}) = ${write.activeSum(counts)}`, WIDTH, "    ");
  const lattice = [
    line("internal", sums.internal),
    line("librations", sums.librations),
    line("translations", sums.translations),
  ];
  if (answer.extended.length > 0) lattice.push(line("extended", sums.extended));
  return [
    ...lattice,
    line("acoustic", sums.acoustic) + ", part of the translations",
    line("optic", sums.optic),
    line("total", sums.total),
    "(the sum over units was compared with the result atom by atom)",
  ].join("\n");
}
