import { spawnSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { build } from "esbuild";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));

/** A piece of TypeScript in a docstring or in the README. */
export interface Example {
  /** `lib/structure/crystal.ts:12` */
  readonly place: string;
  readonly code: string;
}

/** Every fenced piece of TypeScript in the docstrings of lib/ and in the README. */
export function documentedExamples(): Example[] {
  const files = readdirSync(join(ROOT, "lib"), { recursive: true, encoding: "utf8" })
    .map((path) => `lib/${path.replaceAll("\\", "/")}`)
    .filter((path) => path.endsWith(".ts"))
    .sort();
  return [...files, "README.md"].flatMap((path) => examplesIn(path, readFileSync(join(ROOT, path), "utf8")));
}

/** Examples in a text; in a docstring the stars at the beginnings of lines are no part of them. */
export function examplesIn(path: string, text: string): Example[] {
  return [...text.matchAll(/^( *\* |)```ts\n([\s\S]*?)^\1```$/gm)].map((m) => ({
    place: `${path}:${text.slice(0, m.index).split("\n").length}`,
    code: m[2]!
      .split("\n")
      .map((line) => line.replace(/^ *\* ?/, m[1] ? "" : "$&"))
      .join("\n"),
  }));
}

/** Statements with the value that a comment behind them promises, or null. */
export interface Statement {
  readonly code: string;
  readonly value: string | null;
}

/** A statement ends with a semicolon outside brackets; `// value` behind it tells what it gives. */
export function statementsOf(code: string): Statement[] {
  const found: Statement[] = [];
  let lines: string[] = [];
  for (const line of code.split("\n")) {
    if (/^\s*(?:\/\/.*)?$/.test(line)) continue;
    const [, bare = "", value] = commented(line, lines.join("\n")) ?? [null, line];
    lines.push(bare);
    const text = lines.join("\n");
    if (!/;\s*$/.test(bare) || depth(text) !== 0) continue;
    found.push({ code: text, value: value ?? null });
    lines = [];
  }
  if (lines.length > 0) throw new Error(`unfinished: ${lines.join("\n")}`);
  return found;
}

