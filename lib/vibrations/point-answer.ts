import { finitePointAnswer, type PointAnswer, type PointOptions } from "./finite-point-answer.ts";
import { linearPointAnswer } from "./linear-point-answer.ts";
import { readPointName } from "./point-name.ts";

/**
 * Character table of a point group by name, with what its species transform like and what they do in a spectrum.
 * @param name Schoenflies or International symbol: `D4d`, `Ih`, `-4m2`, `Cinfv`
 * @throws InputProblem for a name, product or subgroup that there is not
 */
export function pointAnswer(name: string, options: PointOptions = {}): PointAnswer {
  const read = readPointName(name);
  return read.kind === "linear" ? linearPointAnswer(read.name, options) : finitePointAnswer(read.name, options);
}
