import { execFileSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";

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
