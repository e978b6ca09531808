/**
 * Published correlations of the modes of molecules and ions in crystals: free unit, site group, factor group. Written from
 * memory of the works named; no program computed any of it. Entries with `byHand` recall the work for site group and scheme
 * only, and their sums were worked out on paper with correlation tables. `doubt` says what is not firm. A disagreement is to
 * be reported, never repaired by editing an entry to fit.
 */

/** Fundamentals of one species of the free unit and what one of them becomes. */
export interface PublishedCorrelation {
  /** Names of the fundamentals, `nu1`, as in the table of free units; empty where they are not numbered there. */
  readonly modes: readonly string[];
  /** Species in the point group of the free unit; a sum for librations and translations. */
  readonly free: string;
  /** Sum of species in the site group. */
  readonly site: string;
  /** Sum of species in the factor group, over all units of the primitive cell. */
  readonly crystal: string;
}

export interface PublishedInternalModes {
  /** File name in fixtures/, without `.cif`. */
  readonly fixture: string;
  /** Formula of the unit without charge. */
  readonly unit: string;
  readonly unitsInPrimitiveCell: number;
  /** Schoenflies symbols of the free unit, the site and the factor group. */
  readonly freeGroup: string;
  readonly siteGroup: string;
  readonly factorGroup: string;
  /** Axes to which the published labels refer. */
  readonly axes: string;
  readonly internal: readonly PublishedCorrelation[];
  readonly librations?: PublishedCorrelation;
  /** Acoustic modes included. */
  readonly translations?: PublishedCorrelation;
  /** Published label of the factor group to the label in the axes of the fixture's own cell; absent where they agree. */
  readonly relabel?: Readonly<Record<string, string>>;
  /** `numbers`: B1, B2 and B3 are interchangeable, since the axes of the labels are not remembered. */
  readonly compare: "labels" | "numbers";
  /** Only infrared and Raman active species are given for the factor group. */
  readonly activeOnly?: true;
  /** The sums are not remembered from the work as printed, but worked out on paper. */
  readonly byHand?: true;
  readonly source: string;
  readonly doubt?: string;
}

/** What one fundamental, or several of the same species, become. */
function becomes(modes: string, free: string, site: string, crystal: string): PublishedCorrelation {
  return { modes: modes === "" ? [] : modes.split(" "), free, site, crystal };
}

// Planar XY3 on 32 in -3m, two to the primitive cell.
const CALCITE = {
  unitsInPrimitiveCell: 2,
  freeGroup: "D3h",
  siteGroup: "D3",
  factorGroup: "D3d",
  axes: "z along c",
  internal: [
    becomes("nu1", "A1'", "A1", "A1g + A1u"),
    becomes("nu2", "A2''", "A2", "A2g + A2u"),
    becomes("nu3 nu4", "E'", "E", "Eg + Eu"),
  ],
  librations: becomes("", "A2' + E''", "A2 + E", "A2g + A2u + Eg + Eu"),
  translations: becomes("", "A2'' + E'", "A2 + E", "A2g + A2u + Eg + Eu"),
  compare: "labels",
} as const;

/** Cyclic change from the axes of Pnma to those of Pmcn: a(Pmcn) = b(Pnma), b(Pmcn) = c(Pnma), c(Pmcn) = a(Pnma). */
const PNMA_TO_PMCN = { B1g: "B2g", B2g: "B3g", B3g: "B1g", B1u: "B2u", B2u: "B3u", B3u: "B1u" } as const;

/** Cyclic change from the axes of Pbnm to those of Pnma; the same permutation. */
const PBNM_TO_PNMA = PNMA_TO_PMCN;

const EVEN_PNMA = "Ag + B2g + B1u + B3u"; // symmetric to the mirror plane normal to y
const TWO_EVEN_ONE_ODD_PNMA = "2Ag + B1g + 2B2g + B3g + Au + 2B1u + B2u + 2B3u";
const ALL_PNMA = "Ag + B1g + B2g + B3g + Au + B1u + B2u + B3u";

// Planar XY3 on a mirror plane that is normal to it, four to the primitive cell.
const ARAGONITE = {
  unitsInPrimitiveCell: 4,
  freeGroup: "D3h",
  siteGroup: "Cs",
  factorGroup: "D2h",
  axes: "mirror plane normal to y: x, y, z along a, b, c of Pnma",
  internal: [
    becomes("nu1", "A1'", "A'", EVEN_PNMA),
    becomes("nu2", "A2''", "A'", EVEN_PNMA),
    becomes("nu3 nu4", "E'", "A' + A''", ALL_PNMA),
  ],
  librations: becomes("", "A2' + E''", "A' + 2A''", "Ag + 2B1g + B2g + 2B3g + 2Au + B1u + 2B2u + B3u"),
  translations: becomes("", "A2'' + E'", "2A' + A''", TWO_EVEN_ONE_ODD_PNMA),
  relabel: PNMA_TO_PMCN,
  compare: "labels",
} as const;

