import type { NeighboursAnswer, SiteNeighbours } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { hydrogenBondTable } from "./hydrogen-bonds-text.ts";
import { quantity } from "./quantity-text.ts";
import { areAlike, isPolyhedron, siteDetails } from "./site-neighbours-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const right = { align: "right" } as const;
/** Sites described one by one, lines of the summary and of torsions without `all`. */
const MOST_DETAILS = 16;
const MOST_LINES = 60;

export interface NeighboursView {
  /** Print every site, every image and every angle. */
  readonly all: boolean;
}

/** The whole answer of `neighbours` for a person, below the heading. */
export function neighboursText(answer: NeighboursAnswer, { all }: NeighboursView): string {
  const heavy = answer.sites.filter((s) => s.kind !== "hydrogen");
  const listed = all || heavy.length === 0 ? answer.sites : heavy;
  const detailed = all || listed.length <= MOST_DETAILS ? listed : someMetals(listed);
  const parts = [
    summaryTable(listed, answer.sites.length - listed.length, all),
    ...detailed.map((site) => siteDetails(site, all)),
    detailed.length < listed.length ? moreText(detailed) : "",
    hydrogenBondTable(answer, all ? Infinity : MOST_LINES),
    torsionTable(answer, all ? Infinity : MOST_LINES),
    methodText(answer, listed),
  ];
  return parts.filter(Boolean).join("\n\n");
}

function someMetals(sites: readonly SiteNeighbours[]): readonly SiteNeighbours[] {
  return sites.filter((s) => s.kind === "metal").slice(0, MOST_DETAILS);
}

function moreText(detailed: readonly SiteNeighbours[]): string {
  const shown =
    detailed.length > 0
      ? `distances are shown for ${detailed.length} metal site${detailed.length === 1 ? "" : "s"} only`
      : "no distances shown";
  return wrapText(
    `${shown}, since there are many sites; --site NAME shows those of an element or label, --all everything`,
    WIDTH,
    "  ",
  );
}

/** How the answer was obtained, and what its columns mean. */
function methodText(answer: NeighboursAnswer, listed: readonly SiteNeighbours[]): string {
  const { choice, numbering, operations, uncertainties } = answer;
  const codes =
    numbering === "file"
      ? "number of the operation in the file's list"
      : `number of the operation in the list ${operationsText(operations)}`;
  return [
    `neighbours: ${choiceText(choice)}`,
    `s.u.: ${uncertaintyText(uncertainties)}`,
    `symmetry codes: ${codes}, then 5 plus the whole cells along a, b, c`,
    ...legend(listed),
  ]
    .map((line) => wrapText(line, WIDTH, "  "))
    .join("\n");
}

function operationsText(operations: NeighboursAnswer["operations"]): string {
  const shown = operations.slice(0, 8).map((o) => `${o.number} ${o.xyz}`);
  const more = operations.length - shown.length;
  return shown.join("; ") + (more > 0 ? `; and ${more} more, as group lists them` : "");
}

function choiceText(choice: NeighboursAnswer["choice"]): string {
  switch (choice.kind) {
    case "shell":
      return (
        "bonds, by rule, and the first shell of metals and of atoms without bonds, up to the widest gap between " +
        "distances in sums of the covalent radii; seen from both ends"
      );
    case "bonds":
      return "bonds, by rule";
    case "within":
      return `all atoms within ${choice.distance} Å`;
    case "nearest":
      return `the ${choice.count} nearest atoms, and others as near as the last`;
    case "contacts":
      return "all atoms within the sum of the van der Waals radii (Bondi 1964; metals Alvarez 2013)";
    default:
      return choice.kind satisfies never;
  }
}

function uncertaintyText({ cell, coordinates }: NeighboursAnswer["uncertainties"]): string {
  const errors =
    "the error of an atom equal in all directions (Templeton 1959), no other correlations, which a CIF does not hold";
  const rule = "written by the rule of 19";
  if (cell && coordinates) return `from coordinates and cell, what symmetry ties moving together; ${errors}; ${rule}`;
  if (coordinates) return `from coordinates alone, as the file gives none of the cell; ${errors}; ${rule}`;
  if (cell)
    return `from the cell alone, where symmetry fixes the atoms, as the file gives none of coordinates; ${rule}`;
  return "the file gives none";
}

