import { type ApproximateOperation, approximateOperations, type Body, operationId } from "./approximate-operations.ts";
import type { Mat3 } from "./cell.ts";
import { type Deviation, deviationOf, symmetrised } from "./deviation.ts";
import { exactRepresentation, type KnownMatrices } from "./exact-representation.ts";
import type { UnitSite } from "./molecular-unit.ts";
import { closedSet, groupsContaining, type PartialTable, partialTable } from "./operation-sets.ts";

/** Operations are looked at up to this many tolerances of misfit: two for a partner, and room for the fit. */
const SEARCH_FACTOR = 3;

/** What is exact passes even where the tolerance is 0; rounding lies far below; angstrom. */
export const ROUNDING = 1e-6;

/** A group among the operations of a body, with exact matrices. */
export interface GroupOfBody {
  /** Indices of operations of the search. */
  readonly members: readonly number[];
  readonly matrices: readonly Mat3[];
  readonly permutations: readonly (readonly number[])[];
  readonly deviation: Deviation;
}

/** The groups that a body has within a tolerance. */
export class GroupSearch {
  private readonly operations: readonly ApproximateOperation[];
  private readonly site: readonly number[]; // indices of the operations of the site
  private readonly matrices: readonly Mat3[];
  private readonly body: Body;
  private readonly tolerance: number;
  private readonly table: PartialTable;

  /**
   * @param site operations that the body obeys exactly
   * @param tolerance angstrom
   */
  constructor(body: Body, site: Pick<UnitSite, "matrices" | "permutations">, tolerance: number) {
    const { permutations, matrices } = site;
    this.body = body;
    this.matrices = matrices;
    this.tolerance = Math.max(tolerance, ROUNDING);
    const exact = permutations.map((permutation, s): ApproximateOperation => {
      const matrix = matrices[s]!;
      return { permutation, determinant: handedness(matrix), matrix, misfit: 0 };
    });
    const ids = new Set(exact.map((o) => operationId(o.permutation, o.determinant)));
    const others = approximateOperations(body, SEARCH_FACTOR * this.tolerance).filter(
      (o) => !ids.has(operationId(o.permutation, o.determinant)),
    );
    this.operations = [...exact, ...others];
    this.site = exact.map((_, s) => s);
    this.table = partialTable(this.operations);
  }

  /** The largest group within the tolerance; of equal ones that with the smallest deviation. */
  largest(): GroupOfBody {
    const all = closedSet(
      this.table,
      this.operations.map((_, i) => i),
    );
    const whole = all && this.candidate(all);
    if (whole && whole.deviation.largest <= this.tolerance) return whole;
    let best: GroupOfBody | null = null;
    for (const members of groupsContaining(this.table, this.site)) {
      if (best && members.length < best.members.length) break;
      const next = this.candidate(members);
      if (!next || next.deviation.largest > this.tolerance) continue;
      if (!best || next.deviation.largest < best.deviation.largest) best = next;
    }
    if (!best) throw new RangeError("the operations of the site do not form a group of the unit");
    return best;
  }

  /** Groups within a group found, itself included, that hold the site group. */
  within(found: GroupOfBody): GroupOfBody[] {
    const members = new Set(found.members);
    return groupsContaining(this.table, this.site).flatMap((group) =>
      group.every((m) => members.has(m)) ? (this.candidate(group) ?? []) : [],
    );
  }

  /** The operations of the site among the members of a group. */
  siteIn({ members }: GroupOfBody): KnownMatrices {
    return this.known(members);
  }

  private known(members: readonly number[]): KnownMatrices {
    return { elements: this.site.map((s) => members.indexOf(s)), matrices: this.matrices };
  }

  private candidate(members: readonly number[]): GroupOfBody | null {
    const { size, products } = this.table;
    const at = new Map(members.map((m, i) => [m, i]));
    const group = {
      order: members.length,
      products: members.flatMap((a) => members.map((b) => at.get(products[size * a + b]!)!)),
      determinants: members.map((m) => this.operations[m]!.determinant),
    };
    const approximate = members.map((m) => this.operations[m]!.matrix);
    const matrices = exactRepresentation(group, approximate, this.known(members));
    if (!matrices) return null;
    const permutations = members.map((m) => this.operations[m]!.permutation);
    const deviation = deviationOf(this.body.points, symmetrised(this.body.points, matrices, permutations));
    return { members, matrices, permutations, deviation };
  }
}

function handedness(m: Mat3): 1 | -1 {
  const [a, b, c, d, e, f, g, h, i] = m;
  return a * (e * i - f * h) - b * (d * i - f * g) + c * (d * h - e * g) < 0 ? -1 : 1;
}
