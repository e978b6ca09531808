import { describe, expect, it } from "vitest";
import { ratDeterminant } from "../../lib/algebra/index.ts";
import { operationsFromHall } from "../../lib/symmetry/hall-symbol.ts";
import { operationKey } from "../../lib/symmetry/operation.ts";
import { settingOperations } from "../../lib/symmetry/setting-group.ts";
import { settingsOf } from "../../lib/symmetry/settings.ts";
import { reverse } from "../../lib/symmetry/transformation.ts";
import { formatBasis } from "../../lib/symmetry/transformation-text.ts";

/**
 * Short symbols by type in the order of the table. Source: International Tables for Crystallography A (2016), table
 * 1.5.4.4 (extended symbols and settings), from memory; pre-1992 letters in the second list from the same table in
 * older editions.
 */
const ORTHORHOMBIC = ["abc", "ba-c", "cab", "-cba", "bca", "a-cb"] as const;
const SYMBOLS: Readonly<Record<number, string>> = {
  26: "Pmc21 Pcm21 P21ma P21am Pb21m Pm21b",
  29: "Pca21 Pbc21 P21ab P21ca Pc21b Pb21a",
  31: "Pmn21 Pnm21 P21mn P21nm Pn21m Pm21n",
  33: "Pna21 Pbn21 P21nb P21cn Pc21n Pn21a",
  36: "Cmc21 Ccm21 A21ma A21am Bb21m Bm21b",
  39: "Aem2 Bme2 B2em C2me Cm2e Ae2m",
  40: "Ama2 Bbm2 B2mb C2cm Cc2m Am2a",
  41: "Aea2 Bbe2 B2eb C2ce Cc2e Ae2a",
  46: "Ima2 Ibm2 I2mb I2cm Ic2m Im2a",
  51: "Pmma Pmmb Pbmm Pcmm Pmcm Pmam",
  52: "Pnna Pnnb Pbnn Pcnn Pncn Pnan",
  53: "Pmna Pnmb Pbmn Pcnm Pncm Pman",
  54: "Pcca Pccb Pbaa Pcaa Pbcb Pbab",
  57: "Pbcm Pcam Pmca Pmab Pbma Pcmb",
  60: "Pbcn Pcan Pnca Pnab Pbna Pcnb",
  62: "Pnma Pmnb Pbnm Pcmn Pmcn Pnam",
  63: "Cmcm Ccmm Amma Amam Bbmm Bmmb",
  64: "Cmce Ccme Aema Aeam Bbem Bmeb",
  74: "Imma Immb Ibmm Icmm Imcm Imam",
};
const OLDER: Readonly<Record<number, string>> = {
  39: "Abm2 Bma2 B2cm C2mb Cm2a Ac2m",
  41: "Aba2 Bba2 B2cb C2cb Cc2a Ac2a",
  64: "Cmca Ccmb Abma Acam Bbcm Bmab",
};
const MONOCLINIC = ["b", "-b", "c", "-c", "a", "-a"].flatMap((axis) => [1, 2, 3].map((cell) => `${axis}${cell}`));
const FULL: Readonly<Record<number, string>> = {
  5: "C121 A121 I121 A121 C121 I121 A112 B112 I112 " + "B112 A112 I112 B211 C211 I211 C211 B211 I211",
  7: "P1c1 P1n1 P1a1 P1a1 P1n1 P1c1 P11a P11n P11b " + "P11b P11n P11a Pb11 Pn11 Pc11 Pc11 Pn11 Pb11",
  9: "C1c1 A1n1 I1a1 A1a1 C1n1 I1c1 A11a B11n I11b " + "B11b A11n I11a Bb11 Cn11 Ic11 Cc11 Bn11 Ib11",
  13:
    "P12/c1 P12/n1 P12/a1 P12/a1 P12/n1 P12/c1 P112/a P112/n P112/b " +
    "P112/b P112/n P112/a P2/b11 P2/n11 P2/c11 P2/c11 P2/n11 P2/b11",
  14:
    "P121/c1 P121/n1 P121/a1 P121/a1 P121/n1 P121/c1 P1121/a P1121/n P1121/b " +
    "P1121/b P1121/n P1121/a P21/b11 P21/n11 P21/c11 P21/c11 P21/n11 P21/b11",
  15:
    "C12/c1 A12/n1 I12/a1 A12/a1 C12/n1 I12/c1 A112/a B112/n I112/b " +
    "B112/b A112/n I112/a B2/b11 C2/n11 I2/c11 C2/c11 B2/n11 I2/b11",
};
/**
 * New axes in terms of those of the reference setting. Source: International Tables for Crystallography A (2016),
 * tables 1.5.1.1 and 1.5.4.4 (headings), from memory.
 */
