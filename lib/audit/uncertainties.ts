import { isHydrogen } from "../structure/index.ts";
import { groupProperties } from "../symmetry/index.ts";
import { type AtomRow, atomRows } from "./atom-rows.ts";
import { type AuditInput, rowNumber, rowText, type StatedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";
import { statedCell } from "./stated-cell.ts";

/** Share of the coordinates that carry an uncertainty in a file that gives them at all. */
const USUAL_SHARE = 0.5;

const FIXED: Criterion = {
  id: "su-on-fixed-coordinate",
  severity: "doubt",
  criterion: "A coordinate that the symmetry of its site fixes has a standard uncertainty.",
  source: "A parameter fixed by symmetry is not refined; IUCr core CIF dictionary, _atom_site.fract_x.",
  advice: "The atom was refined off its special position, or the group in use is not that of the refinement.",
};

const FIXED_CELL: Criterion = {
  id: "su-on-fixed-angle",
  severity: "remark",
  criterion: "A cell angle that the crystal system fixes has a standard uncertainty.",
  source:
    "International Tables for Crystallography A (2016), section 1.3.4.4: metric conditions of the crystal systems.",
  advice: "The cell was refined without its symmetry; lengths that should be equal may differ as well.",
};

const ABSENT: Criterion = {
  id: "su-missing",
  severity: "remark",
  criterion:
    "Most coordinates of the file have a standard uncertainty, but some of an atom other than hydrogen that its site does " +
    "not fix has none.",
  source: "A refined parameter has an uncertainty; IUCr core CIF dictionary, _atom_site.fract_x.",
  advice: "Say that the parameter was held, or give its uncertainty.",
};

export const criteria: readonly Criterion[] = [FIXED, FIXED_CELL, ABSENT];

/** Do refined parameters have uncertainties, and fixed ones none? */
export function check(input: AuditInput): Finding[] {
  return [...coordinates(input), ...angles(input)];
}

const AXES = ["x", "y", "z"] as const;

interface Coordinate {
  readonly row: AtomRow;
  readonly axis: (typeof AXES)[number];
  readonly stated: StatedNumber;
  readonly fixed: boolean;
}

function coordinatesOf(rows: readonly AtomRow[]): Coordinate[] {
  return rows.flatMap((row) => {
    const { site, loop } = row;
    if (!site) return [];
    const { projection } = site.symmetry;
    return AXES.flatMap((axis, i): Coordinate[] => {
      const stated = rowNumber(loop, row.row, `_atom_site.fract_${axis}`);
      const fixed = [0, 1, 2].every((j) => projection.n[3 * i + j] === 0);
      return stated ? [{ row, axis, stated, fixed }] : [];
    });
  });
}

function coordinates(input: AuditInput): Finding[] {
  const all = coordinatesOf(atomRows(input));
  const free = all.filter((c) => !c.fixed && !isHydrogen(c.row.atom.element));
  const given = free.filter((c) => c.stated.su !== null).length;
  const fixed = all.filter((c) => c.fixed && (c.stated.su ?? 0) > 0);
  const held = free.filter((c) => c.stated.su === null && !isHeld(c));
  const absent = given > USUAL_SHARE * free.length ? withoutOrigin(input, held) : [];
  return [
    ...listed(input, FIXED, fixed, "is fixed by the symmetry of its site, but has an uncertainty"),
    ...listed(input, ABSENT, absent, "is free, but has no uncertainty"),
  ];
}

/** A file may say that a coordinate was not refined: riding, constrained, or a multiple of another one on its site. */
function isHeld({ row, axis }: Coordinate): boolean {
  const flags = rowText(row.loop, row.row, "_atom_site.refinement_flags_posn")?.text ?? "";
  const calculated = rowText(row.loop, row.row, "_atom_site.calc_flag")?.text.toLowerCase() ?? "";
  if (/[RGDA]/.test(flags) || calculated.startsWith("calc") || calculated === "c") return true;
  const i = AXES.indexOf(axis);
  const { n } = row.site!.symmetry.projection;
  // a bound coordinate repeats another
  return [0, 1, 2].some((j) => j !== i && n[3 * i + j] !== 0);
}

/** Along a polar axis one coordinate is held, to fix the origin. */
function withoutOrigin(input: AuditInput, list: readonly Coordinate[]): Coordinate[] {
  const identified = input.symmetry?.identified;
  const polar = identified ? groupProperties(identified.number, identified.group.operations).polarDirections : [];
  return list.filter(({ axis }) => {
    const i = AXES.indexOf(axis);
    return !polar.some((d) => d[i] !== 0) || list.filter((c) => c.axis === axis).length > 1;
  });
}

function listed(input: AuditInput, criterion: Criterion, list: readonly Coordinate[], what: string): Finding[] {
  const [first, ...rest] = list;
  if (!first) return [];
  const name = (c: Coordinate) => `${c.axis} of ${c.row.atom.label}`;
  const others = rest.map(name);
  const message = `${name(first)} ${what}${others.length > 0 ? `; likewise ${some(others)}` : ""}`;
  return [
    finding(criterion, input.place(first.stated.name, first.stated.span), message, {
      stated: { ...statementOf(first.stated), what: `${first.stated.name} of ${first.row.atom.label}` },
      against: { what: "by its site symmetry", value: first.fixed ? "fixed" : "free" },
      ...(others.length > 0 ? { also: others } : {}),
    }),
  ];
}

function angles(input: AuditInput): Finding[] {
  const cell = statedCell(input);
  const summary = input.symmetry?.identified.summary;
  if (!cell || !summary || summary.crystalSystem === "triclinic") return [];
  const fixed = [cell.alpha, cell.beta, cell.gamma].filter(
    (a) => (a.su ?? 0) > 0 && /^(?:90|120)(?:\.0*)?$/.test(a.text),
  );
  const [first, ...rest] = fixed;
  if (!first || (summary.crystalSystem === "monoclinic" && fixed.length === 1)) return [];
  const message = `${first.name} ${statementOf(first).value} has an uncertainty, though the ${summary.crystalSystem} system fixes it`;
  return [
    finding(FIXED_CELL, input.place(first.name, first.span), message, {
      stated: statementOf(first),
      against: { what: "crystal system", value: summary.crystalSystem },
      ...(rest.length > 0 ? { also: rest.map((a) => a.name) } : {}),
    }),
  ];
}
