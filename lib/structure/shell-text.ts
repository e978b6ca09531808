import { InputProblem } from "../problem.ts";

/** Which centres are meant, and how far their neighbours may be. */
export interface ShellPattern {
  /** An element, or the label of a site. */
  readonly centre: string;
  /** Neighbours are nearer than this, angstrom; null where the first shell is looked for. */
  readonly below: number | null;
}

const PATTERN = /^\s*(?:"([^"]+)"|([^\s<"]+))\s*(?:<\s*(\d+(?:\.\d*)?|\.\d+)\s*)?$/;

/**
 * Reads `Ti`, `Ti1`, `K<3.2`; a label that holds `<` or blanks stands in quotes.
 * @throws InputProblem `polyhedron-unreadable`
 */
export function parseShellPattern(text: string): ShellPattern {
  const match = PATTERN.exec(text);
  const centre = match?.[1] ?? match?.[2];
  if (!match || centre === undefined) {
    throw new InputProblem(
      "polyhedron-unreadable",
      `"${text}" names no coordination polyhedron`,
      { start: 0, end: text.length },
      'write an element or a label, with a largest distance if you like: Ti, Si1, "K<3.2"',
    );
  }
  return { centre, below: match[3] === undefined ? null : Number(match[3]) };
}

/** Inverse of parseShellPattern. */
export function formatShellPattern({ centre, below }: ShellPattern): string {
  const name = /[\s<]/.test(centre) ? `"${centre}"` : centre;
  return below === null ? name : `${name}<${below}`;
}
