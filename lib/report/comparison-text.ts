import type { ComparisonAnswer, SiteAlone, SitePair } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { occupancyText } from "./positions-text.ts";
import { cellCells } from "./reduce-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const right = { align: "right" } as const;

/** What a comparison of two files found, for a person. */
export function comparisonText(answer: ComparisonAnswer): string {
  const lines = [
    verdictText(answer),
    `limits: ${formatNumber(answer.limits.displacement, 2)} Å for an atom, ${percent(answer.limits.strain)} for the lattice, ${formatNumber(answer.limits.occupancy, 2)} for an occupancy`,
    ...(answer.displacement ? matchLines(answer) : differenceLines(answer)),
    ...aloneLines(answer),
    ...symmetryLines(answer),
  ];
  const text = lines.map((line) => wrapText(line, WIDTH, "  ")).join("\n");
  return [text, structureTable(answer), ...(answer.pairs.length > 0 ? [pairTable(answer.pairs)] : [])].join("\n\n");
}

function verdictText({ asked, verdict, disagreement, hand, elements }: ComparisonAnswer): string {
  switch (verdict) {
    case "same":
      return hand === "other"
        ? "the two files hold the same structure, but of the other hand: the second is the mirror image of the first"
        : "the two files hold the same structure";
    case "isotypic": {
      const image = hand === "other" ? ", the second as the mirror image" : "";
      return `the two structures are isotypic${image}: ${elementText(elements ?? [])}`;
    }
    case "incomplete":
      return `the two files hold the same structure${hand === "other" ? " of the other hand" : ""} as far as both give atoms: one has atoms that the other lacks`;
    default:
      return `${asked === "isotypic" ? "the two structures are not isotypic" : "the two files do not hold the same structure"}: ${REASONS[disagreement ?? "positions"]}`;
  }
}

/** `Mg in place of Ca; C, O in both`. */
function elementText(elements: NonNullable<ComparisonAnswer["elements"]>): string {
  const changed = elements.filter((e) => e.first !== e.second).map((e) => `${e.first} in place of ${e.second}`);
  const kept = elements.filter((e) => e.first === e.second).map((e) => e.first);
  return [
    ...(changed.length > 0 ? [changed.join(", ")] : []),
    ...(kept.length > 0 ? [`${kept.join(", ")} in both`] : []),
  ].join("; ");
}

const REASONS: Readonly<Record<NonNullable<ComparisonAnswer["disagreement"]>, string>> = {
  composition: "they differ in composition",
  lattice: "their lattices differ",
  positions: "the lattices agree, but the atoms lie elsewhere",
  elements: "the atoms lie in the same places, but the elements are distributed over them otherwise",
  occupancy: "the atoms agree, but not their occupancies",
  "space group": "the atoms agree within the limits, but the space groups are of different types",
};

function matchLines(answer: ComparisonAnswer): string[] {
  const { displacement, strain, transformation, largestOccupancyDifference, scale } = answer;
  const { largest, rootMeanSquare, atoms } = displacement!;
  const occupancy = `; occupancies differ by up to ${formatNumber(largestOccupancyDifference, 3)}`;
  return [
    `largest displacement ${formatNumber(largest, 4)} Å, root mean square ${formatNumber(rootMeanSquare, 4)} Å over ${atoms} atoms${largestOccupancyDifference > 0 ? occupancy : ""}`,
    `lattice strained by ${strain!.principal.map(percent).join(", ")} along its principal directions, volume ratio ${formatNumber(strain!.volumeRatio, 4)}; displacements leave that strain out`,
    ...(scale === 1 ? [] : [`the axes of the second were multiplied by ${formatNumber(scale, 4)} first`]),
    ...sizeLines(answer),
    `from the first to the second: axes ${transformation!.P}, origin ${transformation!.p}; (a,b,c) second = (a,b,c) first P, x(first) = P x(second) + p`,
  ];
}

/** Told where one cell is larger, strain apart. */
function sizeLines({ first, second, strain, scale }: ComparisonAnswer): string[] {
  const ratio = (second.volume * scale ** 3) / (first.volume * strain!.volumeRatio);
  if (Math.abs(ratio - 1) < 1e-6) return [];
  const [larger, smaller, n] = ratio > 1 ? ["second", "first", ratio] : ["first", "second", 1 / ratio];
  return [`the cell of the ${larger} file is ${Number(formatNumber(n, 3))} times as large as that of the ${smaller}`];
}

