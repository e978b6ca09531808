import type { UnitAnswer } from "../vibrations/index.ts";
import { type SpeciesWriter, speciesWriter } from "./species.ts";

/** One line of a diagram: a species of one level, and those of the next level that it leads to. */
interface Level {
  readonly label: string;
  readonly to: readonly string[];
}

/** The three levels of a correlation: free unit, site, factor group. */
export interface CorrelationLevels {
  readonly headings: readonly [string, string, string];
  readonly free: readonly Level[];
  readonly site: readonly Level[];
  readonly factorGroup: readonly string[];
}

/** Species of internal modes of a unit, of its site and of the factor group, with the links between them. */
export function correlationLevels(unit: UnitAnswer, factorGroup: { readonly schoenflies: string }): CorrelationLevels {
  const free = new Map<string, { names: string[]; count: number; to: string[] }>();
  for (const m of unit.internal) {
    const entry = free.get(m.species) ?? { names: [], count: 0, to: Object.keys(m.site) };
    if (m.name) entry.names.push(m.name.replace(/^nu/, "ν"));
    entry.count += m.count;
    free.set(m.species, entry);
  }
  const reached = new Set([...free.values()].flatMap((f) => f.to));
  const site = unit.siteToFactorGroup
    .filter((s) => reached.has(s.site))
    .map((s) => ({ label: s.site, to: Object.keys(s.factorGroup) }));
  return {
    headings: [`free ${unit.pointGroup}`, `site ${unit.schoenflies}`, `factor group ${factorGroup.schoenflies}`],
    free: [...free].map(([species, f]) => ({ label: freeLabel(species, f.names, f.count), to: f.to })),
    site,
    factorGroup: [...new Set(site.flatMap((s) => s.to))],
  };
}

function freeLabel(species: string, names: readonly string[], count: number): string {
  return `${species} ${names.length > 0 ? names.join(" ") : `x${count}`}`;
}

/**
 * The correlation as text, one line for each path: `A1' ν1 ── A1 ─┬─ A1g`. A species that several lead to is repeated, with its name
 * in parentheses from the second time on.
 */
export function correlationDiagram(
  unit: UnitAnswer,
  factorGroup: { readonly schoenflies: string },
  write: SpeciesWriter = speciesWriter(),
): string {
  const levels = correlationLevels(unit, factorGroup);
  const typeset = (text: string) => text.replace(/^\S+/, (label) => write.label(label));
  const rows: [string, string, string][] = [];
  const drawn = new Set<string>();
  for (const f of levels.free) {
    f.to.forEach((s, i) => {
      const left = i === 0 ? typeset(f.label) : "";
      if (drawn.has(s)) {
        rows.push([left, `(${write.label(s)})`, "as above"]);
        return;
      }
      drawn.add(s);
      for (const [j, t] of levels.site.find((l) => l.label === s)!.to.entries()) {
        rows.push([j === 0 ? left : "", j === 0 ? write.label(s) : "", write.label(t)]);
      }
    });
  }
  return [`${unit.formula}: internal modes`, ...drawRows(levels.headings, rows)].join("\n");
}

function drawRows(headings: readonly [string, string, string], rows: readonly [string, string, string][]): string[] {
  const width = (k: 0 | 1) => Math.max(headings[k].length, ...rows.map((r) => r[k].length));
  const [w0, w1] = [width(0), width(1)];
  const joint = (here: string, next: string | undefined) => {
    const more = next === "";
    if (here !== "") return more ? "─┬─" : "───";
    return more ? " ├─" : " └─";
  };
  const line = (left: string, a: string, middle: string, b: string, right: string) =>
    `  ${left.padEnd(w0)} ${a} ${middle.padEnd(w1)} ${b} ${right}`.trimEnd();
  const drawn = rows.map(([left, middle, right], i) => {
    const next = rows[i + 1];
    const a =
      middle === "" ? (leftContinues(rows, i) ? " │ " : "   ") : joint(left, next && leftContinues(rows, i) ? "" : "x");
    const b = joint(middle, next && next[1] === "" ? "" : "x");
    return line(left, a, middle, b, right);
  });
  return [line(headings[0], "   ", headings[1], "   ", headings[2]), ...drawn];
}

/** Whether the free species of row i leads to a further site species below it. */
function leftContinues(rows: readonly [string, string, string][], i: number): boolean {
  for (let k = i + 1; k < rows.length && rows[k]![0] === ""; k++) if (rows[k]![1] !== "") return true;
  return false;
}