// Tetrahedral XY4 on a mirror plane, four to the primitive cell of Pnma.
const BARITE = {
  unitsInPrimitiveCell: 4,
  freeGroup: "Td",
  siteGroup: "Cs",
  factorGroup: "D2h",
  axes: "x, y, z along a, b, c of Pnma",
  internal: [
    becomes("nu1", "A1", "A'", EVEN_PNMA),
    becomes("nu2", "E", "A' + A''", ALL_PNMA),
    becomes("nu3 nu4", "T2", "2A' + A''", TWO_EVEN_ONE_ODD_PNMA),
  ],
  librations: becomes("", "T1", "A' + 2A''", "Ag + 2B1g + B2g + 2B3g + 2Au + B1u + 2B2u + B3u"),
  translations: becomes("", "T2", "2A' + A''", TWO_EVEN_ONE_ODD_PNMA),
  compare: "labels",
} as const;

const TWO_EVEN_ONE_ODD_PBNM = "2Ag + 2B1g + B2g + B3g + Au + B1u + 2B2u + 2B3u";

const FORSTERITE = {
  unit: "SiO4",
  unitsInPrimitiveCell: 4,
  freeGroup: "Td",
  siteGroup: "Cs",
  factorGroup: "D2h",
  axes: "x, y, z along a, b, c of Pbnm",
  internal: [
    becomes("nu1", "A1", "A'", "Ag + B1g + B2u + B3u"),
    becomes("nu2", "E", "A' + A''", "Ag + B1g + B2g + B3g + Au + B1u + B2u + B3u"),
    becomes("nu3 nu4", "T2", "2A' + A''", TWO_EVEN_ONE_ODD_PBNM),
  ],
  librations: becomes("", "T1", "A' + 2A''", "Ag + B1g + 2B2g + 2B3g + 2Au + 2B1u + B2u + B3u"),
  translations: becomes("", "T2", "2A' + A''", TWO_EVEN_ONE_ODD_PBNM),
  compare: "labels",
  source: "K. Iishi, American Mineralogist 63 (1978) 1198",
} as const;

const SCHEELITE = {
  unitsInPrimitiveCell: 2,
  freeGroup: "Td",
  siteGroup: "S4",
  factorGroup: "C4h",
  axes: "z along c",
  internal: [
    becomes("nu1", "A1", "A", "Ag + Bu"),
    becomes("nu2", "E", "A + B", "Ag + Bg + Au + Bu"),
    becomes("nu3 nu4", "T2", "B + E", "Bg + Eg + Au + Eu"),
  ],
  librations: becomes("", "T1", "A + E", "Ag + Eg + Bu + Eu"),
  translations: becomes("", "T2", "B + E", "Bg + Eg + Au + Eu"),
  compare: "labels",
} as const;

const GYPSUM_SULFATE = {
  unit: "SO4",
  unitsInPrimitiveCell: 2,
  freeGroup: "Td",
  siteGroup: "C2",
  factorGroup: "C2h",
  axes: "unique axis b",
  internal: [
    becomes("nu1", "A1", "A", "Ag + Au"),
    becomes("nu2", "E", "2A", "2Ag + 2Au"),
    becomes("nu3 nu4", "T2", "A + 2B", "Ag + 2Bg + Au + 2Bu"),
  ],
  librations: becomes("", "T1", "A + 2B", "Ag + 2Bg + Au + 2Bu"),
  translations: becomes("", "T2", "A + 2B", "Ag + 2Bg + Au + 2Bu"),
  compare: "labels",
  source: "B. J. Berenblut, P. Dawson, G. R. Wilkinson, Spectrochimica Acta 27A (1971) 1849",
} as const;

const GYPSUM_WATER = {
  unit: "H2O",
  unitsInPrimitiveCell: 4,
  freeGroup: "C2v",
  siteGroup: "C1",
  factorGroup: "C2h",
  axes: "unique axis b",
  internal: [becomes("nu1 nu2", "A1", "A", "Ag + Bg + Au + Bu"), becomes("nu3", "B2", "A", "Ag + Bg + Au + Bu")],
  librations: becomes("", "A2 + B1 + B2", "3A", "3Ag + 3Bg + 3Au + 3Bu"),
  translations: becomes("", "A1 + B1 + B2", "3A", "3Ag + 3Bg + 3Au + 3Bu"),
  compare: "labels",
  source: "B. J. Berenblut, P. Dawson, G. R. Wilkinson, Spectrochimica Acta 27A (1971) 1849",
} as const;

// Tetrahedral XY4 in a general position of a monoclinic crystal with four units.
const MONAZITE = {
  unitsInPrimitiveCell: 4,
  freeGroup: "Td",
  siteGroup: "C1",
  factorGroup: "C2h",
  axes: "unique axis b",
  internal: [
    becomes("nu1", "A1", "A", "Ag + Bg + Au + Bu"),
    becomes("nu2", "E", "2A", "2Ag + 2Bg + 2Au + 2Bu"),
    becomes("nu3 nu4", "T2", "3A", "3Ag + 3Bg + 3Au + 3Bu"),
  ],
  librations: becomes("", "T1", "3A", "3Ag + 3Bg + 3Au + 3Bu"),
  translations: becomes("", "T2", "3A", "3Ag + 3Bg + 3Au + 3Bu"),
  compare: "labels",
} as const;

