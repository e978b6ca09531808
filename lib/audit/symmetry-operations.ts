import type { InputProblem } from "../problem.ts";
import type { DeclaredOperation } from "../structure/index.ts";
import { IDENTITY_OPERATION, operationKey } from "../symmetry/index.ts";
import type { AuditInput } from "./audit-input.ts";
import { type Criterion, type Finding, finding, some } from "./finding.ts";

const NO_GROUP: Criterion = {
  id: "operations-no-group",
  severity: "contradiction",
  criterion:
    "The product of two operations of the list is not in the list (modulo whole cells), so that they are not the " +
    "operations of a space group. Other statements of symmetry are used for the remaining checks.",
  source: "Definition of a group; International Tables for Crystallography A (2016), chapter 1.1.",
  advice: "Look for a wrong sign, letter or fraction, or for lines that were lost.",
};

const UNREADABLE: Criterion = {
  id: "operation-unreadable",
  severity: "doubt",
  criterion: "A line of the list of operations is no operation with whole coefficients and a known fraction.",
  source: "IUCr core CIF dictionary, _space_group_symop.operation_xyz.",
  advice: "Write it as x,y,z with signs and fractions, such as -y,x-y,z+1/3.",
};

const REPEATED: Criterion = {
  id: "operation-repeated",
  severity: "remark",
  criterion: "An operation is listed twice (modulo whole cells).",
  source: "IUCr core CIF dictionary: every operation stands once in the list.",
  advice: "Symmetry codes that count lines depend on the order of the list; remove the line only together with them.",
};

const NO_IDENTITY: Criterion = {
  id: "identity-missing",
  severity: "remark",
  criterion: "The list of operations lacks x,y,z.",
  source: "IUCr core CIF dictionary: the list includes the identity, as its first entry.",
  advice: "Add x,y,z as the first operation.",
};

export const criteria: readonly Criterion[] = [NO_GROUP, UNREADABLE, REPEATED, NO_IDENTITY];

/** Are the operations listed a group? */
export function check(input: AuditInput): Finding[] {
  const { operations } = input.declared;
  if (operations.length === 0) return [];
  return [...unreadable(input, operations), ...repeated(input, operations), ...noGroup(input, operations)];
}

function unreadable(input: AuditInput, list: readonly DeclaredOperation[]): Finding[] {
  return list.flatMap((entry) =>
    entry.problem
      ? [
          finding(
            UNREADABLE,
            input.place(entry.name, entry.span),
            `an operation cannot be read: ${entry.problem.message}`,
            {
              stated: { what: entry.name, value: entry.text },
              against: { what: "an operation", value: "three rows of whole coefficients and a fraction" },
            },
          ),
        ]
      : [],
  );
}

function repeated(input: AuditInput, list: readonly DeclaredOperation[]): Finding[] {
  const first = new Map<string, number>();
  const twice: { entry: DeclaredOperation; as: number }[] = [];
  list.forEach((entry, i) => {
    if (!entry.operation) return;
    const key = operationKey(entry.operation);
    const as = first.get(key);
    if (as === undefined) first.set(key, i);
    else twice.push({ entry, as });
  });
  const found: Finding[] = [];
  const [one] = twice;
  if (one) {
    const names = twice.map(({ entry }) => entry.text);
    found.push(
      finding(REPEATED, input.place(one.entry.name, one.entry.span), `listed more than once: ${some(names)}`, {
        stated: { what: `operation ${list.indexOf(one.entry) + 1}`, value: one.entry.text },
        against: { what: `operation ${one.as + 1}`, value: list[one.as]!.text },
        also: names.slice(1),
      }),
    );
  }
  if (!first.has(operationKey(IDENTITY_OPERATION))) {
    const entry = list[0]!;
    found.push(
      finding(NO_IDENTITY, input.place(entry.name, entry.span), "the list of operations lacks the identity x,y,z", {
        stated: { what: "first operation listed", value: entry.text },
        against: { what: "the identity", value: "x,y,z" },
      }),
    );
  }
  return found;
}

/** Codes of the problems that say that the list makes no group. */
const GROUP_PROBLEMS = ["operations-not-closed", "operations-endless", "operations-no-space-group"];

function noGroup(input: AuditInput, list: readonly DeclaredOperation[]): Finding[] {
  const problem = input.obstacles.find((o) => GROUP_PROBLEMS.includes(o.code));
  if (!problem) return [];
  const entry = list[0]!;
  return [
    finding(NO_GROUP, input.place(entry.name, (problem as InputProblem).span ?? entry.span), problem.message, {
      stated: { what: entry.name, value: `${list.length} operations` },
      against: { what: "their products", value: problem.message },
    }),
  ];
}
