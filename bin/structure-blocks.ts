import { type CifBlock, findLoop, findValue } from "../lib/cif/index.ts";
import type { Arguments } from "./arguments.ts";
import { chooseBlock, type Source } from "./input.ts";

/**
 * The block that --block names; else every block with a cell and atoms; else the first of the file.
 * @throws LocatedProblem if there is none
 */
export function structureBlocks(source: Source, args: Arguments): readonly CifBlock[] {
  if (args.text("block") !== null) return [chooseBlock(source, args).block];
  const found = source.document.blocks.filter(
    (b) => findValue(b, "_cell.length_a") !== null && findLoop(b, "_atom_site.label") !== null,
  );
  return found.length > 0 ? found : [chooseBlock(source, args).block];
}
