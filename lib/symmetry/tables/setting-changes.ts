/**
 * Changes of basis that lead from the reference setting to the conventional other ones, `new axes in terms of old`.
 *
 * Source: International Tables for Crystallography A (2016), section 1.5.1 (tables of transformations) and 1.5.4
 * (headings of the table of extended symbols), from memory; tests check every symbol that results.
 */

/** Monoclinic cell choices for unique axis b, then the axes for each unique axis; choices apply first. */
export const CELL_CHOICES = { 1: "a,b,c", 2: "-a-c,b,a", 3: "c,b,-a-c" } as const;
export const UNIQUE_AXES = {
  b: "a,b,c",
  "-b": "c,-b,a",
  c: "c,a,b",
  "-c": "a,c,-b",
  a: "b,c,a",
  "-a": "-b,a,c",
} as const;

/** The six orders of orthorhombic axes by their usual names. */
export const AXIS_ORDERS = {
  abc: "a,b,c",
  "ba-c": "b,a,-c",
  cab: "c,a,b",
  "-cba": "-c,b,a",
  bca: "b,c,a",
  "a-cb": "a,-c,b",
} as const;

/** Larger cells that are in use beside the primitive or body-centred one, by their centring. */
export const TRICLINIC_CELLS = {
  A: "a,b-c,b+c",
  B: "a-c,b,a+c",
  C: "a-b,a+b,c",
  I: "b+c,a+c,a+b",
  F: "-a+b+c,a-b+c,a+b-c",
} as const;
export const TETRAGONAL_CELL = "a-b,a+b,c";
export const TRIPLE_HEXAGONAL_CELL = "a-b,a+2b,c";

/** Rhombohedral axes in terms of hexagonal ones in obverse setting, and the reverse hexagonal setting. */
export const RHOMBOHEDRAL_AXES = "2/3a+1/3b+1/3c,-1/3a+1/3b+1/3c,-1/3a-2/3b+1/3c";
export const REVERSE_SETTING = "-a,-b,c";

/** The cubic setting turned by 90 degrees, where it changes the symbol: P b -3 for P a -3. */
export const TURNED_CUBIC = "b,a,-c";

/** Origin choice 1 seen from origin choice 2, in eighths of the axes, for the 24 types that have both. */
export const FIRST_ORIGINS: Readonly<Record<number, readonly [number, number, number]>> = {
  48: [2, 2, 2],
  50: [2, 2, 0],
  59: [2, 2, 0],
  68: [0, 2, 2],
  70: [-1, -1, -1],
  85: [-2, 2, 0],
  86: [-2, -2, -2],
  88: [0, -2, -1],
  125: [-2, -2, 0],
  126: [-2, -2, -2],
  129: [-2, 2, 0],
  130: [-2, 2, 0],
  133: [-2, 2, -2],
  134: [-2, 2, -2],
  137: [-2, 2, -2],
  138: [-2, 2, -2],
  141: [0, 2, -1],
  142: [0, 2, -1],
  201: [-2, -2, -2],
  203: [-1, -1, -1],
  222: [-2, -2, -2],
  224: [-2, -2, -2],
  227: [-1, -1, -1],
  228: [-3, -3, -3],
};