/** Line and comment, unless the slashes stand in a string, which may have begun before. */
function commented(line: string, before: string): RegExpExecArray | null {
  const m = /^(.*?;)\s*\/\/ (.*)$/.exec(line);
  return m && (`${before}${m[1]}`.match(/["'`]/g) ?? []).length % 2 === 0 ? m : null;
}

function depth(text: string): number {
  const bare = text.replace(/"(?:[^"\\]|\\.)*"|'(?:[^'\\]|\\.)*'|`(?:[^`\\]|\\.)*`/gs, '""');
  return [...bare].reduce((d, c) => d + ("([{".includes(c) ? 1 : ")]}".includes(c) ? -1 : 0), 0);
}

/** The example as a module that checks what it promises: `check(place, value, promised)` is called for each comment. */
export function moduleOf({ place, code }: Example, names: ReadonlyMap<string, string>): string {
  const statements = statementsOf(code);
  const used = new Set(code.match(/[A-Za-z_]\w*/g));
  const own = /^import /m.test(code);
  const imports = own ? [] : [...names].filter(([name]) => used.has(name)).map(([name, room]) => [room, name]);
  const rooms = new Set(imports.map(([room]) => room!));
  const head = [...rooms].map((room) => {
    const list = imports.filter((e) => e[0] === room).map((e) => e[1]);
    return `import { ${list.join(", ")} } from "${room}";`;
  });
  const body = statements.map(({ code: statement, value }) => {
    if (value === null) return statement;
    const declared = /^(?:const|let) (\w+)/.exec(statement);
    const printed = /^console\.log\(([\s\S]*)\);$/.exec(statement);
    if (printed) return `check([${printed[1]}].join(" "), ${JSON.stringify(value)});`;
    if (declared) return `${statement}\ncheck(${declared[1]}, ${value});`;
    return `check(${statement.replace(/;$/, "")}, ${value});`;
  });
  return [
    ...(own ? body.filter((s) => s.startsWith("import ")) : head),
    `export const place: string = ${JSON.stringify(place)};`,
    "export function run(check: (found: unknown, promised: unknown) => void, text: string): void {",
    ...body.filter((s) => !s.startsWith("import ")),
    "check(text, text);",
    "}",
    "",
  ].join("\n");
}

/** Names that the rooms of lib/ export, each with the module a user has it from; lower rooms do not hide higher ones. */
export function exportedNames(): Map<string, string> {
  const names = new Map<string, string>();
  const rooms = ["report", "audit", "vibrations", "structure", "symmetry", "representation", "algebra", "cif"];
  for (const room of [...rooms.reverse(), ""]) {
    const text = readFileSync(join(ROOT, "lib", room, "index.ts"), "utf8");
    for (const [, list = ""] of text.matchAll(/export (?:type )?\{([^}]*)\} from/g)) {
      for (const name of list.split(",")) {
        const plain = name.trim().replace(/^type /, "");
        if (plain !== "" && !name.includes("type ") && !(room === "" && names.has(plain))) {
          names.set(plain, room === "" ? "sitefold" : `sitefold/${room}`);
        }
      }
    }
  }
  return names;
}

/** What an example became: faults of the compiler, and a function that runs it. */
export interface CompiledExamples {
  readonly faults: string;
  readonly run: readonly ((check: (found: unknown, promised: unknown) => void, text: string) => void)[];
}

/** Type-checks all examples at once, as a strict user would have them, and bundles them. */
export async function compiled(examples: readonly Example[]): Promise<CompiledExamples> {
  const folder = mkdtempSync(join(tmpdir(), "sitefold-examples-"));
  try {
    const names = exportedNames();
    examples.forEach((e, i) => {
      writeFileSync(join(folder, `example${i}.ts`), moduleOf(e, names));
    });
    const all = examples.map((_, i) => `export * as e${i} from "./example${i}.ts";`).join("\n");
    writeFileSync(join(folder, "all.ts"), `${all}\n`);
    writeFileSync(join(folder, "tsconfig.json"), JSON.stringify(configuration()));
    const rooms = Object.fromEntries(modulePaths().map(([name, path]) => [name, path]));
    const bundle = join(folder, "all.mjs");
    await build({
      entryPoints: [join(folder, "all.ts")],
      bundle: true,
      format: "esm",
      alias: rooms,
      outfile: bundle,
      nodePaths: [join(ROOT, "node_modules")],
    });
    const module = (await import(pathToFileURL(bundle).href)) as Record<
      string,
      { run: CompiledExamples["run"][number] }
    >;
    return { faults: typeFaults(folder), run: examples.map((_, i) => module[`e${i}`]!.run) };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Longer names first, since an alias takes what begins with it. */
function modulePaths(): [string, string][] {
  const { exports } = JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8")) as { exports: object };
  return Object.keys(exports)
    .filter((key) => !key.endsWith(".json"))
    .map((key): [string, string] => [`sitefold${key.slice(1)}`, join(ROOT, "lib", key.slice(1), "index.ts")])
    .sort((a, b) => b[0].length - a[0].length);
}

function configuration(): object {
  const { compilerOptions } = JSON.parse(readFileSync(join(ROOT, "tsconfig.json"), "utf8"));
  const paths = Object.fromEntries(modulePaths().map(([name, path]) => [name, [path]]));
  const types = [join(ROOT, "node_modules", "@types", "node"), join(ROOT, "node_modules", "@types", "parsimmon")];
  return {
    compilerOptions: {
      ...compilerOptions,
      module: "esnext",
      moduleResolution: "bundler",
      paths,
      types,
      noUnusedLocals: false,
    },
    include: ["*.ts"],
  };
}

function typeFaults(folder: string): string {
  const require = createRequire(import.meta.url);
  const manifest = require.resolve("typescript/package.json");
  const tsc = join(dirname(manifest), require(manifest).bin.tsc);
  const { stdout } = spawnSync(process.execPath, [tsc, "--noEmit", "-p", folder], { encoding: "utf8" });
  return stdout;
}
