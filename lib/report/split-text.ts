import type { InternalMode, SpeciesCounts, SplitAnswer, UnitAnswer } from "../vibrations/index.ts";
import { plainSum, speciesContentText, unitContentText } from "./content-text.ts";
import { correlationDiagram } from "./correlation-diagram.ts";
import { formatNumber } from "./format-number.ts";
import { type SpeciesTerm, speciesSum, typographicLabel } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** The whole answer of `split` for a person, below the heading. */
export function splitText(answer: SplitAnswer, diagrams = false): string {
  const parts = [subject(answer), ...answer.units.map((u) => unitText(u, answer))];
  if (diagrams) parts.push(...answer.units.map((u) => correlationDiagram(u, answer.factorGroup)));
  if (answer.loneAtoms.length > 0) parts.push(loneText(answer));
  if (answer.extended.length > 0) parts.push(extendedText(answer));
  parts.push(sumsText(answer));
  return parts.join("\n\n");
}

function subject({ factorGroup, labelAxes, bonds, unitNotes }: SplitAnswer): string {
  const axes = labelAxes === "file" ? "axes of the file" : "axes of the reference setting (the file's cell is skew)";
  const bonded = bonds.bonded.map((b) => `${b.elements.join("-")} ${range(b.shortest, b.longest)}`);
  const lines = [
    `factor group ${factorGroup.hermannMauguin} (${factorGroup.schoenflies}); labels in the ${axes}${factorGroup.axes ? `: ${factorGroup.axes}` : ""}`,
    `bonds that make units: ${bonded.join(", ") || "none"}`,
    ...bonds.nearLimit.map(
      (n) =>
        `close to the limit: ${n.labels.join("-")} ${formatNumber(n.distance, 3)} Å, ${n.bonded ? "a bond" : "no bond"} (limit ${formatNumber(n.limit, 2)} Å)`,
    ),
    ...unitNotes.map((n) => `- ${n}`),
  ];
  return lines.map((line) => wrapText(line, WIDTH, "    ")).join("\n");
}

function range(shortest: number, longest: number): string {
  const [a, b] = [formatNumber(shortest, 3), formatNumber(longest, 3)];
  return a === b ? `${a} Å` : `${a} to ${b} Å`;
}

function unitText(unit: UnitAnswer, answer: SplitAnswer): string {
  const active = activityMarks(answer);
  const name = unit.freeName ? ` (${unit.freeName})` : "";
  const head = `${unit.formula}${name}, ${unit.count} in the primitive cell: ${unit.labels.join(" ")}`;
  const fit = `atoms at most ${formatNumber(unit.deviation.largest, 3)} Å from it, ${formatNumber(unit.shapeTolerance, 2)} Å allowed`;
  const lines = [
    `free unit ${unit.pointGroup} (${fit}); site ${unit.siteSymmetry} (${unit.schoenflies}); factor group ${answer.factorGroup.schoenflies}`,
    ...(unit.kinds.length > 0 ? [unitContentText(unit)] : []),
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
    ...unit.internal.map((m) => internalRow(m, unit, active)),
    ...librationRows(unit, active),
    motionRow("translations", plainSum(unit.translations.free), unit.translations, active),
  ];
  const under = lines.map((l) => `  ${wrapText(l, WIDTH - 2, "    ")}`);
  return [wrapText(head, WIDTH, "    "), ...under, textTable(columns, rows)].join("\n");
}

type Marks = (label: string) => readonly string[];

function activityMarks({ activity }: SplitAnswer): Marks {
  const marks = new Map(
    activity.map((a) => [a.label, [...(a.raman ? ["R"] : []), ...(a.infrared ? ["IR"] : [])] as const]),
  );
  return (label) => marks.get(label) ?? [];
}

function internalRow(m: InternalMode, unit: UnitAnswer, active: Marks): string[] {
  const free = `${m.count > 1 ? m.count : ""}${typographicLabel(m.species)}`;
  const marks = [...(m.free.raman ? ["R"] : []), ...(m.free.infrared ? ["IR"] : [])];
  return [
    `  ${m.name ? m.name.replace(/^nu/, "ν") : "internal"}`,
    free + (marks.length > 0 ? `(${marks.join(",")})` : ""),
    m.freeWavenumber === null ? "" : String(m.freeWavenumber),
    sumOf(m.site),
    sumOf(m.factorGroup, active),
    m.infrared === 0 ? "." : String(m.infrared),
    m.raman === 0 ? "." : String(m.raman),
    m.description ?? contentOf(m, unit),
  ];
}

/** What modes without a name are made of. */
function contentOf({ species, count }: InternalMode, { content }: UnitAnswer): string {
  const text = speciesContentText(content[species]);
  return count > 1 ? `${text}; each like this` : text;
}

/** Librations of water one by one, since each has a name. */
function librationRows(unit: UnitAnswer, active: Marks): string[][] {
  const named = unit.librationsBySpecies.filter((l) => l.name !== "libration");
  if (named.length === 0) return [motionRow("librations", plainSum(unit.librations.free), unit.librations, active)];
  return named.map((l) => motionRow(`libration, ${l.name}`, typographicLabel(l.species), l, active));
}

type Motion = Pick<UnitAnswer["librations"], "site" | "factorGroup">;

function motionRow(what: string, free: string, m: Motion, active: Marks): string[] {
  return [`  ${what}`, free, "", sumOf(m.site), sumOf(m.factorGroup, active)];
}

function sumOf(counts: SpeciesCounts, active: Marks = () => []): string {
  const terms: SpeciesTerm[] = Object.entries(counts).map(([label, count]) => ({
    label: typographicLabel(label),
    count,
    marks: active(label),
  }));
  return speciesSum(terms);
}

function loneText(answer: SplitAnswer): string {
  const active = activityMarks(answer);
  const rows = answer.loneAtoms.map((a) => [
    `  ${a.label}`,
    String(a.count),
    a.siteSymmetry,
    sumOf(a.factorGroup, active),
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

function extendedText(answer: SplitAnswer): string {
  const active = activityMarks(answer);
  return answer.extended
    .map((e) => {
      const along =
        e.direction === null ? "" : e.kind === "chain" ? ` along ${e.direction}` : ` parallel to ${e.direction}`;
      const head = `${e.kind} ${e.formula}${along}, ${e.count} in the primitive cell: ${e.labels.join(" ")}`;
      return wrapText(`${head}; its atoms together: ${sumOf(e.factorGroup, active)}`, WIDTH, "    ");
    })
    .join("\n");
}

function sumsText(answer: SplitAnswer): string {
  const active = activityMarks(answer);
  const { sums } = answer;
  const line = (name: string, counts: SpeciesCounts) =>
    wrapText(`Γ(${name}) = ${sumOf(counts, active)}`, WIDTH, "    ");
  const lattice = [
    line("internal", sums.internal),
    line("librations", sums.librations),
    line("translations", sums.translations),
  ];
  if (answer.extended.length > 0) lattice.push(line("extended", sums.extended));
  return [
    ...lattice,
    line("acoustic", sums.acoustic) + ", part of the translations",
    line("total", sums.total),
    "(the sum over units was compared with the result atom by atom)",
  ].join("\n");
}
