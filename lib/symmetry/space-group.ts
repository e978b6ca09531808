import { equal, type IntMat3, type RatMat3, type RatVec3 } from "../algebra/index.ts";
import { centringsOf, primitiveBasis } from "./centring.ts";
import { closeGroup } from "./group-closure.ts";
import type { Operation } from "./operation.ts";

/** A space group in one cell, as all its operations modulo the lattice Z^3 of that cell. */
export interface SpaceGroup {
  /** All of them, centrings included, translations in [0, 1), the identity first. */
  readonly operations: readonly Operation[];
  /** Pure translations in [0, 1), 0 first. */
  readonly centrings: readonly RatVec3[];
  /** One operation per rotation part, in the order of first appearance: a factor group modulo all translations. */
  readonly representatives: readonly Operation[];
  /** Columns: a primitive basis in terms of this cell. */
  readonly primitive: RatMat3;
}

/**
 * The space group that the operations generate; a complete list gives itself back.
 * @throws InputProblem `operations-endless`
 */
export function spaceGroup(operations: readonly Operation[]): SpaceGroup {
  const all = closeGroup(operations);
  const representatives: Operation[] = [];
  const seen = new Set<string>();
  for (const a of all) {
    const k = a.W.join();
    if (!seen.has(k)) {
      seen.add(k);
      representatives.push(a);
    }
  }
  const centrings = centringsOf(all);
  return { operations: all, centrings, representatives, primitive: primitiveBasis(centrings) };
}

/** Rotation parts of the point group of the space group, in the order of its representatives. */
export function rotationParts(group: SpaceGroup): IntMat3[] {
  return group.representatives.map((a) => a.W);
}

/** Index of a rotation part among the representatives, -1 if the point group lacks it. */
export function rotationIndex(group: SpaceGroup, W: IntMat3): number {
  return group.representatives.findIndex((a) => equal(a.W, W));
}
