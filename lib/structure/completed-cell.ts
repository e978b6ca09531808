import { transpose } from "../algebra/index.ts";
import { InputProblem, type Span } from "../problem.ts";
import {
  type SpaceGroup,
  type TensorConstraint,
  tensorConstraint,
  WRITTEN_METRIC_TOLERANCE,
} from "../symmetry/index.ts";
import { type Cell, type Metric, metricOf } from "./cell.ts";
import { CELL_PARAMETERS, type CellParameter, type CellParameters, type WrittenCell } from "./cell-parameters-text.ts";
import { LinearFacts } from "./linear-facts.ts";

/** What problems with a cell point at. */
export interface CellOrigin {
  /** Name of the group for messages. */
  readonly groupName: string;
  readonly spans: Readonly<Partial<Record<CellParameter, Span>>>;
}

/** Components of the metric tensor, in the order 11 22 33 12 13 23, that belong to the parameters. */
const COMPONENT: Readonly<Record<CellParameter, number>> = { a: 0, b: 1, c: 2, gamma: 3, beta: 4, alpha: 5 };
/** The two lengths beside an angle. */
const SIDES: Readonly<Record<string, readonly [CellParameter, CellParameter]>> = {
  alpha: ["b", "c"],
  beta: ["a", "c"],
  gamma: ["a", "b"],
};
const DEGREE = Math.PI / 180;

/**
 * The cell of which some parameters are given and the others follow from the rotations of the group, in any setting:
 * the metric tensor is linear in its free components, and each parameter fixes one component.
 * @throws InputProblem `cell-contradiction` where a parameter cannot have the value given, `cell-incomplete` where the
 * group leaves one free that is not given, `cell-impossible`
 * @example
 * ```ts
 * const { group } = namedGroup("P 63/m m c").settings[0];
 * const { cell, volume } = completedCell({ a: 3.16, c: 12.3 }, group, { groupName: "P 63/m m c", spans: {} });
 * [cell.b, cell.gamma]; // [3.16, 120]
 * volume.toFixed(2); // "106.37"
 * ```
 */
export function completedCell(given: CellParameters, group: SpaceGroup, origin: CellOrigin): Metric {
  requirePossible(given, origin);
  const facts = new MetricFacts(group);
  let waiting = CELL_PARAMETERS.filter((p) => given[p] !== undefined);
  for (let before = -1; before !== waiting.length; ) {
    before = waiting.length;
    waiting = waiting.filter((p) => {
      const verdict = facts.learn(p, given[p]!);
      if (verdict === "contradicts") throw contradiction(p, given[p]!, facts.known(p), given, origin);
      return verdict === "waits";
    });
  }
  const missing = facts.missing().filter((p) => given[p] === undefined);
  if (missing.length > 0) throw incomplete(missing, given, origin);
  return metricOf(Object.fromEntries(CELL_PARAMETERS.map((p) => [p, facts.known(p)!])) as unknown as Cell);
}

/**
 * Numbers without names are the parameters that the group leaves free, in the order a b c alpha beta gamma.
 * @throws InputProblem `cell-incomplete` where they are not as many as those
 */
export function cellInOrder(written: WrittenCell, group: SpaceGroup, groupName: string): WrittenCell {
  const { inOrder } = written;
  if (!inOrder) return written;
  const free = new MetricFacts(group).missing();
  if (free.length !== inOrder.length) {
    throw new InputProblem(
      "cell-incomplete",
      `${inOrder.length} of the numbers of a cell, but ${groupName} leaves ${free.length} free: ${free.join(", ")}`,
      { start: inOrder[0]!.span.start, end: inOrder.at(-1)!.span.end },
      `give ${free.map((p) => `${p}=...`).join(" ")}, or six numbers a b c alpha beta gamma`,
    );
  }
  return {
    values: Object.fromEntries(free.map((p, i) => [p, inOrder[i]!.value])),
    spans: Object.fromEntries(free.map((p, i) => [p, inOrder[i]!.span])),
  };
}

