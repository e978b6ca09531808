/** Longest name of a block in CIF 1.1 is 75 characters. */
const LONGEST = 75;

/** A name as a data block can have it: printable characters without blanks, and the ending. */
export function blockName(name: string, ending: string): string {
  const plain = name.replace(/[^\x21-\x7e]+/g, "_").slice(0, LONGEST - ending.length);
  return `${plain || "structure"}${ending}`;
}
