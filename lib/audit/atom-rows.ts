import { type CifLoop, findLoop } from "../cif/index.ts";
import type { AtomSite, CrystalSite } from "../structure/index.ts";
import { type AuditInput, rounding, rowNumber } from "./audit-input.ts";

/** An atom of the list with its row, and the site of the crystal that it became. */
export interface AtomRow {
  readonly atom: AtomSite;
  readonly loop: CifLoop;
  readonly row: number;
  /** Null where the row was folded into an earlier one, or there is no crystal. */
  readonly site: CrystalSite | null;
}

/** The atom list, or null. */
export function atomLoop({ block }: AuditInput): CifLoop | null {
  return findLoop(block, "_atom_site.label") ?? findLoop(block, "_atom_site.fract_x");
}

/** Atoms that were read, each with its row. Atoms without a label have no row and are left out. */
export function atomRows(input: AuditInput): AtomRow[] {
  const loop = atomLoop(input);
  if (!loop) return [];
  const rows = new Map<number, number>();
  const column = loop.names.findIndex((name) => /^_atom_site[._]label$/i.test(name));
  for (let row = 0; row < loop.rowCount; row++) {
    const value = loop.at(row, column);
    if (value) rows.set(value.span.start, row);
  }
  const sites = new Map(input.crystal?.sites.map((s) => [s.label, s]));
  return input.atoms.flatMap((atom) => {
    const row = rows.get(atom.span.start);
    return row === undefined ? [] : [{ atom, loop, row, site: sites.get(atom.label) ?? null }];
  });
}

/** Standard uncertainties that an occupancy may be off. */
const SU_FACTOR = 3;

/** How much the occupancy of a row may be off by rounding and uncertainty; 0 where it is written as whole. */
export function occupancySlack({ loop, row }: Pick<AtomRow, "loop" | "row">): number {
  const stated = rowNumber(loop, row, "_atom_site.occupancy");
  if (!stated || (Number.isInteger(stated.value) && stated.su === null)) return 0;
  return Math.max(rounding(stated), SU_FACTOR * (stated.su ?? 0));
}
