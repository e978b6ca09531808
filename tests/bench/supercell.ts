import { readFileSync } from "node:fs";
import { readCif } from "../../lib/cif/index.ts";
import { requireClean } from "../../lib/problem.ts";
import { extendedXyz, structureCif } from "../../lib/report/index.ts";
import {
  atomModel,
  coordinateList,
  crystalFromBlock,
  listedStructure,
  parseCellRequest,
} from "../../lib/structure/index.ts";
import { type Measurement, milliseconds, ratio } from "./ratio.ts";

const ROUNDS = 3;

function crystalOfFile(name: string) {
  const text = readFileSync(`fixtures/${name}.cif`, "utf8");
  return crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
}

/** The lines of a file, to be put together again by a loop that computes nothing but the digits. */
interface Plain {
  readonly head: string;
  readonly words: readonly (readonly string[])[];
  readonly numbers: Float64Array;
}

function plainOf(text: string): Plain {
  const lines = text.trimEnd().split("\n");
  const words = lines.slice(2).map((line) => line.split(" "));
  const numbers = Float64Array.from(words.flatMap((w) => w.slice(1, 4).map(Number)));
  return { head: lines.slice(0, 2).join("\n"), words, numbers };
}

function plainLoop({ head, words, numbers }: Plain): string {
  const lines = [head];
  for (let i = 0; i < words.length; i++) {
    const [x, y, z] = [numbers[3 * i]!, numbers[3 * i + 1]!, numbers[3 * i + 2]!];
    const w = words[i]!;
    lines.push(`${w[0]} ${x.toFixed(6)} ${y.toFixed(6)} ${z.toFixed(6)} ${w[4]} ${w[5]} ${w[6]}`);
  }
  return `${lines.join("\n")}\n`;
}

/** Memory of the whole process so far, megabytes. */
function memory(): number {
  return process.resourceUsage().maxRSS / 1024;
}

function extended(name: string, cell: string): Measurement {
  const crystal = crystalOfFile(name);
  const write = () =>
    extendedXyz(coordinateList(atomModel(crystal, { symmetry: "none", cell: parseCellRequest(cell) })));
  const text = write();
  const used = memory();
  const plain = plainOf(text);
  if (plainLoop(plain) !== text) throw new Error("the plain loop writes other bytes");
  const result = ratio(
    `${name} ${cell} as extended XYZ`,
    "writing the same bytes with a plain loop",
    {
      ours: () => write().length,
      reference: () => plainLoop(plain).length,
    },
    ROUNDS,
  );
  const size = `${plain.words.length} atoms, ${(text.length / 2 ** 20).toFixed(1)} MB, process up to ${used.toFixed(0)} MB`;
  return { ...result, detail: `${size}, ${result.detail}` };
}

function cif(name: string, cell: string): Measurement {
  const crystal = crystalOfFile(name);
  const heading = { comment: "", ending: "" };
  const model = () => atomModel(crystal, { symmetry: "none", cell: parseCellRequest(cell) });
  const start = performance.now();
  const text = structureCif(listedStructure(model()), "1.1", heading);
  const time = performance.now() - start;
  const sides = {
    ours: () => structureCif(listedStructure(model()), "1.1", heading).length,
    reference: () => [...text.split("\n")].join("\n").length,
  };
  const result = ratio(`${name} ${cell} as CIF in P 1`, "splitting and joining the same lines", sides, ROUNDS);
  return {
    ...result,
    detail: `${(text.length / 2 ** 20).toFixed(1)} MB, first time ${milliseconds(time)}, ${result.detail}`,
  };
}

export function measure(): readonly Measurement[] {
  return [
    extended("halite", "24,24,24"),
    extended("calcite", "15,15,15"),
    extended("benzene", "13,13,13"),
    cif("halite", "24,24,24"),
  ];
}
