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
  const rows = alike(units).flatMap(({ unit: u, kinds }) => {
    const count = kinds === 1 ? String(u.count) : `${kinds} x ${u.count}`;
    const first = [u.formula, count, u.pointGroup, `${u.siteSymmetry} (${u.schoenflies})`];
    const motions = motionsOf(u);
    return motions.map(([name, counts], k) => [...(k === 0 ? first : ["", "", "", ""]), name, write.sum(counts)]);
  });
  const single = loneAtoms.map((a) => [a.label, String(a.count), "", a.siteSymmetry, "T", write.sum(a.factorGroup)]);
  const endless = extended.map((e) => [e.formula, String(e.count), e.kind, "", "all", write.sum(e.factorGroup)]);
  const several = rows.find(([, count]) => count!.includes("x"))?.[1]!.split(" x ");
  const repeated = several
    ? [`count ${several.join(" x ")}: ${several[0]} kinds, ${several[1]} of each; the sums are those of one kind`]
    : [];
  const notes = [...repeated, ...unitNotes].map((n) => wrapText(`- ${n}`, WIDTH, "  "));
  return [
    "Units: internal modes, librations R and translations T, acoustic modes among T (in full: sitefold split)",
    textTable(columns, [...rows, ...single, ...endless]),
    ...notes,
  ].join("\n");
}

type UnitSummary = UnitSummaries["units"][number];

function motionsOf(u: UnitSummary): readonly (readonly [string, SpeciesCounts])[] {
  return [
    ["internal", u.internal],
    ["R", u.librations],
    ["T", u.translations],
  ];
}

/** Units of one formula, site and splitting, with the number of such kinds. */
function alike(units: readonly UnitSummary[]): { unit: UnitSummary; kinds: number }[] {
  const found = new Map<string, { unit: UnitSummary; kinds: number }>();
  for (const unit of units) {
    const key = JSON.stringify([unit.formula, unit.count, unit.pointGroup, unit.siteSymmetry, motionsOf(unit)]);
    const known = found.get(key);
    if (known) known.kinds++;
    else found.set(key, { unit, kinds: 1 });
  }
  return [...found.values()];
}
