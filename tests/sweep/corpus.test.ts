import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { closedSchema, faultsOf, validatorOf } from "../support/answer-schema.ts";
import { CORPUS, CORPUS_FILES } from "../support/corpus.ts";
import { BuiltCommands } from "../support/run-built-command.ts";
import { COMMANDS, type Outcome } from "../support/run-command.ts";

/** Commands that take a CIF. */
const ASKED = COMMANDS.filter((name) => name !== "point" && name !== "compose");

/** Longest time for one command on one file, seconds: the slowest needs a tenth of it. */
const LONGEST = 20;

/** What no answer may hold: numbers that are none, a zero with a sign, a stack. */
const RUBBISH =
  /\bNaN\b|\bundefined\b|\bnull\b|\bInfinity\b|\[object|(?<![\w.,()])-0(?:\.0+)?(?![\w./])|^\s+at .*:\d+:\d+/m;

describe("what passes for rubbish", () => {
  it.each([
    ["x -0.000 y", true],
    ["-0", true],
    ["value NaN", true],
    ["    at f (file.js:1:2)", true],
    ["-0.05 0.000 1-0.5", false],
    ["x-0,y", false],
    ["-03m", false],
  ])("%j: %s", (text, rubbish) => expect(RUBBISH.test(text)).toBe(rubbish));
});

const validate = validatorOf(closedSchema());
const commands = new BuiltCommands();
afterAll(() => commands.remove());

/** What is wrong with an answer or a refusal. */
function faults(name: string, { status, out, err }: Outcome): string[] {
  const odd = RUBBISH.exec(err);
  if (odd) return [`says "${odd[0]}": ${err}`];
  if (status === 3) return out === "" && /\S.*\n/.test(err) ? [] : ["refuses without a word"];
  if (status !== 0 && !(status === 1 && name === "vet")) return [`ends with status ${status}: ${err}`];
  if (out.startsWith("{")) return faultsOf(validate, JSON.parse(out));
  const rubbish = RUBBISH.exec(out);
  return rubbish ? [`prints "${rubbish[0]}"`] : [];
}

/** Text of one half of the files and JSON of the other, by turns. */
async function faultsIn(path: string, name: string): Promise<string[]> {
  const turn = CORPUS_FILES.indexOf(path) + ASKED.indexOf(name);
  const started = performance.now();
  const found = faults(name, await commands.run(name, [join(CORPUS, path), ...(turn % 2 === 0 ? [] : ["--json"])]));
  const seconds = (performance.now() - started) / 1000;
  if (seconds > LONGEST) found.push(`takes ${seconds.toFixed(1)} s`);
  return found.map((fault) => `${path}: ${fault}`);
}

if (CORPUS_FILES.length > 0) {
  describe("every file of the corpus", () => {
    it.each(ASKED)("is answered or refused in so many words by %s", async (name) => {
      const found: string[] = [];
      for (const path of CORPUS_FILES) found.push(...(await faultsIn(path, name)));
      expect(found).toEqual([]);
    });
  });
} else {
  describe("the corpus", () => {
    it("is not beside this repository, so no command was tried on it", () => expect(ASKED).toContain("sites"));
  });
}