function summaryTable(sites: readonly SiteNeighbours[], left: number, all: boolean): string {
  const shown = all ? sites : sites.slice(0, MOST_LINES);
  const hasShapes = shown.some((s) => shapeText(s) !== "");
  const hasValences = shown.some((s) => s.valence !== null);
  const rows = shown.map((s) => [
    s.label,
    occupancyOf(s),
    String(s.coordination),
    s.formula,
    rangeText(s),
    s.meanDistance && s.coordination > 1 && areAlike(s) ? quantity(s.meanDistance, 4) : "",
    s.numbers.effective === null ? "" : formatNumber(s.numbers.effective, 2),
    s.numbers.solidAngle === null ? "" : formatNumber(s.numbers.solidAngle, 2),
    ...(hasValences ? [valenceText(s)] : []),
    ...(hasShapes ? [shapeText(s)] : []),
  ]);
  const columns = [
    { heading: "site" },
    { heading: "occ.", ...right },
    { heading: "CN", ...right },
    { heading: "with" },
    { heading: "distances/Å" },
    { heading: "mean/Å" },
    { heading: "ECoN", ...right },
    { heading: "by Ω", ...right },
    ...(hasValences ? [{ heading: "valence sum" }] : []),
    ...(hasShapes ? [{ heading: "shape" }] : []),
  ];
  const notes = [
    sites.length > shown.length ? `and ${sites.length - shown.length} more sites: --all` : "",
    left > 0 ? `${left} hydrogen site${left === 1 ? "" : "s"} left out: --site H` : "",
  ];
  return ["Coordination", textTable(columns, rows), ...notes.filter(Boolean)].join("\n");
}

function legend(sites: readonly SiteNeighbours[]): string[] {
  if (sites.length === 0) return [];
  const valences = valenceLegend(sites);
  return [
    "CN: neighbours listed; ECoN: effective number of Hoppe (1979); by Ω: sum of solid angles of the atom's domain over the " +
      "largest (O'Keeffe 1979), all atoms counted",
    ...(valences ? [valences] : []),
    ...(sites.some(isPolyhedron) ? [shapeLegend(sites)] : []),
  ];
}

function shapeLegend(sites: readonly SiteNeighbours[]): string {
  const partly = sites.some((s) => isPolyhedron(s) && s.shapeSearch === "turns");
  const search = partly ? "; beyond 6 neighbours by a search that does not try every assignment" : "";
  return `shape: continuous shape measure (Pinsky, Avnir 1998), 0 ideal, up to 100${search}`;
}

/** Where valences come from, and the oxidation states they are for; empty where there are none. */
function valenceLegend(sites: readonly SiteNeighbours[]): string {
  const sums = sites.flatMap((s) => (s.valence ? [s.valence] : []));
  if (sums.length === 0) return "";
  const chosen = sums.some((v) => v.charge !== null && !v.stated);
  const stated = sums.some((v) => v.stated);
  const states = [
    ...(stated ? ["oxidation states as the file states them"] : []),
    ...(chosen ? [`${stated ? "others" : "oxidation states"} those whose sums come nearest`] : []),
  ].join(", ");
  const source = "exp((R0 - d)/0.37 Å) with R0 of Brese and O'Keeffe (1991) from memory, hydrogen not counted";
  return `valence sum, of bonds and first shell: ${source}${states ? `; ${states}` : ""}`;
}

function occupancyOf({ occupancy }: SiteNeighbours): string {
  return String(Number(formatNumber(occupancy, 4)));
}

function rangeText({ neighbours }: SiteNeighbours): string {
  const [first, last] = [neighbours[0], neighbours.at(-1)];
  if (!first || !last) return "";
  const text = (n: typeof first) => quantity({ value: n.distance, su: n.su }, 4);
  return last.distance - first.distance < 1e-4 ? text(first) : `${text(first)} to ${text(last)}`;
}

function valenceText({ valence }: SiteNeighbours): string {
  if (!valence) return "";
  const hydrogen = valence.hydrogens > 0 ? ` + ${valence.hydrogens > 1 ? valence.hydrogens : ""}H` : "";
  const charge = valence.charge === null ? "" : ` for ${valence.charge}+`;
  return `${quantity(valence, 2)}${hydrogen}${charge}`;
}

function shapeText(site: SiteNeighbours): string {
  const [best] = site.shapes;
  const [only] = site.angles;
  if (site.coordination === 2 && only) return `angle ${quantity({ value: only.angle, su: only.su }, 2)}°`;
  return best && isPolyhedron(site) ? `${best.name} ${formatNumber(best.measure, 2)}` : "";
}

function torsionTable({ torsions }: NeighboursAnswer, most: number): string {
  if (torsions.length === 0) return "";
  const rows = torsions
    .slice(0, most)
    .map((t) => [
      t.atoms.map((a) => (a.code === "1_555" ? a.label : `${a.label}(${a.code ?? "far"})`)).join("-"),
      quantity({ value: t.angle, su: t.su }, 2),
    ]);
  const more = torsions.length > rows.length ? `\nand ${torsions.length - rows.length} more: --all` : "";
  const columns = [{ heading: "atoms" }, { heading: "angle/°", ...right }];
  return `Torsion angles, clockwise positive\n${textTable(columns, rows)}${more}`;
}
