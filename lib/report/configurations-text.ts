import type { ConfigurationsAnswer } from "../structure/index.ts";
import { textTable } from "./table.ts";

/** The count, then every ordered structure on a line. */
export function configurationsText(answer: ConfigurationsAnswer): string {
  const { arrangements, inequivalent, excluded, places, list } = answer;
  if (places.length === 0) return "nothing is disordered";
  const filled = places.map(({ names, counts }) => `  ${names.map((n, k) => `${n} x ${counts[k]}`).join(", ")}`);
  const left = excluded > 0 ? `, ${excluded} of them left out since atoms in them are too near each other` : "";
  const rows = list.map(({ number, degeneracy, spaceGroup, sites }) => [
    String(number),
    String(degeneracy),
    `${spaceGroup.hermannMauguin} (${spaceGroup.number})`,
    sites.map((s) => `${s.label} x ${s.multiplicity}`).join(", "),
  ]);
  const right = { align: "right" } as const;
  const columns = [
    { heading: "no.", ...right },
    { heading: "weight", ...right },
    { heading: "space group" },
    { heading: "sites" },
  ];
  return [
    "places filled in several ways, by equivalent places:",
    ...filled,
    `${arrangements} arrangements, ${inequivalent} up to symmetry (Burnside's lemma)${left}`,
    "",
    textTable(columns, rows),
  ].join("\n");
}
