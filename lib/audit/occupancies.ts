import type { Crystal } from "../structure/index.ts";
import { type AtomRow, atomRows, occupancySlack } from "./atom-rows.ts";
import { type AuditInput, rowNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** Rounding that sums of occupancies are granted beyond that of their digits; thirds are written 0.33. */
const SUM_SLACK = 0.02;
/** Occupancies of one disorder group that differ by less are the same. */
const SAME_OCCUPANCY = 0.02;

const RANGE: Criterion = {
  id: "occupancy-range",
  severity: "contradiction",
  criterion: "An occupancy is below 0 or above 1 by more than its rounding and three standard uncertainties.",
  source: "IUCr core CIF dictionary, _atom_site.occupancy: a fraction between 0 and 1.",
  advice: "Correct the occupancy; values with a factor of the site symmetry or of ten are frequent slips.",
};

const OVERFULL: Criterion = {
  id: "site-overfull",
  severity: "contradiction",
  criterion: `The occupancies of all sites at one position add up to more than 1 by more than their slack and ${SUM_SLACK}.`,
  source: "Two atoms cannot be at one place; IUCr core CIF dictionary, _atom_site.occupancy.",
  advice: "Correct the occupancies, or the coordinates if the sites were meant to be different ones.",
};

const GROUP: Criterion = {
  id: "disorder-group-occupancy",
  severity: "doubt",
  criterion: `Atoms of one disorder group have occupancies that differ by more than ${SAME_OCCUPANCY} and their uncertainties.`,
  source: "IUCr core CIF dictionary, _atom_site.disorder_group: atoms of a group are there together.",
  advice: "Give the atoms of a group one occupancy, or different groups.",
};

const SUM: Criterion = {
  id: "disorder-sum",
  severity: "doubt",
  criterion: `The occupancies of the groups of a disorder assembly add up to more than 1 by more than ${SUM_SLACK} and their slack.`,
  source: "IUCr core CIF dictionary, _atom_site.disorder_assembly: its groups exclude each other.",
  advice: "Refine the occupancies of the groups with their sum held at 1.",
};

const EMPTY: Criterion = {
  id: "occupancy-zero",
  severity: "remark",
  criterion: "A site has the occupancy 0.",
  source: "IUCr core CIF dictionary, _atom_site.occupancy.",
  advice: "Leave the site out, or write its occupancy.",
};

export const criteria: readonly Criterion[] = [RANGE, OVERFULL, GROUP, SUM, EMPTY];

/** Are occupancies possible, alone, at one position, and in disorder groups? */
export function check(input: AuditInput): Finding[] {
  const rows = atomRows(input);
  const { crystal } = input;
  return [
    ...range(input, rows),
    ...(crystal ? overfull(input, crystal, rows) : []),
    ...groups(input, rows),
    ...empty(input, rows),
  ];
}

function range(input: AuditInput, rows: readonly AtomRow[]): Finding[] {
  const odd = rows.flatMap((row) => {
    const stated = rowNumber(row.loop, row.row, "_atom_site.occupancy");
    if (!stated) return [];
    const beyond = Math.max(stated.value - 1, -stated.value);
    return beyond > occupancySlack(row) ? [{ row, stated, beyond }] : [];
  });
  const [first] = odd.sort((a, b) => b.beyond - a.beyond);
  if (!first) return [];
  const { atom } = first.row;
  const others = odd.slice(1).map((o) => o.row.atom.label);
  return [
    finding(
      RANGE,
      input.place(first.stated.name, first.stated.span),
      `the occupancy of ${atom.label} is ${first.stated.text}${others.length > 0 ? `; impossible as well: ${some(others)}` : ""}`,
      {
        stated: { ...statementOf(first.stated), what: `${first.stated.name} of ${atom.label}` },
        against: { what: "an occupancy", value: "0 to 1" },
        difference: first.beyond,
        tolerance: occupancySlack(first.row),
        ...(others.length > 0 ? { also: others } : {}),
      },
    ),
  ];
}

function overfull(input: AuditInput, crystal: Crystal, rows: readonly AtomRow[]): Finding[] {
  const slack = new Map(rows.map((row) => [row.atom.label, occupancySlack(row)]));
  const places = new Map<number, number[]>();
  crystal.sites.forEach((site, i) => {
    const root = site.sharesPositionOf ?? i;
    places.set(root, [...(places.get(root) ?? []), i]);
  });
  const over = [...places.values()].flatMap((members) => {
    const sites = members.map((i) => crystal.sites[i]!);
    const sum = sites.reduce((s, a) => s + a.occupancy, 0);
    const tolerance = SUM_SLACK + sites.reduce((s, a) => s + (slack.get(a.label) ?? 0), 0);
    return sites.length > 1 && sum > 1 + tolerance ? [{ sites, sum, tolerance }] : [];
  });
  const [first] = over.sort((a, b) => b.sum - a.sum);
  if (!first) return [];
  const names = (o: typeof first) => o.sites.map((s) => `${s.label} ${s.occupancy}`).join(" + ");
  return [
    finding(
      OVERFULL,
      input.place("_atom_site_occupancy", first.sites[0]!.span),
      `one position is occupied ${Number(first.sum.toFixed(4))} times: ${names(first)}`,
      {
        stated: { what: "occupancies at one position", value: names(first) },
        against: { what: "atoms at one place, at most", value: 1 },
        difference: first.sum - 1,
        tolerance: first.tolerance,
        ...(over.length > 1 ? { also: over.slice(1).map(names) } : {}),
      },
    ),
  ];
}

interface DisorderGroup {
  readonly name: string;
  readonly rows: readonly AtomRow[];
}

function groups(input: AuditInput, rows: readonly AtomRow[]): Finding[] {
  const assemblies = new Map<string, Map<string, AtomRow[]>>();
  for (const row of rows) {
    const { disorderGroup, assembly } = row.atom;
    if (disorderGroup === null || disorderGroup === "0") continue;
    const map = assemblies.get(assembly ?? "") ?? new Map<string, AtomRow[]>();
    assemblies.set(assembly ?? "", map);
    map.set(disorderGroup, [...(map.get(disorderGroup) ?? []), row]);
  }
  return [...assemblies].flatMap(([assembly, map]) => {
    const list = [...map].map(([name, members]): DisorderGroup => ({ name, rows: members }));
    return [...uneven(input, assembly, list), ...tooMany(input, assembly, list)];
  });
}

/** Without assemblies unrelated disorders share group numbers, so that nothing can be said of their occupancies. */
function uneven(input: AuditInput, assembly: string, list: readonly DisorderGroup[]): Finding[] {
  if (assembly === "") return [];
  return list.flatMap(({ name, rows }) => {
    const low = rows.reduce((a, b) => (b.atom.occupancy < a.atom.occupancy ? b : a));
    const high = rows.reduce((a, b) => (b.atom.occupancy > a.atom.occupancy ? b : a));
    const difference = high.atom.occupancy - low.atom.occupancy;
    const tolerance = SAME_OCCUPANCY + occupancySlack(low) + occupancySlack(high);
    if (difference <= tolerance) return [];
    const message = `group ${name} of the disorder assembly ${assembly} has occupancies from ${low.atom.occupancy} (${low.atom.label}) to ${high.atom.occupancy} (${high.atom.label})`;
    return [
      finding(GROUP, input.place("_atom_site_occupancy", low.atom.span), message, {
        stated: { what: `occupancy of ${low.atom.label}`, value: low.atom.occupancy },
        against: { what: `occupancy of ${high.atom.label}`, value: high.atom.occupancy },
        difference,
        tolerance,
      }),
    ];
  });
}

function tooMany(input: AuditInput, assembly: string, list: readonly DisorderGroup[]): Finding[] {
  const exclusive = list.filter((g) => !g.name.startsWith("-"));
  if (assembly === "" || exclusive.length < 2) return [];
  const least = exclusive.map((g) => g.rows.reduce((a, b) => (b.atom.occupancy < a.atom.occupancy ? b : a)));
  const sum = least.reduce((s, r) => s + r.atom.occupancy, 0);
  const tolerance = SUM_SLACK + least.reduce((s, r) => s + occupancySlack(r), 0);
  if (sum <= 1 + tolerance) return [];
  const parts = least.map((r, i) => `${exclusive[i]!.name}: ${r.atom.occupancy}`).join(", ");
  const message = `the groups of the disorder assembly ${assembly} add up to ${Number(sum.toFixed(3))} (${parts})`;
  return [
    finding(SUM, input.place("_atom_site_occupancy", least[0]!.atom.span), message, {
      stated: { what: `occupancies of assembly ${assembly}`, value: parts },
      against: { what: "their sum, at most", value: 1 },
      difference: sum - 1,
      tolerance,
    }),
  ];
}

function empty(input: AuditInput, rows: readonly AtomRow[]): Finding[] {
  const zero = rows.filter((r) => r.atom.occupancy === 0);
  const [first] = zero;
  if (!first) return [];
  const labels = zero.map((r) => r.atom.label);
  return [
    finding(EMPTY, input.place("_atom_site_occupancy", first.atom.span), `not occupied at all: ${some(labels)}`, {
      stated: { what: `_atom_site_occupancy of ${first.atom.label}`, value: 0 },
      against: { what: "an atom of the structure", value: "more than 0" },
      ...(labels.length > 1 ? { also: labels.slice(1) } : {}),
    }),
  ];
}
