/**
 * Factor-group results as printed in papers on lattice vibrations, one entry per fixture. Written from memory of the works
 * named; no program computed any of it. Entries with `byHand` recall only part of the printed sum (mostly the active species
 * or the number of bands); the rest was worked out on paper. `doubt` says what is not firm. A disagreement is to be reported,
 * never repaired by editing an entry to fit.
 */

/** A published reduction of the modes at k = 0. Sums are written as papers write them: `A1g + 3A2g + 4Eg`. */
export interface PublishedSpecies {
  /** File name in fixtures/, without `.cif`. */
  readonly fixture: string;
  /** Axes to which the published labels refer. */
  readonly axes: string;
  /** All modes, acoustic ones included. */
  readonly total?: string;
  readonly acoustic?: string;
  readonly optic?: string;
  /** Optic species with infrared activity only, where the paper names no others. */
  readonly infrared?: string;
  /** Species with Raman activity only, where the paper names no others. */
  readonly raman?: string;
  /** Number of infrared bands; a degenerate species counts once. */
  readonly infraredBands: number;
  readonly ramanBands: number;
  /**
   * Published label to the label in the axes of the fixture's own cell (axes as in the conventions of this project: in
   * D2h B1 to c, B2 to b, B3 to a; in D6h C2' along [100]). Absent where they are the same. Argued by hand.
   */
  readonly relabel?: Readonly<Record<string, string>>;
  /**
   * `labels`: compare species by species. `numbers`: the axes of the labels are not remembered, so compare only how many
   * species of each kind occur how often, B1, B2 and B3 being interchangeable.
   */
  readonly compare: "labels" | "numbers";
  /** Part of the sum is not remembered as printed, but worked out on paper. */
  readonly byHand?: true;
  readonly source: string;
  readonly doubt?: string;
}

