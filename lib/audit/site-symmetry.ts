import { type Crystal, siteSymmetry } from "../structure/index.ts";
import { type AtomRow, atomRows } from "./atom-rows.ts";
import { type AuditInput, rowNumber, type StatedNumber, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

/** A position that a file means to be special is written to this; angstrom. */
const STRICT = 1e-3;

const MULTIPLICITY: Criterion = {
  id: "site-multiplicity",
  severity: "contradiction",
  criterion:
    "The multiplicity listed for a site is not the number of its images in the cell under the group in use, whether the " +
    `site is taken as special within the tolerance or only within ${STRICT} Å.`,
  source: "IUCr core CIF dictionary, _atom_site.site_symmetry_multiplicity; orbit and stabiliser.",
  advice: "Correct the multiplicity, or the coordinates or operations if the site was meant to be special.",
};

const SWAPPED: Criterion = {
  id: "multiplicity-is-order",
  severity: "doubt",
  criterion:
    "The column of multiplicities holds the orders of the site-symmetry groups instead (1 for general positions).",
  source: "IUCr core CIF dictionary: multiplicity times order is the number of operations of the cell.",
  advice: "Write the column under _atom_site_site_symmetry_order, or divide the number of operations by it.",
};

const ORDER: Criterion = {
  id: "site-symmetry-order",
  severity: "contradiction",
  criterion:
    "The order listed for a site-symmetry group is not the number of operations that fix the site, whether within the " +
    `tolerance or within ${STRICT} Å.`,
  source: "IUCr core CIF dictionary, _atom_site.site_symmetry_order.",
  advice: "Correct the order, or the coordinates if the site was meant to be special.",
};

export const criteria: readonly Criterion[] = [MULTIPLICITY, SWAPPED, ORDER];

/** Are multiplicities and orders of site symmetry as listed? */
export function check(input: AuditInput): Finding[] {
  const { crystal } = input;
  if (!crystal) return [];
  const rows = atomRows(input);
  return [...multiplicities(input, crystal, rows), ...orders(input, crystal, rows)];
}

/** A row whose number is none of those allowed. */
interface Wrong {
  readonly row: AtomRow;
  readonly stated: StatedNumber;
  readonly order: number;
}

/** Rows with a number under `name`, with the orders that their site groups may have. */
function stated(crystal: Crystal, rows: readonly AtomRow[], name: string) {
  return rows.flatMap((row) => {
    const value = rowNumber(row.loop, row.row, name);
    if (!value) return [];
    const { position } = row.atom;
    const { operations } = crystal.group;
    const strict = siteSymmetry(operations, crystal.metric, position, STRICT).operations.length;
    const order = row.site?.symmetry.operations.length;
    const loose = order ?? siteSymmetry(operations, crystal.metric, position, crystal.tolerance).operations.length;
    return [{ row, stated: value, order: loose, orders: [loose, strict] }];
  });
}

function multiplicities(input: AuditInput, crystal: Crystal, rows: readonly AtomRow[]): Finding[] {
  const all = stated(crystal, rows, "_atom_site.site_symmetry_multiplicity");
  const size = crystal.group.operations.length;
  const wrong = all.filter(({ stated: s, orders }) => !orders.some((n) => s.value === size / n));
  if (wrong.length === 0) return [];
  const areOrders = wrong.length > 0 && all.every(({ stated: s, orders }) => orders.includes(s.value));
  if (areOrders) {
    const what = "the listed multiplicities are the orders of the site-symmetry groups, not numbers of images";
    return [listed(input, SWAPPED, wrong, (w) => size / w.order, what)];
  }
  const labels = wrong.map(({ row }) => row.atom.label);
  const first = wrong[0]!;
  const what = `the multiplicity of ${first.row.atom.label} is listed as ${first.stated.text}, but it has ${size / first.order} images in the cell${rest(labels)}`;
  return [listed(input, MULTIPLICITY, wrong, (w) => size / w.order, what)];
}

function orders(input: AuditInput, crystal: Crystal, rows: readonly AtomRow[]): Finding[] {
  const all = stated(crystal, rows, "_atom_site.site_symmetry_order");
  const wrong = all.filter(({ stated: s, orders: allowed }) => !allowed.includes(s.value));
  if (wrong.length === 0) return [];
  const labels = wrong.map(({ row }) => row.atom.label);
  const first = wrong[0]!;
  const what = `the site-symmetry order of ${first.row.atom.label} is listed as ${first.stated.text}, but ${first.order} operations fix it${rest(labels)}`;
  return [listed(input, ORDER, wrong, (w) => w.order, what)];
}

function rest(labels: readonly string[]): string {
  return labels.length > 1 ? `; likewise ${some(labels.slice(1))}` : "";
}

function listed(
  input: AuditInput,
  criterion: Criterion,
  wrong: readonly Wrong[],
  right: (w: Wrong) => number,
  message: string,
): Finding {
  const first = wrong[0]!;
  const also = wrong.slice(1).map((w) => `${w.row.atom.label}: ${w.stated.text}, not ${right(w)}`);
  return finding(criterion, input.place(first.stated.name, first.stated.span), message, {
    stated: { ...statementOf(first.stated), what: `${first.stated.name} of ${first.row.atom.label}` },
    against: { what: "by operations and coordinates", value: right(first) },
    ...(also.length > 0 ? { also } : {}),
  });
}
