/** Windows-1252 in 0x80 to 0x9F, where Latin-1 has control characters; five of its places are empty and stay controls. */
const HIGH_CONTROLS = "€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ";

/**
 * Text of a CIF file: UTF-8 with or without a byte-order mark (which is dropped), or, if the bytes are not UTF-8,
 * Latin-1 in its extension Windows-1252, as browsers read it.
 */
export function decodeCif(bytes: Uint8Array): { text: string; encoding: "utf-8" | "latin-1" } {
  try {
    return { text: new TextDecoder("utf-8", { fatal: true }).decode(bytes), encoding: "utf-8" };
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return { text: decodeLatin1(bytes), encoding: "latin-1" };
  }
}

const CHUNK = 8192;

function decodeLatin1(bytes: Uint8Array): string {
  const parts: string[] = [];
  for (let from = 0; from < bytes.length; from += CHUNK) {
    const codes = Array.from(bytes.subarray(from, from + CHUNK), (byte) =>
      byte >= 0x80 && byte < 0xa0 ? HIGH_CONTROLS.charCodeAt(byte - 0x80) : byte,
    );
    parts.push(String.fromCharCode(...codes));
  }
  return parts.join("");
}
