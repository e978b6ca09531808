import { addVectors, apply, type RatVec3, ratVec3, subtractVectors, transformVector } from "../../lib/algebra/index.ts";
import { identify } from "../../lib/symmetry/identification.ts";
import type { Operation } from "../../lib/symmetry/operation.ts";
import { referenceGroup } from "../../lib/symmetry/reference-group.ts";
import { assignWyckoff } from "../../lib/symmetry/site-assignment.ts";
import { wyckoffPositions } from "../../lib/symmetry/wyckoff-positions.ts";
import { type Measurement, milliseconds } from "./ratio.ts";

const SITES = 20;

const ROUNDS = 7;
const REFERENCE = "one JSON.parse of 100 kB";

/**
 * Identification of a group and Wyckoff assignment of twenty sites in each of the 230 types, the fastest round of each,
 * beside one JSON.parse in the same rounds: median and slowest type.
 */
export function measure(): readonly Measurement[] {
  const cases = Array.from({ length: 230 }, (_, i) => prepare(i + 1));
  const json = document(100_000);
  const best = cases.map(() => ({ all: Number.POSITIVE_INFINITY, identification: Number.POSITIVE_INFINITY }));
  let parse = Number.POSITIVE_INFINITY;
  let sink = 0;
  for (let round = 0; round < ROUNDS; round++) {
    cases.forEach(({ number, sites }, i) => {
      const group = referenceGroup(number);
      const start = performance.now();
      const { number: found, transformation } = identify(group.operations);
      const middle = performance.now();
      const context = { group, number: found, toReference: transformation };
      for (const site of sites) sink += assignWyckoff(context, site).multiplicity;
      const end = performance.now();
      best[i]!.identification = Math.min(best[i]!.identification, middle - start);
      best[i]!.all = Math.min(best[i]!.all, end - start);
    });
    const start = performance.now();
    sink += Object.keys(JSON.parse(json)).length;
    parse = Math.min(parse, performance.now() - start);
  }
  const row = (name: string, time: number): Measurement => {
    return { name, ratio: time / parse, reference: REFERENCE, detail: milliseconds(time) };
  };
  const sorted = best.map((b, i) => ({ number: i + 1, ...b })).sort((a, b) => a.all - b.all);
  const slowest = sorted.at(-1)!;
  const alone = best.map((b) => b.identification).sort((a, b) => a - b)[115]!;
  if (!Number.isFinite(sink)) throw new RangeError("a site has no multiplicity");
  return [
    row("identification, median of 230 types", alone),
    row(`identification and ${SITES} sites assigned, median of 230 types`, sorted[115]!.all),
    row(`the same, slowest type (${slowest.number})`, slowest.all),
  ];
}

/** Site groups of twenty points, in turn on the positions of the type. */
function prepare(number: number): { number: number; sites: Operation[][] } {
  const positions = wyckoffPositions(number);
  const { operations } = referenceGroup(number);
  const sites = Array.from({ length: SITES }, (_, k) => {
    const { M, t } = positions[k % positions.length]!.form;
    const x = addVectors(transformVector(M, ratVec3([7 + k, 18 + 3 * k, 31 + 2 * k], 101)), t);
    return operations.flatMap((a) => fixing(a, x));
  });
  return { number, sites };
}

function fixing(a: Operation, x: RatVec3): Operation[] {
  const shift = subtractVectors(x, addVectors(ratVec3(apply(a.W, x.n), x.d), a.w));
  return shift.d === 1 ? [{ W: a.W, w: addVectors(a.w, shift) }] : [];
}

/** A JSON document of about the given length: an array of small atom records. */
function document(length: number): string {
  const atoms: unknown[] = [];
  for (let k = 0, size = 0; size < length; k++) {
    const atom = { label: `Si${k}`, x: (k * 0.37) % 1, y: (k * 0.11) % 1, z: (k * 0.59) % 1, occupancy: 1 };
    atoms.push(atom);
    size += JSON.stringify(atom).length + 1;
  }
  return JSON.stringify(atoms);
}