/** What is known of a metric tensor that the rotations of a group keep. */
class MetricFacts {
  private readonly facts = new LinearFacts(6);
  private readonly constraint: TensorConstraint["matrix"];

  constructor(group: SpaceGroup) {
    this.constraint = tensorConstraint(group.representatives.map((a) => transpose(a.W))).matrix;
  }

  /** The value that a parameter must have, or null where that is open. */
  known(p: CellParameter): number | null {
    const component = this.facts.valueOf(this.row(p));
    if (component === null) return null;
    const sides = SIDES[p];
    if (!sides) return rounded(Math.sqrt(Math.max(0, component)));
    const [i, j] = sides.map((q) => this.known(q));
    return i && j ? rounded(Math.acos(Math.max(-1, Math.min(1, component / (i * j)))) / DEGREE) : null;
  }

  /** Angles wait for the lengths beside them. */
  learn(p: CellParameter, value: number): "learnt" | "waits" | "contradicts" {
    const sides = SIDES[p];
    const [i, j] = sides ? sides.map((q) => this.known(q)) : [value, value];
    if (!i || !j) return "waits";
    const component = sides ? i * j * Math.cos(value * DEGREE) : value * value;
    const before = this.facts.valueOf(this.row(p));
    if (before === null) this.facts.add(this.row(p), component);
    else if (Math.abs(before - component) > WRITTEN_METRIC_TOLERANCE * i * j) return "contradicts";
    return "learnt";
  }

  /** Parameters that do not follow from those learnt and those before them in the list. */
  missing(): CellParameter[] {
    return CELL_PARAMETERS.filter((p) => this.facts.addIfNew(this.row(p)));
  }

  private row(p: CellParameter): number[] {
    const { n, d } = this.constraint;
    return n.slice(6 * COMPONENT[p], 6 * COMPONENT[p] + 6).map((e) => e / d);
  }
}

/** Roots and arc cosines miss 90 and 120 by their last digits. */
function rounded(x: number): number {
  return Number(x.toPrecision(12));
}

function requirePossible(given: CellParameters, { spans }: CellOrigin): void {
  for (const p of CELL_PARAMETERS) {
    const value = given[p];
    if (value === undefined || (value > 0 && (!SIDES[p] || value < 180))) continue;
    const what = SIDES[p] ? "an angle lies between 0 and 180 degrees" : "a length is above 0";
    throw new InputProblem("cell-impossible", `${p} = ${value}: ${what}`, spans[p] ?? null, "correct the cell");
  }
}

function contradiction(
  p: CellParameter,
  value: number,
  follows: number | null,
  given: CellParameters,
  { groupName, spans }: CellOrigin,
): InputProblem {
  const others = CELL_PARAMETERS.filter((q) => given[q] !== undefined && q !== p && !SIDES[q]);
  const by = SIDES[p] ? "" : ` with ${others.map((q) => `${q} = ${given[q]}`).join(", ")}`;
  const made = follows === null ? "" : `, which makes it ${Number(follows.toFixed(4))}${by}`;
  return new InputProblem(
    "cell-contradiction",
    `${p} = ${value} contradicts ${groupName}${made}`,
    spans[p] ?? null,
    `leave ${p} out, or name the group in the setting that the cell is meant in`,
  );
}

function incomplete(
  missing: readonly CellParameter[],
  given: CellParameters,
  { groupName, spans }: CellOrigin,
): InputProblem {
  const all = Object.values(spans);
  const span =
    all.length > 0 ? { start: Math.min(...all.map((s) => s.start)), end: Math.max(...all.map((s) => s.end)) } : null;
  const named = CELL_PARAMETERS.filter((p) => given[p] !== undefined);
  return new InputProblem(
    "cell-incomplete",
    `the cell lacks ${missing.join(", ")}: ${groupName} does not fix ${missing.length > 1 ? "them" : "it"}${named.length > 0 ? ` by ${named.join(", ")}` : ""}`,
    span,
    `give ${missing.map((p) => `${p}=...`).join(" ")} as well`,
  );
}
