import { InputProblem } from "../problem.ts";
import {
  assignWyckoff,
  freeLetters,
  type IdentifiedGroup,
  type PositionInCell,
  pointOfForm,
  pointsOfPosition,
} from "../symmetry/index.ts";
import type { Metric, Vec3 } from "./cell.ts";
import { nearestOnPosition } from "./nearest-on-position.ts";
import { siteSymmetry } from "./site-symmetry.ts";
import { PARAMETERS, type PositionParameters, type TableCoordinate, type TableSite } from "./site-table.ts";

/** Where sites are placed. */
export interface PlacingGroup {
  readonly identified: IdentifiedGroup;
  readonly positions: readonly PositionInCell[];
  readonly metric: Metric;
  /** Coordinates may be off a special position by this, angstrom. */
  readonly tolerance: number;
}

/** A site in its place, exactly on its position. */
export interface PlacedSite {
  readonly point: Vec3;
  readonly su: readonly [number | null, number | null, number | null];
  /** How far the coordinates were moved, angstrom. */
  readonly shift: number;
}

/** Two points on one special position agree within this: rounding, no length of a structure; angstrom. */
export const EXACTLY_ON = 1e-4;

/**
 * The point that a line of a table means: on the position it names, or on the one that its coordinates are on.
 * @throws InputProblem `position-unknown`, `multiplicity-wrong`, `parameter-missing`, `parameter-idle`,
 * `position-unlike` where point and position do not go together
 */
export function placedSite(site: TableSite, at: PlacingGroup): PlacedSite {
  const position = namedPosition(site, at);
  if (!site.coordinates) {
    if (position) return fromParameters(site, position, at);
    const hint = `write "${site.label} 18e x=0.25" or "${site.label} 0.25,0,1/4"`;
    const why = `${site.label} has neither a position nor coordinates`;
    throw new InputProblem("position-unknown", why, site.spans.line, hint);
  }
  const x = evaluated(site, site.coordinates);
  const su = site.coordinates.map((c) => uncertainty(c, site.parameters)) as unknown as PlacedSite["su"];
  if (position) return onPosition(site, position, x, su, at);
  const { point, shift, operations } = siteSymmetry(at.identified.group.operations, at.metric, x, at.tolerance);
  const { form } = assignWyckoff(at.identified, operations);
  return { point, su: freeOnly(su, form.M.n), shift };
}

function namedPosition({ label, letter, multiplicity, spans }: TableSite, at: PlacingGroup): PositionInCell | null {
  if (letter === null) return null;
  const position = at.positions.find((p) => p.letter === letter);
  const { hermannMauguin } = at.identified.summary;
  const known = at.positions.map(nameOf).join(", ");
  if (!position) {
    const why = `${label}: ${hermannMauguin} has no position ${letterText(letter)}`;
    throw new InputProblem("position-unknown", why, spans.position, `it has ${known}`);
  }
  if (multiplicity === null || multiplicity === position.multiplicity) return position;
  const cell = multiplicity === position.referenceMultiplicity ? " in the cell of the reference setting, but" : "";
  throw new InputProblem(
    "multiplicity-wrong",
    `${label}: position ${letterText(letter)} of ${hermannMauguin} has${cell} ${position.multiplicity} points in this cell, not ${multiplicity}`,
    spans.position,
    `positions are ${known}; look for another letter, group or setting`,
  );
}

const letterText = (letter: string) => (letter === "A" ? "alpha" : letter);
const nameOf = ({ multiplicity, letter }: { readonly multiplicity: number; readonly letter: string }) =>
  `${multiplicity}${letterText(letter)}`;

function fromParameters(site: TableSite, position: PositionInCell, at: PlacingGroup): PlacedSite {
  const { label, parameters, spans } = site;
  const free = freeLetters(position.form).map((i) => PARAMETERS[i]!);
  const named = `${nameOf(position)} is ${position.triplet}`;
  const missing = free.filter((p) => !parameters[p]);
  if (missing.length > 0) {
    const why = `${label}: ${named}, and ${missing.join(", ")} ${missing.length > 1 ? "are" : "is"} not given`;
    const hint = `add ${missing.map((p) => `${p}=...`).join(" ")}, or give the coordinates`;
    throw new InputProblem("parameter-missing", why, spans.position, hint);
  }
  refuseIdle(site, free, named);
  const point = pointOfForm(position.form, valuesOf(parameters));
  requireLetter(site, position, point, at);
  const { n, d } = position.form.M;
  const rows = [0, 1, 2].map((i) =>
    rootOfSquares(
      n.slice(3 * i, 3 * i + 3).map((e) => e / d),
      parameters,
    ),
  );
  return { point, su: rows as unknown as PlacedSite["su"], shift: 0 };
}

function valuesOf({ x, y, z }: PositionParameters): [number, number, number] {
  return [x?.value ?? 0, y?.value ?? 0, z?.value ?? 0];
}