function differenceLines({ asked, strain, nearest, disagreement }: ComparisonAnswer): string[] {
  const lines: string[] = [];
  if (disagreement === "lattice") {
    lines.push(
      strain
        ? `the nearest cells of the two lattices differ by a strain of ${percent(strain.largest)}`
        : "no cell of one lattice comes near to one of the other, sublattices included",
    );
  }
  if (disagreement === "positions") {
    lines.push(
      nearest
        ? `the nearest way to lay one on the other displaces an atom by ${formatNumber(nearest.largest, 3)} Å, root mean square ${formatNumber(nearest.rootMeanSquare, 3)} Å`
        : "no way to lay one on the other was found even with larger displacements, up to 1 Å",
    );
  }
  if (disagreement === "composition" && asked === "same")
    lines.push("structures of other elements can be compared with --isotypic");
  return lines;
}

function symmetryLines({ first, second, verdict }: ComparisonAnswer): string[] {
  if (verdict === "different" || first.spaceGroup.number === second.spaceGroup.number) return [];
  const [a, b] = [first, second].map((s) => s.spaceGroup.hermannMauguin);
  return [`told in ${a} by the first file and in ${b} by the second; symmetrise finds what symmetry the atoms have`];
}

/** Sites without a partner that are named. */
const SHOWN = 12;

function aloneLines({ alone }: ComparisonAnswer): string[] {
  return (["first", "second"] as const).flatMap((side) => {
    const list = alone[side];
    if (list.length === 0) return [];
    const atoms = list.reduce((s, x) => s + x.atoms, 0);
    const named = list.slice(0, SHOWN).map(({ site, atoms: n }: SiteAlone) => partOf(site.label, n, site.multiplicity));
    const more = list.length > SHOWN ? ` and ${list.length - SHOWN} more` : "";
    return [`without a partner in the ${side} file, ${atoms} atoms of the cell: ${named.join(", ")}${more}`];
  });
}

function partOf(label: string, atoms: number, multiplicity: number): string {
  return atoms === multiplicity ? label : `${label} (${atoms} of ${multiplicity})`;
}

function structureTable({ first, second, cell }: ComparisonAnswer): string {
  const row = (name: string, s: ComparisonAnswer["first"]) => [
    name,
    `${s.spaceGroup.hermannMauguin} (${s.spaceGroup.number})`,
    cellCells(s.cell).join(" "),
    formatNumber(s.volume, 2),
    s.multiple === 1 ? "" : String(Number(formatNumber(s.multiple, 2))),
    s.contents,
  ];
  const rows = [
    row("first file", first),
    ...(cell ? [["on the axes of the second", "", cellCells(cell).join(" ")]] : []),
    row("second file", second),
  ];
  const columns = [
    { heading: "" },
    { heading: "space group" },
    { heading: "cell" },
    { heading: "volume/Å^3", ...right },
    { heading: "primitive cells", ...right },
    { heading: "atoms of the cell" },
  ];
  return textTable(columns, rows);
}

/** Labels of partners that are named on one line. */
const SHOWN_PARTNERS = 4;

/** One line for each site of the file with fewer of them. */
function pairTable(pairs: readonly SitePair[]): string {
  const count = (side: "first" | "second") => new Set(pairs.map((p) => p[side].label)).size;
  const [own, other] =
    count("second") < count("first") ? (["second", "first"] as const) : (["first", "second"] as const);
  const groups = new Map<string, SitePair[]>();
  for (const p of pairs) {
    const list = groups.get(p[own].label);
    if (list) list.push(p);
    else groups.set(p[own].label, [p]);
  }
  const rows = [...groups.values()].map((list) => {
    const site = list[0]![own];
    const partners = list.map((p) => p[other]);
    const more = partners.length > SHOWN_PARTNERS ? ` and ${partners.length - SHOWN_PARTNERS} more` : "";
    const letters = [...new Set(partners.map((p) => `${p.multiplicity}${p.wyckoff}`))].join(", ");
    return [
      site.label,
      `${site.multiplicity}${site.wyckoff}`,
      occupancyText(site.occupancy),
      partners
        .slice(0, SHOWN_PARTNERS)
        .map((p) => p.label)
        .join(", ") + more,
      letters,
      [...new Set(partners.map((p) => occupancyText(p.occupancy)))].join(", "),
      formatNumber(
        list.reduce((m, p) => Math.max(m, p.largest), 0),
        4,
      ),
    ];
  });
  const columns = [
    { heading: `${own} file` },
    { heading: "position", ...right },
    { heading: "occ.", ...right },
    { heading: `${other} file` },
    { heading: "position", ...right },
    { heading: "occ.", ...right },
    { heading: "displacement/Å", ...right },
  ];
  return textTable(columns, rows);
}

function percent(x: number): string {
  return `${formatNumber(100 * x, 2)} %`;
}