/** Multiplicity by species of a sum such as `A1g + 3A2g + 4Eg`; the empty string is the empty sum. */
export function parseSum(text: string): Readonly<Record<string, number>> {
  const sum: Record<string, number> = {};
  for (const term of text.split("+").map((t) => t.trim())) {
    if (term === "") continue;
    const match = /^(\d*)([ABET][0-9]*[gu]?['"]*)$/.exec(term);
    if (!match) throw new Error(`not a term of a sum of species: ${term}`);
    const [, count, label] = match;
    sum[label!] = (sum[label!] ?? 0) + (count === "" ? 1 : Number(count));
  }
  return sum;
}

const CALCITE = {
  axes: "trigonal, z along c; C2' along a",
  total: "A1g + 2A1u + 3A2g + 4A2u + 4Eg + 6Eu",
  acoustic: "A2u + Eu",
  optic: "A1g + 3A2g + 4Eg + 2A1u + 3A2u + 5Eu",
  infraredBands: 8,
  ramanBands: 5,
  compare: "labels",
} as const;

const CORUNDUM = {
  axes: "trigonal, z along c; C2' along a",
  acoustic: "A2u + Eu",
  optic: "2A1g + 2A1u + 3A2g + 2A2u + 5Eg + 4Eu",
  infraredBands: 6,
  ramanBands: 7,
  compare: "labels",
} as const;

/** Cyclic change from the axes of Pnma to those of Pmcn: a(Pmcn) = b(Pnma), b(Pmcn) = c(Pnma), c(Pmcn) = a(Pnma). */
const PNMA_TO_PMCN = { B1g: "B2g", B2g: "B3g", B3g: "B1g", B1u: "B2u", B2u: "B3u", B3u: "B1u" } as const;

/** Cyclic change from the axes of Pbnm to those of Pnma: a(Pnma) = b(Pbnm), b(Pnma) = c(Pbnm), c(Pnma) = a(Pbnm). */
const PBNM_TO_PNMA = PNMA_TO_PMCN;

const ARAGONITE = {
  axes: "mirror plane normal to y: x, y, z along a, b, c of Pnma",
  total: "9Ag + 6B1g + 9B2g + 6B3g + 6Au + 9B1u + 6B2u + 9B3u",
  acoustic: "B1u + B2u + B3u",
  optic: "9Ag + 6B1g + 9B2g + 6B3g + 6Au + 8B1u + 5B2u + 8B3u",
  infraredBands: 21,
  ramanBands: 30,
  relabel: PNMA_TO_PMCN,
  compare: "labels",
} as const;

const BARITE = {
  axes: "x, y, z along a, b, c of Pnma",
  total: "11Ag + 7B1g + 11B2g + 7B3g + 7Au + 11B1u + 7B2u + 11B3u",
  acoustic: "B1u + B2u + B3u",
  optic: "11Ag + 7B1g + 11B2g + 7B3g + 7Au + 10B1u + 6B2u + 10B3u",
  infraredBands: 26,
  ramanBands: 36,
  compare: "labels",
} as const;

const RUTILE = {
  axes: "z along c, x and y along the tetragonal a axes: x2 - y2 is B1g, xy is B2g",
  acoustic: "A2u + Eu",
  optic: "A1g + A2g + A2u + B1g + B2g + 2B1u + Eg + 3Eu",
  infraredBands: 4,
  ramanBands: 4,
  compare: "labels",
} as const;

const SCHEELITE = {
  axes: "z along c",
  total: "3Ag + 5Bg + 5Eg + 5Au + 3Bu + 5Eu",
  acoustic: "Au + Eu",
  optic: "3Ag + 5Bg + 5Eg + 4Au + 3Bu + 4Eu",
  infraredBands: 8,
  ramanBands: 13,
  compare: "labels",
} as const;

const WURTZITE = {
  axes: "z along c; the mirror planes of P63mc, normal to a, are the planes sigma_v",
  acoustic: "A1 + E1",
  optic: "A1 + 2B1 + E1 + 2E2",
  infraredBands: 2,
  ramanBands: 4,
  compare: "labels",
} as const;

const BRUCITE = {
  axes: "z along c",
  total: "2A1g + 2Eg + 3A2u + 3Eu",
  acoustic: "A2u + Eu",
  optic: "2A1g + 2Eg + 2A2u + 2Eu",
  infraredBands: 4,
  ramanBands: 4,
  compare: "labels",
} as const;

const MONAZITE = {
  axes: "unique axis b",
  total: "18Ag + 18Bg + 18Au + 18Bu",
  acoustic: "Au + 2Bu",
  optic: "18Ag + 18Bg + 17Au + 16Bu",
  infraredBands: 33,
  ramanBands: 36,
  compare: "labels",
} as const;

const GYPSUM = {
  axes: "unique axis b",
  total: "17Ag + 19Bg + 17Au + 19Bu",
  acoustic: "Au + 2Bu",
  optic: "17Ag + 19Bg + 16Au + 17Bu",
  infraredBands: 33,
  ramanBands: 36,
  compare: "labels",
  byHand: true,
  source: "B. J. Berenblut, P. Dawson, G. R. Wilkinson, Spectrochimica Acta 27A (1971) 1849",
} as const;

const FORSTERITE = {
  axes: "x, y, z along a, b, c of Pbnm",
  total: "11Ag + 11B1g + 7B2g + 7B3g + 10Au + 10B1u + 14B2u + 14B3u",
  acoustic: "B1u + B2u + B3u",
  optic: "11Ag + 11B1g + 7B2g + 7B3g + 10Au + 9B1u + 13B2u + 13B3u",
  infraredBands: 35,
  ramanBands: 36,
  compare: "labels",
  source: "K. Iishi, American Mineralogist 63 (1978) 1198",
} as const;

const CUBIC = { axes: "cubic", acoustic: "T1u", compare: "labels" } as const;

export const PUBLISHED_SPECIES: readonly PublishedSpecies[] = [
  // triclinic
  {
    fixture: "albite",
    axes: "triclinic",
    total: "39Ag + 39Au",
    acoustic: "3Au",
    optic: "39Ag + 36Au",
    infraredBands: 36,
    ramanBands: 39,
    compare: "labels",
    source: "D. A. McKeown, American Mineralogist 90 (2005) 1506",
  },

  // monoclinic
  { fixture: "gypsum", ...GYPSUM },
  { fixture: "gypsum-i2a", ...GYPSUM },
  { fixture: "gypsum-c2c", ...GYPSUM },
  {
    fixture: "monazite",
    ...MONAZITE,
    source: "G. M. Begun, G. W. Beall, L. A. Boatner, W. J. Gregor, Journal of Raman Spectroscopy 11 (1981) 273",
  },
  {
    fixture: "crocoite",
    byHand: true,
    ...MONAZITE,
    source:
      "P. J. Scheuermann, G. J. Ritter, Z. Naturforsch. 25a (1970) 1856; R. L. Frost, J. Raman Spectrosc. 35 (2004) 153",
    doubt: "the numbers are those of all monazites; the papers are less sure",
  },
  {
    fixture: "orpiment",
    axes: "unique axis b",
    total: "15Ag + 15Bg + 15Au + 15Bu",
    acoustic: "Au + 2Bu",
    optic: "15Ag + 15Bg + 14Au + 13Bu",
    infraredBands: 27,
    ramanBands: 30,
    compare: "labels",
    source: "R. Zallen, M. L. Slade, A. T. Ward, Physical Review B 3 (1971) 4257",
  },
  {
    fixture: "realgar",
    byHand: true,
    axes: "unique axis b",
    total: "24Ag + 24Bg + 24Au + 24Bu",
    acoustic: "Au + 2Bu",
    infraredBands: 45,
    ramanBands: 48,
    compare: "labels",
    source: "R. Forneris, American Mineralogist 54 (1969) 1062",
    doubt: "whether the paper prints the whole sum; all atoms are in general positions",
  },
  {
    fixture: "tenorite",
    axes: "unique axis b",
    total: "Ag + 2Bg + 4Au + 5Bu",
    acoustic: "Au + 2Bu",
    optic: "Ag + 2Bg + 3Au + 3Bu",
    infraredBands: 6,
    ramanBands: 3,
    compare: "labels",
    source: "J. C. Irwin, J. Chrzanowski, T. Wei, D. J. Lockwood, A. Wold, Physica C 166 (1990) 456",
  },

  // orthorhombic
  {
    fixture: "aragonite",
    ...ARAGONITE,
    source: "R. Frech, E. C. Wang, J. B. Bates, Spectrochimica Acta 36A (1980) 915",
    doubt:
      "the axes: the mirror plane of the labels is normal to y, as in Pnma, although the cell is often given as Pmcn",
  },
  {
    fixture: "cerussite",
    byHand: true,
    ...ARAGONITE,
    compare: "numbers",
    source: "W. N. Martens, L. Rintoul, J. T. Kloprogge, R. L. Frost, American Mineralogist 89 (2004) 352",
    doubt: "the axes of the labels",
  },
  {
    fixture: "niter",
    byHand: true,
    ...ARAGONITE,
    compare: "numbers",
    source: "M. Balkanski, M. K. Teng, M. Nusimovici, Physical Review 176 (1968) 1098",
    doubt: "the axes of the labels",
  },
  {
    fixture: "barite",
    ...BARITE,
    source: "P. Dawson, M. M. Hargreave, G. R. Wilkinson, Spectrochimica Acta 33A (1977) 83",
  },
  {
    fixture: "arcanite",
    byHand: true,
    axes: "x, y, z along a, b, c of Pnma",
    total: "13Ag + 8B1g + 13B2g + 8B3g + 8Au + 13B1u + 8B2u + 13B3u",
    acoustic: "B1u + B2u + B3u",
    optic: "13Ag + 8B1g + 13B2g + 8B3g + 8Au + 12B1u + 7B2u + 12B3u",
    infraredBands: 31,
    ramanBands: 42,
    compare: "numbers",
    source: "M. Debeau, Revue de Physique Appliquee 7 (1972) 49",
    doubt: "the axes of the labels (published for Pnam)",
  },
  { fixture: "forsterite-pbnm", ...FORSTERITE },
  { fixture: "forsterite-pnma", ...FORSTERITE, relabel: PBNM_TO_PNMA },
  {
    fixture: "perovskite",
    axes: "x, y, z along a, b, c of Pbnm",
    total: "7Ag + 7B1g + 5B2g + 5B3g + 8Au + 8B1u + 10B2u + 10B3u",
    acoustic: "B1u + B2u + B3u",
    optic: "7Ag + 7B1g + 5B2g + 5B3g + 8Au + 7B1u + 9B2u + 9B3u",
    infraredBands: 25,
    ramanBands: 24,
    compare: "labels",
    source: "P. McMillan, N. Ross, Physics and Chemistry of Minerals 16 (1988) 21",
  },
  {
    fixture: "massicot",
    axes: "x, y, z along a, b, c of Pbcm",
    total: "4Ag + 4B1g + 2B2g + 2B3g + 2Au + 2B1u + 4B2u + 4B3u",
    acoustic: "B1u + B2u + B3u",
    optic: "4Ag + 4B1g + 2B2g + 2B3g + 2Au + B1u + 3B2u + 3B3u",
    infraredBands: 7,
    ramanBands: 12,
    compare: "labels",
    source: "D. M. Adams, D. C. Stevens, Journal of the Chemical Society, Dalton Transactions (1977) 1096",
  },
  {
    fixture: "goethite",
    byHand: true,
    axes: "not remembered",
    total: "8Ag + 8B1g + 4B2g + 4B3g + 4Au + 4B1u + 8B2u + 8B3u",
    acoustic: "B1u + B2u + B3u",
    infraredBands: 17,
    ramanBands: 24,
    compare: "numbers",
    source:
      "M. V. Abrashev, V. G. Ivanov, B. S. Stefanov, N. D. Todorov, J. Rosell, V. Skumryev, J. Appl. Phys. 127 (2020) 205108",
    doubt: "the axes of the labels",
  },
  {
    fixture: "iodine",
    byHand: true,
    axes: "x, y, z along a, b, c of Cmca; molecules in the plane of y and z",
    total: "2Ag + B1g + B2g + 2B3g + Au + 2B1u + 2B2u + B3u",
    acoustic: "B1u + B2u + B3u",
    optic: "2Ag + B1g + B2g + 2B3g + Au + B1u + B2u",
    infraredBands: 2,
    ramanBands: 6,
    compare: "numbers",
    source:
      "A. Anderson, T. S. Sun, Chemical Physics Letters 6 (1970) 611; J. E. Cahill, G. E. Leroi, J. Chem. Phys. 51 (1969) 4514",
    doubt: "the axes of the labels",
  },
  {
    fixture: "sodium-nitrite",
    axes: "not remembered for B1 and B2",
    total: "4A1 + A2 + 3B1 + 4B2",
    acoustic: "A1 + B1 + B2",
    optic: "3A1 + A2 + 2B1 + 3B2",
    infraredBands: 8,
    ramanBands: 9,
    compare: "numbers",
    source: "J. D. Axe, Physical Review 167 (1968) 573",
    doubt: "which of B1 and B2 is the out-of-plane species",
  },
  {
    fixture: "alpha-sulfur",
    byHand: true,
    axes: "any",
    total: "12Ag + 12B1g + 12B2g + 12B3g + 12Au + 12B1u + 12B2u + 12B3u",
    acoustic: "B1u + B2u + B3u",
    infraredBands: 33,
    ramanBands: 48,
    compare: "labels",
    source:
      "A. T. Ward, Journal of Physical Chemistry 72 (1968) 744; A. Anderson, Y. T. Loh, Can. J. Chem. 47 (1969) 879",
    doubt: "the papers list internal and lattice modes apart; the sum of both is 12 of each",
  },

  // tetragonal
  { fixture: "rutile", ...RUTILE, source: "S. P. S. Porto, P. A. Fleury, T. C. Damen, Physical Review 154 (1967) 522" },
  {
    fixture: "cassiterite",
    ...RUTILE,
    source: "R. S. Katiyar, P. Dawson, M. M. Hargreave, G. R. Wilkinson, Journal of Physics C 4 (1971) 2421",
  },
  {
    fixture: "anatase",
    axes: "z along c, x and y along the tetragonal a axes",
    acoustic: "A2u + Eu",
    optic: "A1g + A2u + 2B1g + B2u + 3Eg + 2Eu",
    infraredBands: 3,
    ramanBands: 6,
    compare: "labels",
    source: "T. Ohsaka, F. Izumi, Y. Fujiki, Journal of Raman Spectroscopy 7 (1978) 321",
  },
  {
    fixture: "litharge",
    axes: "z along c, x and y along the tetragonal a axes",
    total: "A1g + B1g + 2Eg + 2A2u + 2Eu",
    acoustic: "A2u + Eu",
    optic: "A1g + B1g + 2Eg + A2u + Eu",
    infraredBands: 2,
    ramanBands: 4,
    compare: "labels",
    source: "D. M. Adams, D. C. Stevens, Journal of the Chemical Society, Dalton Transactions (1977) 1096",
  },
  { fixture: "scheelite", ...SCHEELITE, source: "S. P. S. Porto, J. F. Scott, Physical Review 157 (1967) 716" },
  { fixture: "scheelite-origin-1", ...SCHEELITE, source: "J. P. Russell, R. Loudon, Proc. Phys. Soc. 85 (1965) 1029" },
  { fixture: "powellite", ...SCHEELITE, source: "S. P. S. Porto, J. F. Scott, Physical Review 157 (1967) 716" },
  {
    fixture: "wulfenite",
    ...SCHEELITE,
    source: "R. K. Khanna, W. S. Brower, B. R. Guscott, E. R. Lippincott, J. Res. Natl. Bur. Stand. 72A (1968) 81",
  },
  {
    fixture: "zircon",
    axes: "z along c, x and y along the tetragonal a axes",
    total: "2A1g + A2g + 4B1g + B2g + 5Eg + A1u + 4A2u + B1u + 2B2u + 5Eu",
    acoustic: "A2u + Eu",
    optic: "2A1g + A2g + 4B1g + B2g + 5Eg + A1u + 3A2u + B1u + 2B2u + 4Eu",
    infraredBands: 7,
    ramanBands: 12,
    compare: "labels",
    source: "P. Dawson, M. M. Hargreave, G. R. Wilkinson, Journal of Physics C 4 (1971) 240",
  },
  {
    fixture: "barium-titanate",
    axes: "z along c, x and y along the tetragonal a axes",
    total: "4A1 + B1 + 5E",
    acoustic: "A1 + E",
    optic: "3A1 + B1 + 4E",
    infraredBands: 7,
    ramanBands: 8,
    compare: "labels",
    source: "M. DiDomenico, S. H. Wemple, S. P. S. Porto, R. P. Bauman, Physical Review 174 (1968) 522",
  },
  {
    fixture: "calomel",
    byHand: true,
    axes: "z along c",
    total: "2A1g + 2Eg + 2A2u + 2Eu",
    acoustic: "A2u + Eu",
    optic: "2A1g + 2Eg + A2u + Eu",
    infraredBands: 2,
    ramanBands: 4,
    compare: "labels",
    source:
      "H. M. Gager, J. Lewis, M. J. Ware, Chemical Communications (1966) 616; H. Stammreich, T. Teixeira Sans, J. Mol. Struct. 1 (1967) 55",
    doubt: "the papers; the reduction is in many later works on mercurous halides",
  },

  // trigonal
  {
    fixture: "calcite",
    ...CALCITE,
    source: "S. P. S. Porto, J. A. Giordmaine, T. C. Damen, Physical Review 147 (1966) 608",
  },
  { fixture: "magnesite", ...CALCITE, source: "H. N. Rutt, J. H. Nicola, Journal of Physics C 7 (1974) 4522" },
  { fixture: "siderite", ...CALCITE, source: "H. N. Rutt, J. H. Nicola, Journal of Physics C 7 (1974) 4522" },
  {
    fixture: "nitratine",
    ...CALCITE,
    source: "D. L. Rousseau, R. E. Miller, G. E. Leroi, Journal of Chemical Physics 48 (1968) 3409",
  },
  {
    fixture: "dolomite",
    axes: "z along c",
    total: "4Ag + 4Eg + 6Au + 6Eu",
    acoustic: "Au + Eu",
    optic: "4Ag + 4Eg + 5Au + 5Eu",
    infraredBands: 10,
    ramanBands: 8,
    compare: "labels",
    source: "J. H. Nicola, J. F. Scott, R. M. Couto, M. M. Correa, Physical Review B 14 (1976) 4676",
  },
  {
    fixture: "corundum",
    ...CORUNDUM,
    source: "S. P. S. Porto, R. S. Krishnan, Journal of Chemical Physics 47 (1967) 1009",
  },
  {
    fixture: "hematite",
    ...CORUNDUM,
    source: "I. R. Beattie, T. R. Gilson, Journal of the Chemical Society A (1970) 980",
  },
  { fixture: "eskolaite", ...CORUNDUM, source: "D. R. Renneke, D. W. Lynch, Physical Review 138 (1965) A530" },
  {
    fixture: "ilmenite",
    axes: "z along c",
    total: "5Ag + 5Eg + 5Au + 5Eu",
    acoustic: "Au + Eu",
    optic: "5Ag + 5Eg + 4Au + 4Eu",
    infraredBands: 8,
    ramanBands: 10,
    compare: "labels",
    source: "T. Okada, T. Narita, T. Nagai, T. Yamanaka, American Mineralogist 93 (2008) 39",
  },
  {
    fixture: "alpha-quartz",
    axes: "z along c, C2 along a",
    total: "4A1 + 5A2 + 9E",
    acoustic: "A2 + E",
    optic: "4A1 + 4A2 + 8E",
    infraredBands: 12,
    ramanBands: 12,
    compare: "labels",
    source: "J. F. Scott, S. P. S. Porto, Physical Review 161 (1967) 903",
  },
  {
    fixture: "cinnabar",
    axes: "z along c, C2 along a",
    total: "2A1 + 4A2 + 6E",
    acoustic: "A2 + E",
    optic: "2A1 + 3A2 + 5E",
    infraredBands: 8,
    ramanBands: 7,
    compare: "labels",
    source: "R. Zallen, G. Lucovsky, W. Taylor, A. Pinczuk, E. Burstein, Physical Review B 1 (1970) 4058",
  },
  {
    fixture: "lithium-niobate",
    axes: "z along c",
    total: "5A1 + 5A2 + 10E",
    acoustic: "A1 + E",
    optic: "4A1 + 5A2 + 9E",
    infraredBands: 13,
    ramanBands: 13,
    compare: "labels",
    source: "R. F. Schaufele, M. J. Weber, Physical Review 152 (1966) 705",
  },
  {
    fixture: "brucite",
    ...BRUCITE,
    source: "P. Dawson, C. D. Hadfield, G. R. Wilkinson, J. Phys. Chem. Solids 34 (1973) 1217",
  },
  {
    fixture: "portlandite",
    ...BRUCITE,
    source: "P. Dawson, C. D. Hadfield, G. R. Wilkinson, J. Phys. Chem. Solids 34 (1973) 1217",
  },
  {
    fixture: "sodium-azide",
    axes: "z along c",
    total: "A1g + Eg + 3A2u + 3Eu",
    acoustic: "A2u + Eu",
    optic: "A1g + Eg + 2A2u + 2Eu",
    infraredBands: 4,
    ramanBands: 2,
    compare: "labels",
    source: "G. J. Simonis, C. E. Hathaway, Physical Review B 10 (1974) 4419",
  },

  // hexagonal
  {
    fixture: "zincite",
    ...WURTZITE,
    source: "C. A. Arguello, D. L. Rousseau, S. P. S. Porto, Physical Review 181 (1969) 1351",
  },
  {
    fixture: "wurtzite",
    ...WURTZITE,
    source: "C. A. Arguello, D. L. Rousseau, S. P. S. Porto, Physical Review 181 (1969) 1351",
  },
  {
    fixture: "molybdenite-2h",
    axes: "z along c; C2' normal to the mirror planes c of P63/mmc, so that B1 and B2 are those of the paper",
    total: "A1g + 2A2u + B1u + 2B2g + E1g + 2E1u + 2E2g + E2u",
    acoustic: "A2u + E1u",
    optic: "A1g + A2u + B1u + 2B2g + E1g + E1u + 2E2g + E2u",
    infraredBands: 2,
    ramanBands: 4,
    relabel: { B1u: "B2u", B2g: "B1g" },
    compare: "labels",
    source: "J. L. Verble, T. J. Wieting, Physical Review Letters 25 (1970) 362",
  },
  {
    fixture: "graphite-2h",
    axes: "z along c; C2' along a",
    acoustic: "A2u + E1u",
    optic: "A2u + 2B1g + E1u + 2E2g",
    infraredBands: 2,
    ramanBands: 2,
    compare: "labels",
    source: "R. J. Nemanich, G. Lucovsky, S. A. Solin, Solid State Communications 23 (1977) 117",
    doubt: "B1g or B2g; other authors print B2g",
  },
  {
    fixture: "fluorapatite",
    byHand: true,
    axes: "z along c",
    total: "12Ag + 9Au + 9Bg + 12Bu + 8E1g + 13E1u + 13E2g + 8E2u",
    acoustic: "Au + E1u",
    infrared: "8Au + 12E1u",
    raman: "12Ag + 8E1g + 13E2g",
    infraredBands: 20,
    ramanBands: 33,
    compare: "labels",
    source: "L. C. Kravitz, J. D. Kingsley, E. L. Elkin, Journal of Chemical Physics 49 (1968) 4600",
  },
  {
    fixture: "beryl",
    axes: "z along c",
    acoustic: "A2u + E1u",
    infrared: "6A2u + 16E1u",
    raman: "7A1g + 13E1g + 16E2g",
    infraredBands: 22,
    ramanBands: 36,
    compare: "labels",
    source: "D. M. Adams, I. R. Gardner, Journal of the Chemical Society, Dalton Transactions (1974) 1502",
  },

  // cubic
  {
    fixture: "halite",
    ...CUBIC,
    optic: "T1u",
    infraredBands: 1,
    ramanBands: 0,
    source: "M. Born, K. Huang, Dynamical Theory of Crystal Lattices (1954)",
  },
  {
    fixture: "caesium-chloride",
    ...CUBIC,
    optic: "T1u",
    infraredBands: 1,
    ramanBands: 0,
    source: "M. Born, K. Huang, Dynamical Theory of Crystal Lattices (1954)",
  },
  {
    fixture: "fluorite",
    ...CUBIC,
    optic: "T1u + T2g",
    infraredBands: 1,
    ramanBands: 1,
    source: "J. P. Russell, Proceedings of the Physical Society 85 (1965) 194",
  },
  {
    fixture: "sphalerite",
    axes: "cubic",
    acoustic: "T2",
    optic: "T2",
    infraredBands: 1,
    ramanBands: 1,
    compare: "labels",
    source: "R. Loudon, Advances in Physics 13 (1964) 423",
  },
  {
    fixture: "diamond",
    ...CUBIC,
    optic: "T2g",
    infraredBands: 0,
    ramanBands: 1,
    source: "R. Loudon, Advances in Physics 13 (1964) 423",
  },
  {
    fixture: "cuprite",
    ...CUBIC,
    optic: "A2u + Eu + T2u + 2T1u + T2g",
    infraredBands: 2,
    ramanBands: 1,
    source: "K. Reimann, K. Syassen, Physical Review B 39 (1989) 11113",
  },
  {
    fixture: "spinel",
    ...CUBIC,
    optic: "A1g + Eg + T1g + 3T2g + 2A2u + 2Eu + 4T1u + 2T2u",
    infraredBands: 4,
    ramanBands: 5,
    source: "W. B. White, B. A. DeAngelis, Spectrochimica Acta 23A (1967) 985",
  },
  {
    fixture: "pyrite",
    axes: "cubic",
    total: "Ag + Eg + 3Tg + 2Au + 2Eu + 6Tu",
    acoustic: "Tu",
    optic: "Ag + Eg + 3Tg + 2Au + 2Eu + 5Tu",
    infraredBands: 5,
    ramanBands: 5,
    compare: "labels",
    source: "S. Ushioda, Solid State Communications 10 (1972) 307",
  },
  {
    fixture: "carbon-dioxide",
    byHand: true,
    axes: "cubic",
    total: "Ag + Eg + 3Tg + 2Au + 2Eu + 6Tu",
    acoustic: "Tu",
    infraredBands: 5,
    ramanBands: 5,
    compare: "labels",
    source: "J. E. Cahill, G. E. Leroi, Journal of Chemical Physics 51 (1969) 1324",
  },
  {
    fixture: "pyrope",
    ...CUBIC,
    total: "3A1g + 5A2g + 8Eg + 14T1g + 14T2g + 5A1u + 5A2u + 10Eu + 18T1u + 16T2u",
    infrared: "17T1u",
    raman: "3A1g + 8Eg + 14T2g",
    infraredBands: 17,
    ramanBands: 25,
    source: "R. K. Moore, W. B. White, T. V. Long, American Mineralogist 56 (1971) 54",
  },
  {
    fixture: "almandine",
    ...CUBIC,
    infrared: "17T1u",
    raman: "3A1g + 8Eg + 14T2g",
    infraredBands: 17,
    ramanBands: 25,
    source: "A. M. Hofmeister, A. Chopelas, Physics and Chemistry of Minerals 17 (1991) 503",
  },
  {
    fixture: "strontium-titanate",
    ...CUBIC,
    total: "4T1u + T2u",
    optic: "3T1u + T2u",
    infraredBands: 3,
    ramanBands: 0,
    source: "R. A. Cowley, Physical Review 134 (1964) A981",
  },
  {
    fixture: "potassium-hexachloroplatinate",
    ...CUBIC,
    total: "A1g + Eg + T1g + 2T2g + 4T1u + T2u",
    optic: "A1g + Eg + T1g + 2T2g + 3T1u + T2u",
    infraredBands: 3,
    ramanBands: 4,
    source: "M. Debeau, H. Poulet, Spectrochimica Acta 25A (1969) 1553",
  },
  {
    fixture: "ammonium-chloride-ordered",
    axes: "cubic",
    total: "A1 + E + T1 + 4T2",
    acoustic: "T2",
    optic: "A1 + E + T1 + 3T2",
    infraredBands: 3,
    ramanBands: 5,
    compare: "labels",
    source: "L. Couture-Mathieu, J.-P. Mathieu, Journal de Chimie Physique 49 (1952) 226",
    doubt: "the paper; the reduction is common to all later ones",
  },
  {
    fixture: "sodium-chlorate",
    axes: "cubic",
    total: "5A + 5E + 15T",
    acoustic: "T",
    optic: "5A + 5E + 14T",
    infraredBands: 14,
    ramanBands: 24,
    compare: "labels",
    source: "C. M. Hartwig, D. L. Rousseau, S. P. S. Porto, Physical Review 188 (1969) 1328",
  },
];