const AXES: readonly (readonly [number, string, string])[] = [
  [14, "b1", "a,b,c"],
  [14, "b2", "-a-c,b,a"],
  [14, "b3", "c,b,-a-c"],
  [14, "-b1", "c,-b,a"],
  [14, "c1", "c,a,b"],
  [14, "-c1", "a,c,-b"],
  [14, "a1", "b,c,a"],
  [14, "-a1", "-b,a,c"],
  [62, "ba-c", "b,a,-c"],
  [62, "cab", "c,a,b"],
  [62, "-cba", "-c,b,a"],
  [62, "bca", "b,c,a"],
  [62, "a-cb", "a,-c,b"],
  [75, "C", "a-b,a+b,c"],
  [79, "F", "a-b,a+b,c"],
  [143, "H", "a-b,a+2b,c"],
  [146, ":R", "2/3a+1/3b+1/3c,-1/3a+1/3b+1/3c,-1/3a-2/3b+1/3c"],
  [146, ":H-reverse", "-a,-b,c"],
];
/** Multiple cells of tetragonal and trigonal types; same table, from memory. */
const CELLS: Readonly<Record<number, string>> = {
  85: "C4/a",
  88: "F41/d",
  90: "C4221",
  100: "C4mg1",
  102: "C42mg2",
  107: "F4mm",
  109: "F41dm",
  115: "C-42m",
  122: "F-4d2",
  140: "F4/mmc",
  141: "F41/ddm",
  150: "H312",
  156: "H31m",
  165: "H-31c",
  193: "H63/mmc",
};

const tight = (text: string) => text.replaceAll(" ", "");

describe("symbols of International Tables in other settings", () => {
  it.each(Object.entries(SYMBOLS))("orthorhombic type %s has the settings %s", (number, list) => {
    const settings = settingsOf(Number(number));
    const found = ORTHORHOMBIC.map((axes) => tight(settings.find((s) => s.axes === axes)!.hermannMauguin.short));
    expect(found.join(" ")).toBe(list);
  });

  it.each(Object.entries(OLDER))("type %s was written %s before the letter e", (number, list) => {
    const settings = settingsOf(Number(number));
    const found = ORTHORHOMBIC.map((axes) => tight(settings.find((s) => s.axes === axes)!.hermannMauguin.older!));
    expect(found.join(" ")).toBe(list);
  });

  it.each(Object.entries(FULL))("monoclinic type %s has the settings %s", (number, list) => {
    const settings = settingsOf(Number(number));
    const found = MONOCLINIC.map((axes) => tight(settings.find((s) => s.axes === axes)!.hermannMauguin.full));
    expect(found.join(" ")).toBe(list);
  });

  it.each(Object.entries(CELLS))("type %s on its larger cell is %s", (number, symbol) => {
    const found = settingsOf(Number(number)).filter((s) => /^[CFH]/.test(s.name));
    expect(tight(found[0]!.hermannMauguin.short)).toBe(symbol);
  });
});

describe("axes of the settings", () => {
  it.each(AXES)("type %i in the setting %s has the axes %s", (number, name, axes) => {
    const setting = settingsOf(number).find((s) => s.name === name)!;
    expect(formatBasis(reverse(setting.toReference).P)).toBe(axes);
  });

  it("keep their handedness, so that screw axes keep theirs", () => {
    for (let number = 1; number <= 230; number++) {
      for (const s of settingsOf(number)) expect(ratDeterminant(s.toReference.P).n).toBeGreaterThan(0);
    }
  });
});

/**
 * Hall symbols of the first origin choice and of rhombohedral axes. Source: S. R. Hall, Acta Cryst. A37 (1981) 517, and
 * International Tables for Crystallography B, section 1.4, table of the appendix, from memory.
 */
const HALL: readonly (readonly [number, string, string])[] = [
  [48, "abc:1", "P 2 2 -1n"],
  [50, "abc:1", "P 2 2 -1ab"],
  [59, "abc:1", "P 2 2ab -1ab"],
  [68, "abc:1", "C 2 2 -1ac"],
  [70, "abc:1", "F 2 2 -1d"],
  [85, ":1", "P 4ab -1ab"],
  [86, ":1", "P 4n -1n"],
  [88, ":1", "I 4bw -1bw"],
  [125, ":1", "P 4 2 -1ab"],
  [126, ":1", "P 4 2 -1n"],
  [129, ":1", "P 4ab 2ab -1ab"],
  [130, ":1", "P 4ab 2n -1ab"],
  [133, ":1", "P 4n 2c -1n"],
  [134, ":1", "P 4n 2 -1n"],
  [137, ":1", "P 4n 2n -1n"],
  [138, ":1", "P 4n 2ab -1n"],
  [141, ":1", "I 4bw 2bw -1bw"],
  [142, ":1", "I 4bw 2aw -1bw"],
  [201, ":1", "P 2 2 3 -1n"],
  [203, ":1", "F 2 2 3 -1d"],
  [222, ":1", "P 4 2 3 -1n"],
  [224, ":1", "P 4n 2 3 -1n"],
  [227, ":1", "F 4d 2 3 -1d"],
  [228, ":1", "F 4d 2 3 -1cd"],
  [146, ":R", "P 3*"],
  [148, ":R", "-P 3*"],
  [155, ":R", "P 3* 2"],
  [160, ":R", "P 3* -2"],
  [161, ":R", "P 3* -2n"],
  [166, ":R", "-P 3* 2"],
  [167, ":R", "-P 3* 2n"],
  [14, "b2", "-P 2yn"],
  [14, "c1", "-P 2ac"],
  [15, "b3", "-I 2ya"],
  [62, "cab", "-P 2c 2ab"],
  [62, "a-cb", "-P 2c 2n"],
  [64, "-cba", "-A 2 2ac"],
];

describe("Hall symbols of other settings", () => {
  it.each(HALL)("type %i in the setting %s is %s", (number, name, hall) => {
    const setting = settingsOf(number).find((s) => s.name === name)!;
    const expected = operationsFromHall(hall).operations.map(operationKey).sort();
    expect(settingOperations(setting).map(operationKey).sort()).toEqual(expected);
  });
});
