import { type IntMat3, modOne, type RatVec3, ratVec3 } from "../algebra/index.ts";

/** Rows of a triplet in plain spelling: coefficients of the letters, and constants. */
export interface PlainTriplet {
  readonly W: IntMat3;
  readonly w: RatVec3;
}

/** Constants are collected over this denominator; a fraction that does not fit is left to the grammar. */
const DENOMINATOR = 24;

/**
 * Reads an operation in the spelling that nearly all files use, `-x,y+1/2,-z`, in one pass over its characters: letters
 * once each in a row, signs, fractions of 24, blanks. Null for anything else, faults included, which the grammar then
 * reads or refuses. Files list up to 192 operations, and the grammar takes ten times as long.
 * @returns w reduced to [0, 1)
 */
export function plainOperation(text: string): PlainTriplet | null {
  const plain = plainTriplet(text);
  return plain && { W: plain.W, w: modOne(plain.w) };
}

/** The same for any triplet of that spelling, a row of 0 included; its constants are not reduced. */
export function plainTriplet(text: string): PlainTriplet | null {
  const W = [0, 0, 0, 0, 0, 0, 0, 0, 0];
  const w = [0, 0, 0];
  let row = 0;
  let sign = 0; // 0: none waiting; a term needs one but at the start of a row
  let started = false;
  for (let i = 0; i < text.length; i++) {
    const c = text.charCodeAt(i) | 0x20;
    if (c === 0x20) continue; // blank (and NUL, which no value holds)
    if (c === 0x78 || c === 0x79 || c === 0x7a) {
      const at = 3 * row + c - 0x78;
      if ((started && sign === 0) || W[at] !== 0) return null;
      W[at] = sign || 1;
      [sign, started] = [0, true];
    } else if (text[i] === "+" || text[i] === "-") {
      if (sign !== 0) return null;
      sign = text[i] === "+" ? 1 : -1;
    } else if (text[i] === ",") {
      if (!started || sign !== 0 || row === 2) return null;
      row++;
      started = false;
    } else {
      const m = FRACTION.exec(text.slice(i, i + 6));
      const n = m ? (Number(m[1] ?? 0) * DENOMINATOR) / Number(m[2] ?? 1) : Number.NaN;
      if (!Number.isInteger(n) || (started && sign === 0)) return null;
      w[row]! += (sign || 1) * n;
      i += m![0].length - 1;
      [sign, started] = [0, true];
    }
  }
  if (row !== 2 || !started || sign !== 0) return null;
  return { W: W as unknown as IntMat3, w: ratVec3([w[0]!, w[1]!, w[2]!], DENOMINATOR) };
}

const FRACTION = /^(?:([1-9]\d?)\/([1-9]\d?)|0)(?![\d./])/;
