import type { SpaceGroupSummary } from "../symmetry/index.ts";
import { wrapText } from "./table.ts";

/** What stands above every answer. */
export interface HeadingData {
  readonly source: { readonly file: string; readonly block: string };
  readonly notes: readonly string[];
  readonly tolerance: { readonly position: number };
}

const WIDTH = 110;

/** File, space group with its setting, tolerance, and the notes. */
export function headingText(heading: HeadingData, group: SpaceGroupSummary): string {
  const { file, block } = heading.source;
  const lines = [
    `${file}, block ${block || "(nameless)"}`,
    `space group ${groupName(group)}`,
    `positions closer than ${heading.tolerance.position} Å are one position`,
    ...heading.notes.map((note) => wrapText(`- ${note}`, WIDTH, "  ")),
  ];
  return lines.join("\n");
}

/** `P n m a (No. 62, D2h^16), setting cab; to the reference setting P n m a: b,c,a; origin 0,0,0`. */
export function groupName(group: SpaceGroupSummary): string {
  const { number, schoenflies, settingName, referenceSymbol, toReference } = group;
  if (settingName === "reference") return `${group.hermannMauguin} (No. ${number}, ${schoenflies}), reference setting`;
  const way = `(a,b,c) of the reference setting ${referenceSymbol} = ${toReference.P}, origin ${toReference.p}`;
  if (settingName === "unconventional") return `No. ${number} (${schoenflies}), in no conventional setting; ${way}`;
  return `${group.hermannMauguin} (No. ${number}, ${schoenflies}), setting ${settingName}; ${way}`;
}