// Planar XY3 in a general position of a monoclinic crystal with four units.
const AZURITE = {
  unit: "CO3",
  unitsInPrimitiveCell: 4,
  freeGroup: "D3h",
  siteGroup: "C1",
  factorGroup: "C2h",
  axes: "unique axis b",
  internal: [
    becomes("nu1", "A1'", "A", "Ag + Bg + Au + Bu"),
    becomes("nu2", "A2''", "A", "Ag + Bg + Au + Bu"),
    becomes("nu3 nu4", "E'", "2A", "2Ag + 2Bg + 2Au + 2Bu"),
  ],
  compare: "labels",
  source: "J. A. Goldsmith, S. D. Ross, Spectrochimica Acta 24A (1968) 2131",
} as const;

const BRUCITE = {
  unit: "OH",
  unitsInPrimitiveCell: 2,
  freeGroup: "Cinfv",
  siteGroup: "C3v",
  factorGroup: "D3d",
  axes: "z along c",
  internal: [becomes("nu1", "Sigma+", "A1", "A1g + A2u")],
  librations: becomes("", "Pi", "E", "Eg + Eu"),
  translations: becomes("", "Sigma+ + Pi", "A1 + E", "A1g + Eg + A2u + Eu"),
  compare: "labels",
  source: "P. Dawson, C. D. Hadfield, G. R. Wilkinson, Journal of Physics and Chemistry of Solids 34 (1973) 1217",
} as const;

const GARNET = {
  unit: "SiO4",
  unitsInPrimitiveCell: 12,
  freeGroup: "Td",
  siteGroup: "S4",
  factorGroup: "Oh",
  axes: "cubic",
  internal: [
    becomes("nu1", "A1", "A", "A1g + Eg"),
    becomes("nu2", "E", "A + B", "A1g + 2Eg + T2g + T1u"),
    becomes("nu3 nu4", "T2", "B + E", "Eg + 3T2g + 3T1u"),
  ],
  librations: becomes("", "T1", "A + E", "A1g + Eg + 2T2g + 2T1u"),
  translations: becomes("", "T2", "B + E", "Eg + 3T2g + 3T1u"),
  compare: "labels",
  activeOnly: true,
} as const;

const G_PBCA = "Ag + B1g + B2g + B3g";
const U_PBCA = "Au + B1u + B2u + B3u";
const G2_PBCA = "2Ag + 2B1g + 2B2g + 2B3g";
const U2_PBCA = "2Au + 2B1u + 2B2u + 2B3u";

