import { writeSync } from "node:fs";

let print: (text: string) => void = writeDirectly;

/** Writes to standard output. */
export function printOut(text: string): void {
  print(text);
}

/** Sends output elsewhere, as a caller in the same process may want; the function returned sends it back. */
export function redirectOutput(to: (text: string) => void): () => void {
  const before = print;
  print = to;
  return () => {
    print = before;
  };
}

/**
 * Writes at once where it can: Node's stream for standard output costs a twentieth of a bare start. A full pipe is left to
 * the stream, which waits; a closed one ends the program in silence, as `| head` expects.
 */
function writeDirectly(text: string): void {
  const bytes = Buffer.from(text, "utf8");
  let done = 0;
  try {
    while (done < bytes.length) done += writeSync(1, bytes, done);
  } catch (e) {
    const { code } = e as NodeJS.ErrnoException;
    if (code === "EPIPE") process.exit(0);
    if (code !== "EAGAIN") throw e;
    process.stdout.on("error", (late: NodeJS.ErrnoException) => process.exit(late.code === "EPIPE" ? 0 : 3));
    process.stdout.write(bytes.subarray(done));
  }
}
