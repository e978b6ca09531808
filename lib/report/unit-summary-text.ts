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
  const groups = alike(units);
  const rows = groups.flatMap((group) => {
    const u = group.unit;
    const first = [u.formula, countText(group), u.pointGroup, `${u.siteSymmetry} (${u.schoenflies})`];
    const motions = motionsOf(u);
    return motions.map(([name, counts], k) => [...(k === 0 ? first : ["", "", "", ""]), name, write.sum(counts)]);
  });
  const single = loneAtoms.map((a) => [a.label, String(a.count), "", a.siteSymmetry, "T", write.sum(a.factorGroup)]);
  const endless = extended.map((e) => [e.formula, String(e.count), e.kind, "", "all", write.sum(e.factorGroup)]);
  const several = groups.find(({ kinds }) => kinds > 1);
  const repeated = several
    ? [
        `count ${countText(several)}: ${several.kinds} kinds, ${several.unit.count} of each; the sums are those of one kind`,
      ]
    : [];
  const notes = [...repeated, ...unitNotes].map((n) => wrapText(`- ${n}`, WIDTH, "  "));
  return [
    "Units: internal modes, librations R and translations T, acoustic modes among T (in full: sitefold split)",
    textTable(columns, [...rows, ...single, ...endless]),
    ...notes,
  ].join("\n");
}

type UnitSummary = UnitSummaries["units"][number];

/** A unit, and the number of its kinds that differ in nothing but their atoms. */
interface AlikeUnits {
  readonly unit: UnitSummary;
  readonly kinds: number;
}

function countText({ unit, kinds }: AlikeUnits): string {
  return kinds === 1 ? String(unit.count) : `${kinds} x ${unit.count}`;
}

function motionsOf(u: UnitSummary): readonly (readonly [string, SpeciesCounts])[] {
  return [
    ["internal", u.internal],
    ["R", u.librations],
    ["T", u.translations],
  ];
}

/** Units of one formula, site and splitting, with the number of such kinds. */
function alike(units: readonly UnitSummary[]): AlikeUnits[] {
  const found = new Map<string, AlikeUnits>();
  for (const unit of units) {
    const key = JSON.stringify([unit.formula, unit.count, unit.pointGroup, unit.siteSymmetry, motionsOf(unit)]);
    const known = found.get(key);
    found.set(key, { unit: known?.unit ?? unit, kinds: (known?.kinds ?? 0) + 1 });
  }
  return [...found.values()];
}
