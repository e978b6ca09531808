import type { SpeciesCounts, UnitSummaries } from "../vibrations/index.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { type Column, textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** Units with their internal modes, librations R and translations T in the factor group; single atoms with T. */
export function unitSummaryText(summaries: UnitSummaries, write: SpeciesWriter = speciesWriter()): string {
  const { units, loneAtoms, extended, unitNotes } = summaries;
  const columns: Column[] = [
    { heading: "unit" },
    { heading: "count", align: "right" },
    { heading: "shape" },
    { heading: "site" },
    { heading: "motion" },
    { heading: "in the factor group" },
  ];
  const rows = units.flatMap((u) => {
    const first = [u.formula, String(u.count), u.pointGroup, `${u.siteSymmetry} (${u.schoenflies})`];
    const motions: readonly (readonly [string, SpeciesCounts])[] = [
      ["internal", u.internal],
      ["R", u.librations],
      ["T", u.translations],
    ];
    return motions.map(([name, counts], k) => [...(k === 0 ? first : ["", "", "", ""]), name, write.sum(counts)]);
  });
  const single = loneAtoms.map((a) => [a.label, String(a.count), "", a.siteSymmetry, "T", write.sum(a.factorGroup)]);
  const endless = extended.map((e) => [e.formula, String(e.count), e.kind, "", "all", write.sum(e.factorGroup)]);
  const notes = unitNotes.map((n) => wrapText(`- ${n}`, WIDTH, "  "));
  return [
    "Units: internal modes, librations R and translations T, acoustic modes among T (in full: sitefold split)",
    textTable(columns, [...rows, ...single, ...endless]),
    ...notes,
  ].join("\n");
}
