import { execFileSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";
import { modesAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

const root = fileURLToPath(new URL("../..", import.meta.url));
const readme = readFileSync(new URL("../../README.md", import.meta.url), "utf8");

it("shows the real output of its example", () => {
  const [, line = "", shown = ""] = /\n\$ sitefold (.*)\n([\s\S]*?)\n```/.exec(readme)!;
  const output = execFileSync(process.execPath, ["dist/bin/main.js", ...line.split(" ")], {
    cwd: root,
    encoding: "utf8",
  });
  expect(shown.trimEnd()).toBe(output.trimEnd());
});

it("names every command", () => {
  for (const file of readdirSync(new URL("../../bin/commands", import.meta.url))) {
    expect(readme).toContain(`\n| \`${file.replace(".ts", "")} `);
  }
});

it("uses names of the library that are there, with the fields that its example reads", () => {
  const { irreps, totals } = modesAnswer(fixture("calcite"));
  expect(irreps.map((s) => `${s.optic} ${s.label}`).join(" + ")).toContain("1 A1g + 3 A2g");
  expect(totals.ramanBands).toBe(5);
  const names = /import \{ ([^}]*) \} from "sitefold"/.exec(readme)![1]!.split(", ");
  const face = readFileSync(new URL("../../lib/index.ts", import.meta.url), "utf8");
  for (const name of names) expect(face).toMatch(new RegExp(`\\b${name}\\b`));
});
