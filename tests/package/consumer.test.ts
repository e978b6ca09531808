import { execFileSync } from "node:child_process";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { compile, installPacked, MANIFEST, type Packed } from "./packed.ts";

const RESOLUTIONS = [
  { module: "node16", moduleResolution: "node16" },
  { module: "esnext", moduleResolution: "bundler" },
];
const MODULES = Object.entries(MANIFEST.exports).filter(([path]) => !path.endsWith(".json"));
const PATHS = MODULES.map(([path]) => path).map((path) => path.replace(/^\./, "sitefold"));

const CONSUMER = `
import { formatRational, rational } from "sitefold/algebra";
import { closeGroup, formatOperation, type Operation, parseOperation } from "sitefold/symmetry";
${PATHS.map((path, i) => `import * as p${i} from ${JSON.stringify(path)};`).join("\n")}

const glide: Operation = parseOperation("x,-y+1/2,z+.5");
const group: Operation[] = closeGroup([glide, parseOperation("-x,-y,-z")]);
export const names: string[] = [${PATHS.map((_, i) => `...Object.keys(p${i})`).join(", ")}];
export const answer: string = group.map(formatOperation).join(" ") + " " + formatRational(rational(2, 4));
`;

const RUN = `import { answer, names } from "./out/consumer.js"; process.stdout.write(answer + " " + names.length);`;

let packed: Packed;
beforeAll(() => {
  packed = installPacked();
  writeFileSync(join(packed.folder, "consumer.ts"), CONSUMER);
});
afterAll(() => packed.remove());

describe("the packed package", () => {
  it("holds what is built, the licence and the readme, and nothing else", () => {
    expect(packed.files).toContain("package.json");
    expect(packed.files).toContain("LICENSE");
    expect(packed.files).toContain("dist/bin/LICENCES.txt");
    const odd = packed.files.filter((f) => !/^(?:dist\/|package\.json$|LICENSE$|README\.md$|CHANGELOG\.md$)/.test(f));
    expect(odd).toEqual([]);
    expect(packed.files.filter((f) => /\.ts$/.test(f) && !/^dist\/lib\/.*\.d\.ts$/.test(f))).toEqual([]);
  });

  it("names no folder of the machine that built it", () => {
    const text = packed.files.filter((f) => /\.(?:js|ts|json|txt)$/.test(f));
    expect(text.filter((f) => readFileSync(join(packed.home, f), "utf8").includes(process.cwd()))).toEqual([]);
  });

  it("has a file behind every export, types first", () => {
    for (const [, target] of MODULES) {
      expect(Object.keys(target)).toEqual(["types", "default"]);
      for (const file of Object.values(target)) {
        expect(existsSync(join(packed.home, file)), file).toBe(true);
      }
    }
  });

  it("ships the schema of its JSON answers", () => {
    const read = 'process.stdout.write(require("sitefold/schema.json").$defs.sites.type)';
    expect(execFileSync(process.execPath, ["-e", read], { cwd: packed.folder, encoding: "utf8" })).toBe("object");
  });

  it("exports every room of lib/ that has results to offer", () => {
    const rooms = packed.files.flatMap((f) => /^dist\/lib\/([a-z]+)\/index\.js$/.exec(f)?.[1] ?? []);
    expect(rooms.filter((room) => !(`./${room}` in MANIFEST.exports))).toEqual([]);
  });

  it.each(RESOLUTIONS)("compiles in a strict project with %j and runs", (options) => {
    expect(compile(packed.folder, options, ["consumer.ts"])).toEqual({ status: 0, output: "" });
    writeFileSync(join(packed.folder, "run.js"), RUN);
    const printed = execFileSync(process.execPath, ["run.js"], { cwd: packed.folder, encoding: "utf8" });
    expect(printed).toMatch(/^x,y,z x,-y\+1\/2,z\+1\/2 -x,-y,-z -x,y\+1\/2,-z\+1\/2 1\/2 \d+$/);
  });

  it("has types that notice misuse", () => {
    writeFileSync(
      join(packed.folder, "misuse.ts"),
      `import { parseOperation } from "sitefold/symmetry";
       parseOperation("x,y,z").W[0] = 2;
       parseOperation(3);`,
    );
    const { status, output } = compile(packed.folder, RESOLUTIONS[0]!, ["misuse.ts"]);
    expect(status).not.toBe(0);
    expect(output).toContain("misuse.ts(2");
    expect(output).toContain("misuse.ts(3");
  });

  it("keeps its inside to itself", () => {
    const inside = `import "sitefold/lib/algebra/rational.js";`;
    expect(() =>
      execFileSync(process.execPath, ["--input-type=module", "-e", inside], { cwd: packed.folder, stdio: "pipe" }),
    ).toThrow(/ERR_PACKAGE_PATH_NOT_EXPORTED/);
  });
});
