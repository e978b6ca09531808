import { readFileSync } from "node:fs";
import { vetAnswer } from "../../lib/audit/index.ts";
import { readCif } from "../../lib/cif/index.ts";
import { crystalFromBlock } from "../../lib/structure/index.ts";
import { cellOfItems, deposit, measure as measureReflections } from "../audit/mutation/deposition.ts";
import { writeDeposition } from "../audit/mutation/write-deposition.ts";
import { type Measurement, milliseconds } from "./ratio.ts";

const ROUNDS = 7;
const REFLECTIONS = 2000;

/** `vet` of a deposition with tensors, distances and reflections, beside reading the file and building its crystal. */
export function measure(): readonly Measurement[] {
  const text = readFileSync("fixtures/epsomite.cif", "utf8");
  const deposition = deposit(readCif(text).value.blocks[0]!);
  const bare = writeDeposition(deposition);
  deposition.reflections = measureReflections(deposition, cellOfItems(deposition.items), REFLECTIONS);
  const full = writeDeposition(deposition);
  const best = { bare: Number.POSITIVE_INFINITY, full: Number.POSITIVE_INFINITY, read: Number.POSITIVE_INFINITY };
  let sink = 0;
  const timed = (work: () => number) => {
    const start = performance.now();
    sink += work();
    return performance.now() - start;
  };
  for (let round = 0; round < ROUNDS; round++) {
    best.read = Math.min(
      best.read,
      timed(() => crystalFromBlock(readCif(full).value.blocks[0]!).sites.length),
    );
    best.bare = Math.min(
      best.bare,
      timed(() => vetAnswer(readCif(bare).value.blocks[0]!).findings.length),
    );
    best.full = Math.min(
      best.full,
      timed(() => vetAnswer(readCif(full).value.blocks[0]!).findings.length),
    );
  }
  if (!Number.isFinite(sink)) throw new RangeError("nothing was answered");
  const row = (name: string, time: number): Measurement => {
    return { name, ratio: time / best.read, reference: "reading the same file", detail: milliseconds(time) };
  };
  return [
    row("vet of a deposition without reflections", best.bare),
    row(`vet with ${REFLECTIONS} reflections`, best.full),
  ];
}
