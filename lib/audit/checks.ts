import type { AuditInput } from "./audit-input.ts";
import * as cellShape from "./cell-shape.ts";
import * as cellVolume from "./cell-volume.ts";
import type { Criterion, Finding } from "./finding.ts";
import * as symmetryOperations from "./symmetry-operations.ts";
import * as symmetryStatements from "./symmetry-statements.ts";

/** One question put to a file, with what it may find. */
export interface Check {
  readonly criteria: readonly Criterion[];
  check(input: AuditInput): readonly Finding[];
}

/** Every check, in the order of the findings. A new check is a file of its own and one line here. */
export const CHECKS: readonly Check[] = [symmetryOperations, symmetryStatements, cellShape, cellVolume];
