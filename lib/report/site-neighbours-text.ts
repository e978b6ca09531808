import type { Neighbour, SiteNeighbours } from "../structure/index.ts";
import { formatNumber } from "./format-number.ts";
import { quantity } from "./quantity-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;
const right = { align: "right" } as const;
/** Angles printed for one site without `all`. */
const MOST_ANGLES = 30;
/** Shapes named after the nearest. */
const SHAPES = 3;

/** Head, neighbours, shape and angles of one site. */
export function siteDetails(site: SiteNeighbours, all: boolean): string {
  const parts = [headText(site), neighbourTable(site, all), shapeLine(site), angleTable(site, all)];
  return parts.filter(Boolean).join("\n");
}

/** Longest over shortest distance beyond which the distances, not the directions, make the shape measures. */
const LARGEST_SPREAD = 1.6;

/** Whether all neighbours are of one element. */
export function areAlike({ neighbours }: SiteNeighbours): boolean {
  return neighbours.every((n) => n.element === neighbours[0]!.element);
}

/** Whether the neighbours make a polyhedron that a shape measure can judge. */
export function isPolyhedron({ neighbours, shapes }: SiteNeighbours): boolean {
  const [first, last] = [neighbours[0], neighbours.at(-1)];
  if (!first || !last || neighbours.length < 3) return false;
  return shapes.length > 0 && last.distance <= LARGEST_SPREAD * first.distance;
}

function headText(site: SiteNeighbours): string {
  const { label, alsoHere, formula, coordination, occupied, numbers, gap, kind, next } = site;
  const shared = alsoHere.length > 0 ? ` (with ${alsoHere.join(", ")})` : "";
  const partly = Math.abs(occupied - coordination) > 0.01 ? `, occupied ${formatNumber(occupied, 2)}` : "";
  const either = site.alternatives ? ", some of them alternatives" : "";
  const words = [
    `${label}${shared}: ${formula}, ${coordination} neighbour${coordination === 1 ? "" : "s"}${partly}${either}`,
  ];
  if (numbers.bonds > 0 && numbers.bonds !== coordination) words.push(`${numbers.bonds} bonded`);
  if (gap?.next && kind === "metal")
    words.push(gapText(gap.last, gap.next, gap.count === coordination ? null : gap.count));
  if (next && next.label !== gap?.next?.label)
    words.push(`next atom ${next.label} at ${formatNumber(next.distance, 3)} Å`);
  return wrapText(words.join("; "), WIDTH, "  ");
}

function gapText(last: number, next: NonNullable<SiteNeighbours["next"]>, count: number | null): string {
  const number = count === null ? "" : `, ${count} before it`;
  return `widest gap from ${formatNumber(last, 3)} to ${formatNumber(next.distance, 3)} Å (${next.label})${number}`;
}

function neighbourTable({ neighbours }: SiteNeighbours, all: boolean): string {
  if (neighbours.length === 0) return "";
  const sizes = new Map<number, number>();
  for (const n of neighbours) sizes.set(n.orbit, (sizes.get(n.orbit) ?? 0) + 1);
  const seen = new Set<number>();
  const shown = neighbours.filter((n) => all || (!seen.has(n.orbit) && seen.add(n.orbit)));
  const has = (pick: (n: Neighbour) => number | null) => shown.some((n) => pick(n) !== null);
  const [valences, angles] = [has((n) => n.valence), has((n) => n.solidAngle)];
  const rows = shown.map((n) => [
    `  ${[n.label, ...n.alsoThere].join("/")}`,
    all ? "" : `×${sizes.get(n.orbit)}`,
    quantity({ value: n.distance, su: n.su }, 4),
    n.bond === null ? "" : "bond",
    ...(valences ? [n.valence === null ? "" : formatNumber(n.valence, 3)] : []),
    ...(angles ? [n.solidAngle === null ? "" : formatNumber(100 * n.solidAngle, 1)] : []),
    n.code ?? "far",
    n.operation,
  ]);
  const columns = [
    { heading: "  neighbour" },
    { heading: "" },
    { heading: "d/Å" },
    { heading: "" },
    ...(valences ? [{ heading: "valence", ...right }] : []),
    ...(angles ? [{ heading: "Ω/%", ...right }] : []),
    { heading: "code" },
    { heading: "operation" },
  ];
  return textTable(columns, rows);
}

function shapeLine(site: SiteNeighbours): string {
  const { kind, shapes, distortion } = site;
  if (!distortion || !isPolyhedron(site)) return "";
  const alike = areAlike(site);
  const named = shapes
    .slice(0, SHAPES)
    .map((s) => `${s.name}${s.symbol ? ` (${s.symbol})` : ""} ${formatNumber(s.measure, 3)}`);
  const { volume, lengthDistortion, quadraticElongation, angleVariance, tau4, tau5 } = distortion;
  const words = [
    `shape: ${named.join(", ")}`,
    ...(volume === null ? [] : [`volume ${formatNumber(volume, 3)} Å³`]),
    ...(alike ? [`length distortion (Baur) ${formatNumber(lengthDistortion, 4)}`] : []),
    ...(quadraticElongation === null || !alike
      ? []
      : [
          `quadratic elongation ${formatNumber(quadraticElongation, 4)}, angle variance ${formatNumber(angleVariance ?? 0, 2)} deg² (Robinson, Gibbs, Ribbe)`,
        ]),
    ...(tau4 === null || kind !== "metal" ? [] : [`τ4 (Yang, Powell, Houser) ${formatNumber(tau4, 2)}`]),
    ...(tau5 === null || kind !== "metal" ? [] : [`τ5 (Addison et al.) ${formatNumber(tau5, 2)}`]),
  ];
  return `  ${wrapText(words.join("; "), WIDTH - 2, "    ")}`;
}

function angleTable({ label, neighbours, angles }: SiteNeighbours, all: boolean): string {
  if (angles.length === 0) return "";
  const end = (i: number) => `${neighbours[i]!.label}(${neighbours[i]!.code ?? "far"})`;
  const shown = angles.slice(0, all ? angles.length : MOST_ANGLES);
  const rows = shown.map((a) => [
    `  ${end(a.ends[0])}-${label}-${end(a.ends[1])}`,
    quantity({ value: a.angle, su: a.su }, 2),
    `×${a.count}`,
  ]);
  const more = angles.length > shown.length ? `\n  and ${angles.length - shown.length} more angles: --all` : "";
  return `${textTable([{ heading: "  angle" }, { heading: "°" }, { heading: "" }], rows)}${more}`;
}
