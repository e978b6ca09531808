import type { PolyhedraAnswer, PolyhedronAnswer } from "../vibrations/index.ts";
import { coordinateNames, KIND_NAMES } from "./content-text.ts";
import { formatNumber } from "./format-number.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** What the species of the factor group are active in. */
type Activity = readonly { readonly label: string; readonly infrared: boolean; readonly raman: boolean }[];

/** Stretches and bends of coordination polyhedra, each alone and all of them in the crystal. */
export function polyhedraText(
  answer: PolyhedraAnswer,
  activity: Activity,
  write: SpeciesWriter = speciesWriter(),
): string {
  return [...answer.polyhedra.map((p) => aloneText(p, write)), togetherText(answer, activity, write)].join("\n\n");
}

function aloneText(p: PolyhedronAnswer, write: SpeciesWriter): string {
  const [a, b] = [formatNumber(p.shortest, 3), formatNumber(p.longest, 3)];
  const distances = a === b ? a : `${a} to ${b}`;
  const head = `${p.formula} about ${p.label}, ${p.count} in the primitive cell; distances ${distances} Å`;
  const fit = `atoms at most ${formatNumber(p.deviation.largest, 3)} Å from it`;
  const line = `  ideal polyhedron ${p.pointGroup} (${fit}); site ${p.siteSymmetry} (${p.schoenflies})`;
  const rows = p.kinds.map(({ kind, free, redundant, site }) => [
    `  ${kindText(kind, p.coordinates)}`,
    write.sum(free),
    Object.keys(redundant).length > 0 ? write.sum(redundant) : "",
    write.sum(site),
  ]);
  const columns = ["  alone", "ideal polyhedron", "redundant there", "in the site"].map((heading) => ({ heading }));
  return [wrapText(head, WIDTH, "    "), line, textTable(columns, rows)].join("\n");
}

function kindText(kind: keyof typeof KIND_NAMES, coordinates: PolyhedronAnswer["coordinates"]): string {
  const names = coordinateNames(coordinates.filter((c) => c.kind === kind));
  return names ? `${KIND_NAMES[kind][1]} (${names})` : KIND_NAMES[kind][1];
}

function togetherText(
  { coordinates, kinds, rest, polyhedraNotes }: PolyhedraAnswer,
  activity: Activity,
  write: SpeciesWriter,
): string {
  const active = new Map(activity.map((s) => [s.label, [...(s.raman ? ["R"] : []), ...(s.infrared ? ["IR"] : [])]]));
  const marks = (label: string) => active.get(label) ?? [];
  const lines = [
    ...kinds.map((k) => {
      const named = kindText(k.kind, coordinates);
      return `${named}: ${write.sum(k.independent, marks)}; coordinates ${write.sum(k.all)}`;
    }),
    `none of these (polyhedra moving as wholes, other atoms): ${write.sum(rest, marks)}`,
    ...polyhedraNotes,
  ];
  return [
    "All of them in the crystal at k = 0, where shared atoms make coordinates redundant; optic modes that hold",
    ...lines.map((l) => `  ${wrapText(l, WIDTH - 2, "    ")}`),
  ].join("\n");
}