export const PUBLISHED_INTERNAL_MODES: readonly PublishedInternalModes[] = [
  // carbonates and nitrates
  {
    fixture: "calcite",
    unit: "CO3",
    ...CALCITE,
    source: "S. Bhagavantam, T. Venkatarayudu, Proc. Indian Acad. Sci. A9 (1939) 224",
  },
  {
    fixture: "magnesite",
    unit: "CO3",
    ...CALCITE,
    source: "H. N. Rutt, J. H. Nicola, Journal of Physics C 7 (1974) 4522",
  },
  {
    fixture: "siderite",
    unit: "CO3",
    ...CALCITE,
    source: "H. N. Rutt, J. H. Nicola, Journal of Physics C 7 (1974) 4522",
  },
  {
    fixture: "nitratine",
    unit: "NO3",
    ...CALCITE,
    source: "D. L. Rousseau, R. E. Miller, G. E. Leroi, Journal of Chemical Physics 48 (1968) 3409",
  },
  {
    fixture: "dolomite",
    unit: "CO3",
    unitsInPrimitiveCell: 2,
    freeGroup: "D3h",
    siteGroup: "C3",
    factorGroup: "C3i",
    axes: "z along c",
    internal: [
      becomes("nu1", "A1'", "A", "Ag + Au"),
      becomes("nu2", "A2''", "A", "Ag + Au"),
      becomes("nu3 nu4", "E'", "E", "Eg + Eu"),
    ],
    librations: becomes("", "A2' + E''", "A + E", "Ag + Eg + Au + Eu"),
    translations: becomes("", "A2'' + E'", "A + E", "Ag + Eg + Au + Eu"),
    compare: "labels",
    source: "J. H. Nicola, J. F. Scott, R. M. Couto, M. M. Correa, Physical Review B 14 (1976) 4676",
  },
  {
    fixture: "aragonite",
    unit: "CO3",
    ...ARAGONITE,
    source:
      "W. B. White in V. C. Farmer (editor), The Infrared Spectra of Minerals, Mineralogical Society, London 1974, chapter 12",
  },
  {
    fixture: "strontianite",
    byHand: true,
    unit: "CO3",
    ...ARAGONITE,
    source: "W. B. White in V. C. Farmer (editor), 1974, chapter 12",
  },
  {
    fixture: "witherite",
    byHand: true,
    unit: "CO3",
    ...ARAGONITE,
    source: "W. B. White in V. C. Farmer (editor), 1974, chapter 12",
  },
  {
    fixture: "cerussite",
    unit: "CO3",
    ...ARAGONITE,
    source: "W. N. Martens, L. Rintoul, J. T. Kloprogge, R. L. Frost, American Mineralogist 89 (2004) 352",
  },
  {
    fixture: "niter",
    byHand: true,
    unit: "NO3",
    ...ARAGONITE,
    source: "M. Balkanski, M. K. Teng, M. Nusimovici, Physical Review 176 (1968) 1098",
    compare: "numbers",
    doubt: "the axes of the labels",
  },
  { fixture: "azurite", byHand: true, ...AZURITE },
  { fixture: "malachite", byHand: true, ...AZURITE },
  {
    fixture: "nitrobarite",
    byHand: true,
    unit: "NO3",
    unitsInPrimitiveCell: 8,
    freeGroup: "D3h",
    siteGroup: "C3",
    factorGroup: "Th",
    axes: "cubic",
    internal: [
      becomes("nu1", "A1'", "A", "Ag + Tg + Au + Tu"),
      becomes("nu2", "A2''", "A", "Ag + Tg + Au + Tu"),
      becomes("nu3 nu4", "E'", "E", "Eg + 2Tg + Eu + 2Tu"),
    ],
    librations: becomes("", "A2' + E''", "A + E", "Ag + Eg + 3Tg + Au + Eu + 3Tu"),
    translations: becomes("", "A2'' + E'", "A + E", "Ag + Eg + 3Tg + Au + Eu + 3Tu"),
    compare: "labels",
    source: "M. H. Brooker, D. E. Irish, G. E. Boyd, Journal of Chemical Physics 53 (1970) 1083",
  },

  // sulfates, phosphates, chromates, arsenates
  { fixture: "gypsum", ...GYPSUM_SULFATE },
  { fixture: "gypsum", ...GYPSUM_WATER },
  { fixture: "gypsum-i2a", ...GYPSUM_SULFATE },
  { fixture: "gypsum-i2a", ...GYPSUM_WATER },
  { fixture: "gypsum-c2c", ...GYPSUM_SULFATE },
  { fixture: "gypsum-c2c", ...GYPSUM_WATER },
  {
    fixture: "anhydrite",
    byHand: true,
    unit: "SO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "C2v",
    factorGroup: "D2h",
    axes: "z along the twofold axis of the sulfate ion",
    internal: [
      becomes("nu1", "A1", "A1", "Ag + B1u"),
      becomes("nu2", "E", "A1 + A2", "Ag + B1g + Au + B1u"),
      becomes("nu3 nu4", "T2", "A1 + B1 + B2", "Ag + B2g + B3g + B1u + B2u + B3u"),
    ],
    librations: becomes("", "T1", "A2 + B1 + B2", "B1g + B2g + B3g + Au + B2u + B3u"),
    compare: "numbers",
    source: "B. J. Berenblut, P. Dawson, G. R. Wilkinson, Spectrochimica Acta 29A (1973) 29",
    doubt: "the axes of the labels",
  },
  {
    fixture: "barite",
    unit: "SO4",
    ...BARITE,
    source: "P. Dawson, M. M. Hargreave, G. R. Wilkinson, Spectrochimica Acta 33A (1977) 83",
  },
  {
    fixture: "celestine",
    byHand: true,
    unit: "SO4",
    ...BARITE,
    source:
      "S. D. Ross in V. C. Farmer (editor), The Infrared Spectra of Minerals, Mineralogical Society, London 1974, chapter 18",
  },
  {
    fixture: "arcanite",
    byHand: true,
    unit: "SO4",
    ...BARITE,
    compare: "numbers",
    source: "M. Debeau, Revue de Physique Appliquee 7 (1972) 49",
    doubt: "the axes of the labels",
  },
  {
    fixture: "thenardite",
    byHand: true,
    unit: "SO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "D2",
    factorGroup: "D2h",
    axes: "any: B1, B2 and B3 occur alike",
    internal: [
      becomes("nu1", "A1", "A", "Ag + Au"),
      becomes("nu2", "E", "2A", "2Ag + 2Au"),
      becomes("nu3 nu4", "T2", "B1 + B2 + B3", "B1g + B2g + B3g + B1u + B2u + B3u"),
    ],
    librations: becomes("", "T1", "B1 + B2 + B3", "B1g + B2g + B3g + B1u + B2u + B3u"),
    translations: becomes("", "T2", "B1 + B2 + B3", "B1g + B2g + B3g + B1u + B2u + B3u"),
    compare: "labels",
    source: "S. Montero, R. Schmolz, S. Haussuehl, Journal of Raman Spectroscopy 2 (1974) 101",
    doubt: "the paper",
  },
  {
    fixture: "jarosite",
    byHand: true,
    unit: "SO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "C3v",
    factorGroup: "D3d",
    axes: "z along c",
    internal: [
      becomes("nu1", "A1", "A1", "A1g + A2u"),
      becomes("nu2", "E", "E", "Eg + Eu"),
      becomes("nu3 nu4", "T2", "A1 + E", "A1g + Eg + A2u + Eu"),
    ],
    librations: becomes("", "T1", "A2 + E", "A2g + Eg + A1u + Eu"),
    translations: becomes("", "T2", "A1 + E", "A1g + Eg + A2u + Eu"),
    compare: "labels",
    source: "D. A. Powers, G. R. Rossman, H. J. Schugar, H. B. Gray, Journal of Solid State Chemistry 13 (1975) 1",
  },
  {
    fixture: "potassium-alum",
    byHand: true,
    unit: "SO4",
    unitsInPrimitiveCell: 8,
    freeGroup: "Td",
    siteGroup: "C3",
    factorGroup: "Th",
    axes: "cubic",
    internal: [
      becomes("nu1", "A1", "A", "Ag + Tg + Au + Tu"),
      becomes("nu2", "E", "E", "Eg + 2Tg + Eu + 2Tu"),
      becomes("nu3 nu4", "T2", "A + E", "Ag + Eg + 3Tg + Au + Eu + 3Tu"),
    ],
    compare: "labels",
    source: "H. H. Eysel, J. Eckert, Zeitschrift fuer anorganische und allgemeine Chemie 424 (1976) 68",
  },
  {
    fixture: "chalcanthite",
    byHand: true,
    unit: "SO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "C1",
    factorGroup: "Ci",
    axes: "triclinic",
    internal: [
      becomes("nu1", "A1", "A", "Ag + Au"),
      becomes("nu2", "E", "2A", "2Ag + 2Au"),
      becomes("nu3 nu4", "T2", "3A", "3Ag + 3Au"),
    ],
    compare: "labels",
    source: "J. Berger, Journal of Raman Spectroscopy 5 (1976) 103",
  },
  {
    fixture: "vivianite",
    byHand: true,
    unit: "PO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "Cs",
    factorGroup: "C2h",
    axes: "unique axis b",
    internal: [
      becomes("nu1", "A1", "A'", "Ag + Bu"),
      becomes("nu2", "E", "A' + A''", "Ag + Bg + Au + Bu"),
      becomes("nu3 nu4", "T2", "2A' + A''", "2Ag + Bg + Au + 2Bu"),
    ],
    compare: "labels",
    source: "B. Piriou, J. F. Poullen, Journal of Raman Spectroscopy 15 (1984) 343",
  },
  {
    fixture: "fluorapatite",
    byHand: true,
    unit: "PO4",
    unitsInPrimitiveCell: 6,
    freeGroup: "Td",
    siteGroup: "Cs",
    factorGroup: "C6h",
    axes: "z along c",
    internal: [
      becomes("nu1", "A1", "A'", "Ag + E2g + Bu + E1u"),
      becomes("nu2", "E", "A' + A''", "Ag + Bg + E1g + E2g + Au + Bu + E1u + E2u"),
      becomes("nu3 nu4", "T2", "2A' + A''", "2Ag + Bg + E1g + 2E2g + Au + 2Bu + 2E1u + E2u"),
    ],
    librations: becomes("", "T1", "A' + 2A''", "Ag + 2Bg + 2E1g + E2g + 2Au + Bu + E1u + 2E2u"),
    compare: "labels",
    source: "L. C. Kravitz, J. D. Kingsley, E. L. Elkin, Journal of Chemical Physics 49 (1968) 4600",
  },
  {
    fixture: "monazite",
    byHand: true,
    unit: "PO4",
    ...MONAZITE,
    source: "G. M. Begun, G. W. Beall, L. A. Boatner, W. J. Gregor, Journal of Raman Spectroscopy 11 (1981) 273",
  },
  {
    fixture: "crocoite",
    byHand: true,
    unit: "CrO4",
    ...MONAZITE,
    source: "R. L. Frost, Journal of Raman Spectroscopy 35 (2004) 153",
  },
  {
    fixture: "potassium-dihydrogen-phosphate",
    byHand: true,
    unit: "PO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "S4",
    factorGroup: "D2d",
    axes: "z along c, C2' along a",
    internal: [
      becomes("nu1", "A1", "A", "A1 + A2"),
      becomes("nu2", "E", "A + B", "A1 + A2 + B1 + B2"),
      becomes("nu3 nu4", "T2", "B + E", "B1 + B2 + 2E"),
    ],
    librations: becomes("", "T1", "A + E", "A1 + A2 + 2E"),
    translations: becomes("", "T2", "B + E", "B1 + B2 + 2E"),
    compare: "labels",
    source: "J. P. Coignac, H. Poulet, Journal de Physique 32 (1971) 679",
    doubt: "hydrogen left aside, as in the paper: the ion is taken as PO4 without the half-occupied hydrogen sites",
  },

  // tungstates, molybdates, silicates
  {
    fixture: "scheelite",
    unit: "WO4",
    ...SCHEELITE,
    source: "S. P. S. Porto, J. F. Scott, Physical Review 157 (1967) 716",
  },
  {
    fixture: "scheelite-origin-1",
    unit: "WO4",
    ...SCHEELITE,
    source: "J. P. Russell, R. Loudon, Proc. Phys. Soc. 85 (1965) 1029",
  },
  {
    fixture: "powellite",
    unit: "MoO4",
    ...SCHEELITE,
    source: "S. P. S. Porto, J. F. Scott, Physical Review 157 (1967) 716",
  },
  {
    fixture: "wulfenite",
    unit: "MoO4",
    ...SCHEELITE,
    source: "R. K. Khanna, W. S. Brower, B. R. Guscott, E. R. Lippincott, J. Res. Natl. Bur. Stand. 72A (1968) 81",
  },
  {
    fixture: "zircon",
    unit: "SiO4",
    unitsInPrimitiveCell: 2,
    freeGroup: "Td",
    siteGroup: "D2d",
    factorGroup: "D4h",
    axes: "z along c, x and y along the tetragonal a axes",
    internal: [
      becomes("nu1", "A1", "A1", "A1g + B2u"),
      becomes("nu2", "E", "A1 + B1", "A1g + B2g + A1u + B2u"),
      becomes("nu3 nu4", "T2", "B2 + E", "B1g + Eg + A2u + Eu"),
    ],
    librations: becomes("", "T1", "A2 + E", "A2g + Eg + B1u + Eu"),
    translations: becomes("", "T2", "B2 + E", "B1g + Eg + A2u + Eu"),
    compare: "labels",
    source: "P. Dawson, M. M. Hargreave, G. R. Wilkinson, Journal of Physics C 4 (1971) 240",
  },
  { fixture: "forsterite-pbnm", ...FORSTERITE },
  { fixture: "forsterite-pnma", ...FORSTERITE, relabel: PBNM_TO_PNMA },
  { fixture: "pyrope", ...GARNET, source: "R. K. Moore, W. B. White, T. V. Long, American Mineralogist 56 (1971) 54" },
  {
    fixture: "almandine",
    ...GARNET,
    source: "A. M. Hofmeister, A. Chopelas, Physics and Chemistry of Minerals 17 (1991) 503",
  },

  // other ions
  { fixture: "brucite", ...BRUCITE },
  { fixture: "portlandite", ...BRUCITE },
  {
    fixture: "ammonium-chloride-ordered",
    unit: "NH4",
    unitsInPrimitiveCell: 1,
    freeGroup: "Td",
    siteGroup: "Td",
    factorGroup: "Td",
    axes: "cubic",
    internal: [becomes("nu1", "A1", "A1", "A1"), becomes("nu2", "E", "E", "E"), becomes("nu3 nu4", "T2", "T2", "T2")],
    librations: becomes("", "T1", "T1", "T1"),
    translations: becomes("", "T2", "T2", "T2"),
    compare: "labels",
    source: "E. L. Wagner, D. F. Hornig, Journal of Chemical Physics 18 (1950) 296",
  },
  {
    fixture: "sodium-nitrite",
    byHand: true,
    unit: "NO2",
    unitsInPrimitiveCell: 1,
    freeGroup: "C2v",
    siteGroup: "C2v",
    factorGroup: "C2v",
    axes: "z along the twofold axis, x normal to the ion",
    internal: [becomes("nu1 nu2", "A1", "A1", "A1"), becomes("nu3", "B2", "B2", "B2")],
    librations: becomes("", "A2 + B1 + B2", "A2 + B1 + B2", "A2 + B1 + B2"),
    translations: becomes("", "A1 + B1 + B2", "A1 + B1 + B2", "A1 + B1 + B2"),
    compare: "numbers",
    source: "J. D. Axe, Physical Review 167 (1968) 573",
    doubt: "which of B1 and B2 is the out-of-plane species in the paper",
  },
  {
    fixture: "sodium-chlorate",
    unit: "ClO3",
    unitsInPrimitiveCell: 4,
    freeGroup: "C3v",
    siteGroup: "C3",
    factorGroup: "T",
    axes: "cubic",
    internal: [becomes("nu1 nu2", "A1", "A", "A + T"), becomes("nu3 nu4", "E", "E", "E + 2T")],
    librations: becomes("", "A2 + E", "A + E", "A + E + 3T"),
    translations: becomes("", "A1 + E", "A + E", "A + E + 3T"),
    compare: "labels",
    source: "C. M. Hartwig, D. L. Rousseau, S. P. S. Porto, Physical Review 188 (1969) 1328",
  },
  {
    fixture: "potassium-hexachloroplatinate",
    unit: "PtCl6",
    unitsInPrimitiveCell: 1,
    freeGroup: "Oh",
    siteGroup: "Oh",
    factorGroup: "Oh",
    axes: "cubic",
    internal: [
      becomes("nu1", "A1g", "A1g", "A1g"),
      becomes("nu2", "Eg", "Eg", "Eg"),
      becomes("nu3 nu4", "T1u", "T1u", "T1u"),
      becomes("nu5", "T2g", "T2g", "T2g"),
      becomes("nu6", "T2u", "T2u", "T2u"),
    ],
    librations: becomes("", "T1g", "T1g", "T1g"),
    translations: becomes("", "T1u", "T1u", "T1u"),
    compare: "labels",
    source: "M. Debeau, H. Poulet, Spectrochimica Acta 25A (1969) 1553",
  },
  {
    fixture: "sodium-azide",
    unit: "N3",
    unitsInPrimitiveCell: 1,
    freeGroup: "Dinfh",
    siteGroup: "D3d",
    factorGroup: "D3d",
    axes: "z along c",
    internal: [
      becomes("nu1", "Sigmag+", "A1g", "A1g"),
      becomes("nu2", "Piu", "Eu", "Eu"),
      becomes("nu3", "Sigmau+", "A2u", "A2u"),
    ],
    librations: becomes("", "Pig", "Eg", "Eg"),
    translations: becomes("", "Sigmau+ + Piu", "A2u + Eu", "A2u + Eu"),
    compare: "labels",
    source: "J. I. Bryant, Journal of Chemical Physics 40 (1964) 3195",
  },
  {
    fixture: "pyrite",
    byHand: true,
    unit: "S2",
    unitsInPrimitiveCell: 4,
    freeGroup: "Dinfh",
    siteGroup: "C3i",
    factorGroup: "Th",
    axes: "cubic",
    internal: [becomes("nu1", "Sigmag+", "Ag", "Ag + Tg")],
    librations: becomes("", "Pig", "Eg", "Eg + 2Tg"),
    translations: becomes("", "Sigmau+ + Piu", "Au + Eu", "Au + Eu + 3Tu"),
    compare: "labels",
    source: "H. D. Lutz, P. Willich, Zeitschrift fuer anorganische und allgemeine Chemie 405 (1974) 176",
  },
  {
    fixture: "calomel",
    byHand: true,
    unit: "Hg2Cl2",
    unitsInPrimitiveCell: 1,
    freeGroup: "Dinfh",
    siteGroup: "D4h",
    factorGroup: "D4h",
    axes: "z along c",
    internal: [
      becomes("nu1 nu2", "Sigmag+", "A1g", "A1g"),
      becomes("nu3", "Sigmau+", "A2u", "A2u"),
      becomes("nu4", "Pig", "Eg", "Eg"),
      becomes("nu5", "Piu", "Eu", "Eu"),
    ],
    librations: becomes("", "Pig", "Eg", "Eg"),
    translations: becomes("", "Sigmau+ + Piu", "A2u + Eu", "A2u + Eu"),
    compare: "labels",
    source: "H. Stammreich, T. Teixeira Sans, Journal of Molecular Structure 1 (1967) 55",
  },

  // molecules
  {
    fixture: "carbon-dioxide",
    unit: "CO2",
    unitsInPrimitiveCell: 4,
    freeGroup: "Dinfh",
    siteGroup: "C3i",
    factorGroup: "Th",
    axes: "cubic",
    internal: [
      becomes("nu1", "Sigmag+", "Ag", "Ag + Tg"),
      becomes("nu2", "Piu", "Eu", "Eu + 2Tu"),
      becomes("nu3", "Sigmau+", "Au", "Au + Tu"),
    ],
    librations: becomes("", "Pig", "Eg", "Eg + 2Tg"),
    translations: becomes("", "Sigmau+ + Piu", "Au + Eu", "Au + Eu + 3Tu"),
    compare: "labels",
    source: "J. E. Cahill, G. E. Leroi, Journal of Chemical Physics 51 (1969) 1324",
  },
  {
    fixture: "iodine",
    byHand: true,
    unit: "I2",
    unitsInPrimitiveCell: 2,
    freeGroup: "Dinfh",
    siteGroup: "C2h",
    factorGroup: "D2h",
    axes: "x, y, z along a, b, c of Cmca; molecules in the plane of y and z",
    internal: [becomes("nu1", "Sigmag+", "Ag", "Ag + B3g")],
    librations: becomes("", "Pig", "Ag + Bg", "Ag + B1g + B2g + B3g"),
    compare: "numbers",
    source: "A. Anderson, T. S. Sun, Chemical Physics Letters 6 (1970) 611",
    doubt: "the axes of the labels",
  },
  {
    fixture: "alpha-sulfur",
    byHand: true,
    unit: "S8",
    unitsInPrimitiveCell: 4,
    freeGroup: "D4d",
    siteGroup: "C2",
    factorGroup: "D2h",
    axes: "z along c, the direction of the twofold axis of the molecule",
    internal: [
      becomes("nu1 nu2", "A1", "A", "Ag + B1g + Au + B1u"),
      becomes("nu3", "B1", "A", "Ag + B1g + Au + B1u"),
      becomes("nu4", "B2", "B", "B2g + B3g + B2u + B3u"),
      becomes("nu5 nu6", "E1", "A + B", ALL_PNMA),
      becomes("nu7 nu8 nu9", "E2", "A + B", ALL_PNMA),
      becomes("nu10 nu11", "E3", "A + B", ALL_PNMA),
    ],
    compare: "labels",
    source: "G. Gautier, M. Debeau, Spectrochimica Acta 30A (1974) 1193",
  },
  {
    fixture: "benzene",
    unit: "C6H6",
    unitsInPrimitiveCell: 4,
    freeGroup: "D6h",
    siteGroup: "Ci",
    factorGroup: "D2h",
    axes: "any: B1, B2 and B3 occur alike",
    internal: [
      becomes("nu1 nu2", "A1g", "Ag", G_PBCA),
      becomes("nu3", "A2g", "Ag", G_PBCA),
      becomes("nu4", "A2u", "Au", U_PBCA),
      becomes("nu5 nu6", "B1u", "Au", U_PBCA),
      becomes("nu7 nu8", "B2g", "Ag", G_PBCA),
      becomes("nu9 nu10", "B2u", "Au", U_PBCA),
      becomes("nu11", "E1g", "2Ag", G2_PBCA),
      becomes("nu12 nu13 nu14", "E1u", "2Au", U2_PBCA),
      becomes("nu15 nu16 nu17 nu18", "E2g", "2Ag", G2_PBCA),
      becomes("nu19 nu20", "E2u", "2Au", U2_PBCA),
    ],
    librations: becomes("", "A2g + E1g", "3Ag", "3Ag + 3B1g + 3B2g + 3B3g"),
    translations: becomes("", "A2u + E1u", "3Au", "3Au + 3B1u + 3B2u + 3B3u"),
    compare: "labels",
    source:
      "S. Zwerdling, R. S. Halford, J. Chem. Phys. 23 (1955) 2221; M. Ito, T. Shigeoka, Spectrochimica Acta 22 (1966) 1029",
  },
  {
    fixture: "naphthalene",
    unit: "C10H8",
    unitsInPrimitiveCell: 2,
    freeGroup: "D2h",
    siteGroup: "Ci",
    factorGroup: "C2h",
    axes: "unique axis b",
    internal: [
      becomes("", "Ag", "Ag", "Ag + Bg"),
      becomes("", "B1g", "Ag", "Ag + Bg"),
      becomes("", "B2g", "Ag", "Ag + Bg"),
      becomes("", "B3g", "Ag", "Ag + Bg"),
      becomes("", "Au", "Au", "Au + Bu"),
      becomes("", "B1u", "Au", "Au + Bu"),
      becomes("", "B2u", "Au", "Au + Bu"),
      becomes("", "B3u", "Au", "Au + Bu"),
    ],
    librations: becomes("", "B1g + B2g + B3g", "3Ag", "3Ag + 3Bg"),
    translations: becomes("", "B1u + B2u + B3u", "3Au", "3Au + 3Bu"),
    compare: "labels",
    source: "A. L. McClellan, G. C. Pimentel, Journal of Chemical Physics 23 (1955) 245",
  },
  {
    fixture: "fullerene-fm-3",
    unit: "C60",
    unitsInPrimitiveCell: 1,
    freeGroup: "Ih",
    siteGroup: "Th",
    factorGroup: "Th",
    axes: "cubic",
    internal: [
      becomes("Ag(1) Ag(2)", "Ag", "Ag", "Ag"),
      becomes("", "T1g", "Tg", "Tg"),
      becomes("", "T2g", "Tg", "Tg"),
      becomes("", "Gg", "Ag + Tg", "Ag + Tg"),
      becomes("Hg(1) Hg(2) Hg(3) Hg(4) Hg(5) Hg(6) Hg(7) Hg(8)", "Hg", "Eg + Tg", "Eg + Tg"),
      becomes("", "Au", "Au", "Au"),
      becomes("T1u(1) T1u(2) T1u(3) T1u(4)", "T1u", "Tu", "Tu"),
      becomes("", "T2u", "Tu", "Tu"),
      becomes("", "Gu", "Au + Tu", "Au + Tu"),
      becomes("", "Hu", "Eu + Tu", "Eu + Tu"),
    ],
    librations: becomes("", "T1g", "Tg", "Tg"),
    translations: becomes("", "T1u", "Tu", "Tu"),
    compare: "labels",
    source:
      "M. S. Dresselhaus, G. Dresselhaus, P. C. Eklund, Science of Fullerenes and Carbon Nanotubes, Academic Press 1996",
  },
  {
    fixture: "fullerene-pa-3",
    byHand: true,
    unit: "C60",
    unitsInPrimitiveCell: 4,
    freeGroup: "Ih",
    siteGroup: "C3i",
    factorGroup: "Th",
    axes: "cubic",
    internal: [
      becomes("Ag(1) Ag(2)", "Ag", "Ag", "Ag + Tg"),
      becomes("", "T1g", "Ag + Eg", "Ag + Eg + 3Tg"),
      becomes("", "T2g", "Ag + Eg", "Ag + Eg + 3Tg"),
      becomes("", "Gg", "2Ag + Eg", "2Ag + Eg + 4Tg"),
      becomes("Hg(1) Hg(2) Hg(3) Hg(4) Hg(5) Hg(6) Hg(7) Hg(8)", "Hg", "Ag + 2Eg", "Ag + 2Eg + 5Tg"),
      becomes("", "Au", "Au", "Au + Tu"),
      becomes("T1u(1) T1u(2) T1u(3) T1u(4)", "T1u", "Au + Eu", "Au + Eu + 3Tu"),
      becomes("", "T2u", "Au + Eu", "Au + Eu + 3Tu"),
      becomes("", "Gu", "2Au + Eu", "2Au + Eu + 4Tu"),
      becomes("", "Hu", "Au + 2Eu", "Au + 2Eu + 5Tu"),
    ],
    librations: becomes("", "T1g", "Ag + Eg", "Ag + Eg + 3Tg"),
    translations: becomes("", "T1u", "Au + Eu", "Au + Eu + 3Tu"),
    compare: "labels",
    source: "P. H. M. van Loosdrecht, P. J. M. van Bentum, G. Meijer, Physical Review Letters 68 (1992) 1176",
  },
];
