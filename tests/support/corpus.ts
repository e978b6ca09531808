import { existsSync, readdirSync } from "node:fs";
import { join } from "node:path";

/** Files of open collections, unchanged; beside the repository where they are present, and no part of it. */
export const CORPUS: string = join(import.meta.dirname, "../../../shared/corpus");

/** Paths within the corpus, with slashes; none where it is absent. */
export const CORPUS_FILES: readonly string[] = existsSync(CORPUS)
  ? readdirSync(CORPUS, { recursive: true, encoding: "utf8" })
      .map((path) => path.replaceAll("\\", "/"))
      .filter((path) => path.endsWith(".cif"))
      .sort()
  : [];
