import { describe, expect, it } from "vitest";
import { polariseAnswer } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

/**
 * What scatters in a geometry, and as which part of a polar mode, in crystals whose first polarised spectra are
 * classics; all from memory. A species alone has no dipole, or lies at an angle to the wavevector ("oblique": both LO
 * and TO in right-angle scattering). Only species with modes are named.
 */
interface Classic {
  readonly crystal: string;
  readonly source: string;
  readonly geometries: readonly (readonly [geometry: string, seen: string])[];
}

const CLASSICS: readonly Classic[] = [
  {
    crystal: "zincite",
    source: "T. C. Damen, S. P. S. Porto, B. Tell, Phys. Rev. 142 (1966) 570; table I of Arguello, Rousseau, Porto",
    geometries: [
      ["x(zz)y", "A1 TO"],
      ["x(yx)y", "E2"],
      ["x(yz)y", "E1 oblique"],
      ["x(zx)y", "E1 oblique"],
    ],
  },
  {
    crystal: "wurtzite",
    source: "C. A. Arguello, D. L. Rousseau, S. P. S. Porto, Phys. Rev. 181 (1969) 1351, table of configurations",
    geometries: [
      ["z(xx)-z", "A1 LO + E2"],
      ["z(yy)-z", "A1 LO + E2"],
      ["z(xy)-z", "E2"],
      ["x(yy)-x", "A1 TO + E2"],
      ["x(zz)-x", "A1 TO"],
      ["x(yz)-x", "E1 TO"],
      ["x(zy)-x", "E1 TO"],
      ["y(xx)-y", "A1 TO + E2"],
      ["y(xz)-y", "E1 TO"],
    ],
  },
  {
    crystal: "lithium-niobate", // 3m with the mirror plane normal to x, E(y) and E(-x)
    source: "R. F. Schaufele, M. J. Weber, Phys. Rev. 152 (1966) 705; I. P. Kaminow, W. D. Johnston, 160 (1967) 519",
    geometries: [
      ["z(xx)-z", "A1 LO + E TO"],
      ["z(yy)-z", "A1 LO + E TO"],
      ["z(xy)-z", "E TO"],
      ["x(zz)-x", "A1 TO"],
      ["x(yy)-x", "A1 TO + E TO"],
      ["x(yz)-x", "E TO"],
      ["y(xx)-y", "A1 TO + E LO"],
      ["y(zz)-y", "A1 TO"],
      ["y(xz)-y", "E TO"],
    ],
  },
  {
    crystal: "alpha-quartz", // 32 with the twofold axis along x, E(x) and E(y); A1 has no dipole
    source: "J. F. Scott, S. P. S. Porto, Phys. Rev. 161 (1967) 903; tensors of Loudon",
    geometries: [
      ["x(zz)y", "A1"],
      ["x(zz)-x", "A1"],
      ["x(yy)-x", "A1 + E LO"],
      ["x(yz)-x", "E LO"],
      ["y(xx)-y", "A1 + E TO"],
      ["y(xz)-y", "E LO"],
      ["z(xx)-z", "A1 + E TO"],
      ["z(xy)-z", "E TO"],
      ["x(yz)y", "E oblique"],
    ],
  },
  {
    crystal: "sphalerite", // cubic faces show LO alone, (110) faces TO alone, (111) faces both
    source:
      "A. Mooradian, G. B. Wright, Solid State Commun. 4 (1966) 431; O. Brafman, S. S. Mitra, Phys. Rev. 171 (1968) 931",
    geometries: [
      ["z(xx)-z", ""],
      ["z(xy)-z", "T2 LO"],
      ["z([110][110])-z", "T2 LO"],
      ["z([110][1-10])-z", ""],
      ["[110]([1-10][1-10])-[110]", "T2 TO"],
      ["[110](z[1-10])-[110]", "T2 TO"],
      ["[110](zz)-[110]", ""],
      ["[111]([1-10][1-10])-[111]", "T2 oblique"],
      ["[111]([1-10][11-2])-[111]", "T2 TO"],
    ],
  },
  {
    crystal: "barium-titanate", // tetragonal, 4mm
    source: "M. DiDomenico, S. H. Wemple, S. P. S. Porto, R. P. Bauman, Phys. Rev. 174 (1968) 522",
    geometries: [
      ["x(zz)-x", "A1 TO"],
      ["x(zy)-x", "E TO"],
      ["z(xx)-z", "A1 LO + B1"],
      ["z(xy)-z", ""],
      ["x(zx)y", "E oblique"],
    ],
  },
  {
    crystal: "calcite",
    source: "S. P. S. Porto, J. A. Giordmaine, T. C. Damen, Phys. Rev. 147 (1966) 608",
    geometries: [
      ["y(zz)x", "A1g"],
      ["y(xx)z", "A1g + Eg"],
      ["y(xy)x", "Eg"],
      ["y(zx)z", "Eg"],
      ["z(xy)-z", "Eg"],
    ],
  },
  {
    crystal: "rutile",
    source: "S. P. S. Porto, P. A. Fleury, T. C. Damen, Phys. Rev. 154 (1967) 522",
    geometries: [
      ["x(zz)y", "A1g"],
      ["z(xx)y", "A1g + B1g"],
      ["z(xy)x", "B2g"],
      ["x(zx)y", "Eg"],
      ["z([110][1-10])-z", "B1g"],
    ],
  },
];

describe.each(CLASSICS)("polarised scattering of $crystal ($source)", ({ crystal, geometries }) => {
  const answer = polariseAnswer(fixture(crystal), { geometries: geometries.map(([text]) => text) });

  it.each(geometries.map(([text, seen], i) => ({ text, seen, i })))("$text: $seen", ({ text, seen, i }) => {
    const { geometry, allowed } = answer.geometries[i]!;
    expect(geometry).toBe(text);
    expect(allowed.map((a) => (a.part ? `${a.irrep} ${a.part}` : a.irrep)).join(" + ")).toBe(seen);
  });
});
