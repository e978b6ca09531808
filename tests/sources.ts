import { readdirSync, readFileSync } from "node:fs";
import { posix } from "node:path";
import { fileURLToPath } from "node:url";

/** Path from the root of the repository, with slashes, to the text of the file. */
export type Sources = ReadonlyMap<string, string>;

const ROOT = fileURLToPath(new URL("..", import.meta.url));

/** All TypeScript files under the folders named, by path. */
export function readSources(...folders: readonly string[]): Map<string, string> {
  const found = new Map<string, string>();
  for (const folder of folders) {
    for (const file of readdirSync(ROOT + folder, { recursive: true, encoding: "utf8" })) {
      const path = `${folder}/${file.replaceAll("\\", "/")}`;
      if (path.endsWith(".ts")) found.set(path, readFileSync(ROOT + path, "utf8"));
    }
  }
  return found;
}

/** One import or re-export of a file. */
export interface Import {
  readonly from: string;
  /** The path from the root for a relative import, else the name of the package. */
  readonly to: string;
  readonly typeOnly: boolean;
}

const IMPORT =
  /(?:^|[\n;])\s*(import|export)\s+(?:(type)\s+(?!from\b))?(?:[\w*${}\s,]*?\bfrom\s*)?"([^"\n]+)"|\bimport\(\s*[`"]([^`"\n]+)[`"]/g;

/** Everything a file takes from elsewhere: static, dynamic, and `import("...")` in a type. */
export function importsOf(path: string, text: string): Import[] {
  const code = text.replace(/\/\*[\s\S]*?\*\/|^\s*\/\/.*$/gm, "");
  return [...code.matchAll(IMPORT)].map(([, , type, fixed, dynamic]) => {
    const name = fixed ?? dynamic!;
    const to = name.startsWith(".") ? posix.join(posix.dirname(path), name) : name;
    return { from: path, to, typeOnly: type !== undefined };
  });
}
