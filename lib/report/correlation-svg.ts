import type { UnitAnswer } from "../vibrations/index.ts";
import { correlationLevels } from "./correlation-diagram.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";

const ROW = 26;
const COLUMNS = [90, 300, 510] as const;
const GAP = 58; // half the room that a label takes between two lines
const TOP = 60;

/** Correlation diagrams of all units as one SVG, one below the other; black lines on white, no fonts needed. */
export function correlationSvg(
  units: readonly UnitAnswer[],
  factorGroup: { readonly schoenflies: string },
  write: SpeciesWriter = speciesWriter(),
): string {
  let y = 0;
  const pieces: string[] = [];
  for (const unit of units) {
    const { body, height } = oneDiagram(unit, factorGroup, y, write);
    pieces.push(body);
    y += height;
  }
  const width = COLUMNS[2] + 110;
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${y}" viewBox="0 0 ${width} ${y}" font-family="serif" font-size="15">`,
    `<rect width="${width}" height="${y}" fill="white"/>`,
    ...pieces,
    "</svg>",
    "",
  ].join("\n");
}

function oneDiagram(
  unit: UnitAnswer,
  factorGroup: { readonly schoenflies: string },
  top: number,
  write: SpeciesWriter,
) {
  const levels = correlationLevels(unit, factorGroup);
  const rows = Math.max(levels.free.length, levels.site.length, levels.factorGroup.length);
  const height = TOP + rows * ROW + 24;
  const at = (count: number, i: number) => top + TOP + ((rows - count) / 2 + i + 0.5) * ROW;
  const name = `${unit.formula}${unit.freeName ? ` (${unit.freeName})` : ""}, ${unit.count} in the primitive cell`;
  const parts = [text(COLUMNS[0] - GAP, top + 22, name, "start", "bold")];
  for (const [k, h] of levels.headings.entries()) parts.push(text(COLUMNS[k]!, top + 46, h, "middle", "italic"));
  const place = (labels: readonly string[]) => new Map(labels.map((l, i) => [l, at(labels.length, i)]));
  const site = place(levels.site.map((l) => l.label));
  const factor = place(levels.factorGroup);
  levels.free.forEach((f, i) => {
    const y = at(levels.free.length, i);
    parts.push(
      text(
        COLUMNS[0],
        y + 5,
        f.label.replace(/^\S+/, (label) => write.label(label)),
        "middle",
      ),
    );
    for (const s of f.to) parts.push(line(COLUMNS[0] + GAP, y, COLUMNS[1] - GAP / 2, site.get(s)!));
  });
  for (const s of levels.site) {
    const y = site.get(s.label)!;
    parts.push(text(COLUMNS[1], y + 5, write.label(s.label), "middle"));
    for (const t of s.to) parts.push(line(COLUMNS[1] + GAP / 2, y, COLUMNS[2] - GAP / 2, factor.get(t)!));
  }
  for (const [label, y] of factor) parts.push(text(COLUMNS[2], y + 5, write.label(label), "middle"));
  return { body: parts.join("\n"), height };
}

function text(x: number, y: number, content: string, anchor: string, style: "" | "bold" | "italic" = ""): string {
  const face = style === "bold" ? ' font-weight="bold"' : style === "italic" ? ' font-style="italic"' : "";
  return `<text x="${x}" y="${y}" text-anchor="${anchor}"${face}>${escaped(content)}</text>`;
}

function line(x1: number, y1: number, x2: number, y2: number): string {
  return `<line x1="${x1}" y1="${y1}" x2="${x2}" y2="${y2}" stroke="black" stroke-width="1"/>`;
}

function escaped(content: string): string {
  return content.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;");
}
