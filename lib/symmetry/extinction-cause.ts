import { equal, IDENTITY, type IntVec3, mod, modOne, ratVec3 } from "../algebra/index.ts";
import { glideLetters, type PlaneNormal } from "./glide-letter.ts";
import { splitTranslation } from "./intrinsic-part.ts";
import type { Operation } from "./operation.ts";
import { formatOperation } from "./operation-text.ts";
import { onHexagonalAxes } from "./reciprocal-strata.ts";
import { rotationType } from "./rotation-type.ts";
import type { SpaceGroup } from "./space-group.ts";
import { formatVector } from "./transformation-text.ts";

/** The element behind an absence, with its operation: `centring 1/2,1/2,0`, `glide plane c: x,-y+1/2,z+1/2`. */
export function causeOf(a: Operation, group: SpaceGroup): string {
  if (equal(a.W, IDENTITY)) return `centring ${formatVector(a.w)}`;
  const { order, improper, axis } = rotationType(a.W);
  const text = formatOperation(a);
  if (!axis) return text;
  if (improper) {
    const hexagonal = onHexagonalAxes(group.representatives.map((r) => r.W));
    const [letter] = glideLetters(splitTranslation(a).intrinsic, normalOf(axis, hexagonal), group.centrings);
    return `glide plane ${letter}: ${text}`;
  }
  return `screw axis ${order}${screwNumber(a, axis, group)}: ${text}`;
}

function normalOf(axis: IntVec3, hexagonal: boolean): PlaneNormal {
  const along = [0, 1, 2].filter((i) => axis[i] !== 0);
  if (along.length !== 1) return "diagonal";
  return hexagonal && along[0] !== 2 ? "oblique" : (along[0] as 0 | 1 | 2);
}

/** The index of 21, 31, 41, 62 ...: screw vector of a counter-clockwise turn, in n-ths of the lattice period. */
function screwNumber(a: Operation, axis: IntVec3, group: SpaceGroup): number {
  const { order, sense } = rotationType(a.W);
  const { n, d } = splitTranslation(a).intrinsic;
  const i = axis.findIndex((e) => e !== 0);
  const known = new Set(group.centrings.map((t) => `${t.n.join()}/${t.d}`));
  const parts = [6, 4, 3, 2].find((k) => {
    const v = modOne(ratVec3(axis, k));
    return known.has(`${v.n.join()}/${v.d}`);
  });
  const turns = (n[i]! * order * (parts ?? 1)) / (d * axis[i]!);
  return mod(turns * (sense || 1), order);
}
