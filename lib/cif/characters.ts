/** Character classes of CIF, as code units. */

export const TAB = 9;
export const LINE_FEED = 10;
export const VERTICAL_TAB = 11;
export const FORM_FEED = 12;
export const CARRIAGE_RETURN = 13;
export const SPACE = 32;
export const DOUBLE_QUOTE = 34;
export const HASH = 35;
export const DOLLAR = 36;
export const SINGLE_QUOTE = 39;
export const COLON = 58;
export const SEMICOLON = 59;
export const LEFT_BRACKET = 91;
export const RIGHT_BRACKET = 93;
export const UNDERSCORE = 95;
export const LEFT_BRACE = 123;
export const RIGHT_BRACE = 125;
export const BYTE_ORDER_MARK = 0xfeff;

/** Everything up to the space separates; control characters among it are reported elsewhere, as `forbidden-character`. */
export function isBlank(code: number): boolean {
  return code <= SPACE;
}

/** LF, CR, and the form feed, which files older than CIF 1.1 use as a line end. */
export function isLineEnd(code: number): boolean {
  return code === LINE_FEED || code === CARRIAGE_RETURN || code === FORM_FEED;
}

/** Offset of the next line end at or after `from`, or the length of the text. */
export function lineEndFrom(source: string, from: number): number {
  let at = from;
  while (at < source.length && !isLineEnd(source.charCodeAt(at))) at++;
  return at;
}

/** Offset of the next blank at or after `from`, or the length of the text. */
export function blankFrom(source: string, from: number): number {
  let at = from;
  while (at < source.length && source.charCodeAt(at) > SPACE) at++;
  return at;
}

/** True if a line end lies in [start, end). */
export function hasLineEnd(source: string, start: number, end: number): boolean {
  for (let at = start; at < end; at++) if (isLineEnd(source.charCodeAt(at))) return true;
  return false;
}

/** True at the first character of a line. */
export function isLineStart(source: string, at: number): boolean {
  if (at === 0) return true;
  const before = source.charCodeAt(at - 1);
  return isLineEnd(before) || (at === 1 && before === BYTE_ORDER_MARK);
}

export function isCloser(code: number): boolean {
  return code === RIGHT_BRACKET || code === RIGHT_BRACE;
}
