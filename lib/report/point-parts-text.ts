import type { PointAnswer, ProductAnswer, SubgroupAnswer } from "../vibrations/index.ts";
import { classText, type SpeciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** `E × E = A₁(R) + A₂ + E(R,IR); symmetric part A₁ + E, antisymmetric part A₂`. */
export function productText(p: ProductAnswer, { species }: PointAnswer, write: SpeciesWriter): string {
  const marks = new Map(
    species.map((s) => [s.label, [...(s.raman ? ["R"] : []), ...(s.infrared ? ["IR"] : [])] as const]),
  );
  const whole = write.sum(p.sum, (label) => marks.get(label) ?? []);
  const square =
    p.symmetric && p.antisymmetric
      ? `; symmetric part ${write.sum(p.symmetric)}, antisymmetric part ${write.sum(p.antisymmetric)}`
      : "";
  return wrapText(`  ${p.factors.map((f) => write.label(f)).join(" × ")} = ${whole}${square}`, WIDTH, "      ");
}

/** One embedding of a subgroup, and how every species splits in it. */
export function subgroupText(s: SubgroupAnswer, { schoenflies }: PointAnswer, write: SpeciesWriter): string {
  const international = s.hermannMauguin === null ? "" : ` (${s.hermannMauguin})`;
  const kept = s.kept.split(", ").map(classText).join(", ");
  const lines = [
    `subgroup ${s.schoenflies}${international}, order ${s.order}: keeps ${kept}`,
    ...(s.directions.length > 0 ? [`  of ${schoenflies}: ${s.directions.map(directionText).join(", ")}`] : []),
    ...(s.axes ? [`  labels: ${s.axes}`] : []),
    ...(s.conjugates !== null && s.conjugates > 1 ? [`  one of ${s.conjugates} that differ in orientation only`] : []),
  ];
  const columns: Column[] = [{ heading: `  ${schoenflies.replace("inf", "∞")}` }, { heading: s.schoenflies }];
  const rows = s.table.map(({ species, to }) => [`  ${write.label(species)}`, write.sum(to)]);
  return [...lines.map((line) => wrapText(line, WIDTH, "      ")), textTable(columns, rows)].join("\n");
}

/** `C2' [100] [010]` with the class set for people. */
function directionText(text: string): string {
  const blank = text.indexOf(" ");
  return blank < 0 ? classText(text) : classText(text.slice(0, blank)) + text.slice(blank);
}
