import type { CodedAtom, MeasuredQuantity, NeighboursAnswer } from "../structure/index.ts";
import { quantity } from "./quantity-text.ts";
import { textTable, wrapText } from "./table.ts";

const WIDTH = 110;

/** Hydrogen bonds of an answer; empty where there are none. */
export function hydrogenBondTable({ hydrogenBonds, hydrogenMissing }: NeighboursAnswer, most: number): string {
  const missing =
    "the file lacks hydrogen of its formula: where it does, donor and acceptor are told by valence and distance alone";
  if (hydrogenBonds.length === 0) return "";
  const placed = hydrogenBonds.some((h) => h.hydrogen !== null);
  const shown = hydrogenBonds.slice(0, most);
  const rows = shown.map((h) => [
    coded(h.donor),
    h.hydrogen ? coded(h.hydrogen) : "(missing)",
    coded(h.acceptor),
    length(h.donorHydrogen),
    length(h.hydrogenAcceptor),
    length(h.donorAcceptor),
    h.angle ? quantity(h.angle, 1) : "",
    `×${h.count}`,
  ]);
  const columns = ["D", "H", "A", "D-H/Å", "H...A/Å", "D...A/Å", "D-H...A/°", ""].map((heading) => ({ heading }));
  const rule = placed
    ? "H...A shorter than the sum of the van der Waals radii (Bondi 1964), angle at H at least 110° (Steiner 2002)"
    : "";
  const notes = [
    hydrogenBonds.length > shown.length ? `and ${hydrogenBonds.length - shown.length} more: --all` : "",
    wrapText([rule, hydrogenMissing ? missing : ""].filter(Boolean).join("; "), WIDTH, "  "),
  ];
  return ["Hydrogen bonds", textTable(columns, rows), ...notes.filter(Boolean)].join("\n");
}

function coded({ label, code }: CodedAtom): string {
  if (code === null) return `${label}(far)`;
  return /^\D*1_555$/.test(code) ? label : `${label}(${code})`;
}

function length(q: MeasuredQuantity | null): string {
  return q ? quantity(q, 3) : "";
}
