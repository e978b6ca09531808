import { build } from "esbuild";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { installPacked, type Packed } from "./packed.ts";

let packed: Packed;
beforeAll(() => {
  packed = installPacked();
});
afterAll(() => packed.remove());

/** Bundles a consumer; the files of the package, and the packages, that left code in the result. */
async function bundled(contents: string): Promise<{ files: string[]; text: string }> {
  const { metafile, outputFiles } = await build({
    stdin: { contents, resolveDir: packed.folder },
    absWorkingDir: packed.folder,
    bundle: true,
    format: "esm",
    write: false,
    metafile: true,
    minifySyntax: true,
    preserveSymlinks: true, // dependencies are linked; they keep the names they have here
  });
  const [output] = Object.values(metafile.outputs);
  const used = Object.entries(output!.inputs).filter(([, input]) => input.bytesInOutput > 0);
  const files = used.map(([path]) => path.replace(/^node_modules\/(?:sitefold\/dist\/)?/, ""));
  return { files: files.filter((f) => f !== "<stdin>").sort(), text: outputFiles[0]!.text };
}

const roomsOf = (files: readonly string[]) =>
  [...new Set(files.map((f) => f.replace(/^lib\//, "").split("/")[0]!))].sort();

describe("a bundle of one call", () => {
  it("to the algebra holds the algebra alone", async () => {
    const { files } = await bundled(`import { rational } from "sitefold/algebra"; console.log(rational(2, 4));`);
    expect(files).toEqual(["lib/algebra/rational.js"]);
  });

  it("to the CIF reader holds no other room and no grammar library", async () => {
    const { files, text } = await bundled(`import { readCif } from "sitefold/cif"; console.log(readCif("data_a"));`);
    expect(roomsOf(files)).toEqual(["cif", "problem.js"]);
    expect(text).not.toMatch(/determinant|parsimmon/i);
  });

  it("to the reading of operations leaves the tables of the 230 types out", async () => {
    const { files, text } = await bundled(
      `import { parseOperation } from "sitefold/symmetry"; console.log(parseOperation("x,y,z"));`,
    );
    expect(roomsOf(files)).toEqual(["algebra", "parsimmon", "problem.js", "symmetry"]);
    expect(files.filter((f) => f.includes("/tables/"))).toEqual([]);
    expect(text.length).toBeLessThan(80_000); // three fifths of it parsimmon; a table would add as much again
  });
});