function refuseIdle({ label, parameters, spans }: TableSite, free: readonly string[], why: string): void {
  const idle = PARAMETERS.filter((p) => parameters[p] && !free.includes(p));
  if (idle.length === 0) return;
  throw new InputProblem(
    "parameter-idle",
    `${label}: ${idle.join(", ")} ${idle.length > 1 ? "are" : "is"} given, but ${why}`,
    spans.coordinates,
    "leave the value out, or write the three coordinates instead",
  );
}

/** Coordinates with the values of their letters put in. */
function evaluated(site: TableSite, xyz: readonly TableCoordinate[]): Vec3 {
  const { label, parameters, spans } = site;
  const used = PARAMETERS.filter((_, i) => xyz.some((c) => c.coefficients[i] !== 0));
  const open = used.filter((p) => !parameters[p]);
  if (open.length > 0) {
    const why = `${label}: ${open.join(", ")} ${open.length > 1 ? "stand" : "stands"} in the coordinates without a value`;
    const hint = `add ${open.map((p) => `${p}=...`).join(" ")}`;
    throw new InputProblem("parameter-missing", why, spans.coordinates, hint);
  }
  refuseIdle(site, used, "the coordinates do not use it");
  const free = valuesOf(parameters);
  return xyz.map((c) => c.constant + c.coefficients.reduce((s, e, i) => s + e * free[i]!, 0)) as unknown as Vec3;
}

/** On the named position as near as the tolerance lets, and on no more special one. */
function onPosition(
  site: TableSite,
  position: PositionInCell,
  x: Vec3,
  su: PlacedSite["su"],
  at: PlacingGroup,
): PlacedSite {
  const near = siteSymmetry(at.identified.group.operations, at.metric, x, at.tolerance);
  const found = assignWyckoff(at.identified, near.operations);
  if (found.letter === position.letter) {
    return { point: near.point, su: freeOnly(su, found.form.M.n), shift: near.shift };
  }
  // a less special position may pass within the tolerance, and is meant if it is named
  const { point, distance } = nearestOnPosition(pointsOfPosition(at.identified, position), at.metric, x);
  if (distance > at.tolerance) throw unlike(site, position, x, at, { point, distance });
  requireLetter(site, position, point, at);
  const { operations } = siteSymmetry(at.identified.group.operations, at.metric, point, EXACTLY_ON);
  return { point, su: freeOnly(su, assignWyckoff(at.identified, operations).form.M.n), shift: distance };
}

function requireLetter(site: TableSite, position: PositionInCell, point: Vec3, at: PlacingGroup): void {
  const { operations } = siteSymmetry(at.identified.group.operations, at.metric, point, EXACTLY_ON);
  if (operations.length !== position.order) throw unlike(site, position, point, at, null);
}

function unlike(
  { label, spans }: TableSite,
  position: PositionInCell,
  x: Vec3,
  { identified, metric, tolerance }: PlacingGroup,
  nearest: { readonly point: Vec3; readonly distance: number } | null,
): InputProblem {
  const { operations } = siteSymmetry(identified.group.operations, metric, x, nearest ? tolerance : EXACTLY_ON);
  const { letter, multiplicity, siteSymmetry: symbol } = assignWyckoff(identified, operations);
  const is = `${label} at ${pointText(x)} is not on ${nameOf(position)} but on ${nameOf({ letter, multiplicity })} (site symmetry ${symbol})`;
  const far = nearest
    ? `; the nearest point of ${nameOf(position)} is ${pointText(nearest.point)}, ${nearest.distance.toFixed(2)} Å away`
    : "";
  return new InputProblem(
    "position-unlike",
    `${is}${far}`,
    spans.coordinates,
    "correct the coordinates or the letter, or leave the letter out to have it worked out; a paper may use another origin or axes",
  );
}

function pointText(x: Vec3): string {
  return x.map((e) => Number(e.toFixed(4)) + 0).join(",");
}

/** An s.u. belongs to a coordinate that may move. */
function freeOnly(su: PlacedSite["su"], M: readonly number[]): PlacedSite["su"] {
  const kept = su.map((e, i) => (M.slice(3 * i, 3 * i + 3).some((m) => m !== 0) ? e : null));
  return kept as unknown as PlacedSite["su"];
}

function uncertainty({ coefficients, su }: TableCoordinate, parameters: PositionParameters): number | null {
  return su ?? rootOfSquares(coefficients, parameters);
}

function rootOfSquares(coefficients: readonly number[], parameters: PositionParameters): number | null {
  const parts = PARAMETERS.flatMap((p, i) => {
    const su = parameters[p]?.su ?? null;
    return su === null || coefficients[i] === 0 ? [] : [su * coefficients[i]!];
  });
  return parts.length > 0 ? Math.hypot(...parts) : null;
}
