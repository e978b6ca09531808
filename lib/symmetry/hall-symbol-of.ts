import { directHallSymbol } from "./direct-hall-symbol.ts";
import { operationsFromHall } from "./hall-symbol.ts";
import { formatHallChange, formatHallSymbol, parseHallSymbol } from "./hall-symbol-text.ts";
import { identify } from "./identification.ts";
import { type Operation, operationKey } from "./operation.ts";
import { referenceGroup } from "./reference-group.ts";
import { spaceGroupType } from "./space-group-type.ts";
import { chain, IDENTITY_TRANSFORMATION, reverse, type Transformation } from "./transformation.ts";

/**
 * A Hall symbol that denotes exactly these operations: the symbol of the reference setting where they are that setting,
 * else one without change of basis where there is one, else the reference symbol with a change of basis.
 * @param operations a whole group modulo Z^3, centrings included
 * @throws InputProblem `operations-no-space-group` if they belong to none
 */
export function hallSymbolOf(operations: readonly Operation[]): string {
  const { number, transformation } = identify(operations);
  return hallSymbolBy(operations, number, transformation);
}

/** The same where the type and the way to its reference setting are known. */
export function hallSymbolBy(operations: readonly Operation[], number: number, toReference: Transformation): string {
  const { hall } = spaceGroupType(number);
  const plain = formatHallChange(reverse(toReference)) === "";
  if (plain || sameGroup(referenceGroup(number).operations, operations)) return hall;
  const direct = directHallSymbol(operations);
  if (direct && sameGroup(operationsFromHall(direct).operations, operations)) return direct;
  const reference = parseHallSymbol(hall);
  return formatHallSymbol({
    ...reference,
    change: chain(reference.change ?? IDENTITY_TRANSFORMATION, reverse(toReference)),
  });
}

function sameGroup(a: readonly Operation[], b: readonly Operation[]): boolean {
  if (a.length !== b.length) return false;
  const keys = new Set(a.map(operationKey));
  return b.every((o) => keys.has(operationKey(o)));
}
