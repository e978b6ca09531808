import { describe, expect, test } from "vitest";
import {
  bondsOf,
  covalentRadius,
  crystalOf,
  element,
  hillFormula,
  metricOf,
  molecularUnits,
  radiusSum,
  sequenceFormula,
  unitFormula,
  type Vec3,
} from "../../lib/structure/index.ts";
import { spaceGroup } from "../../lib/symmetry/index.ts";
import { atom } from "../support/crystals.ts";

type Place = readonly [element: string, x: number, y: number, z: number];

/** A cluster alone in a large cell; angstrom. */
function cluster(places: readonly Place[]) {
  const metric = metricOf({ a: 40, b: 40, c: 40, alpha: 90, beta: 90, gamma: 90 });
  const sites = places.map(([symbol, x, y, z], i) =>
    atom(`${symbol}${i + 1}`, symbol, [x / 40 + 0.5, y / 40 + 0.5, z / 40 + 0.5]),
  );
  return crystalOf({ name: "cluster", metric, group: spaceGroup([]), sites });
}

function pieces(places: readonly Place[]): string[] {
  const { units, loneAtoms } = molecularUnits(cluster(places));
  return [...units.map((u) => u.formula), ...loneAtoms.map((a) => a.element)].sort();
}

const OCTAHEDRON: readonly Vec3[] = [
  [1, 0, 0],
  [-1, 0, 0],
  [0, 1, 0],
  [0, -1, 0],
  [0, 0, 1],
  [0, 0, -1],
];
const TETRAHEDRON: readonly Vec3[] = [
  [1, 1, 1],
  [1, -1, -1],
  [-1, 1, -1],
  [-1, -1, 1],
].map((v) => v.map((e) => e / Math.sqrt(3)) as unknown as Vec3);

/** Linear ligands pointing at a metal: elements and their distances from it, angstrom. */
function complex(metal: string, directions: readonly Vec3[], ...ligand: readonly [string, number][]): Place[] {
  const places: Place[] = [[metal, 0, 0, 0]];
  for (const [x, y, z] of directions) for (const [symbol, d] of ligand) places.push([symbol, d * x, d * y, d * z]);
  return places;
}

/** Water or ammonia round a metal, the hydrogen atoms behind the donor atom. */
function hydrated(
  metal: string,
  directions: readonly Vec3[],
  donor: string,
  distance: number,
  hydrogen: number,
): Place[] {
  const places: Place[] = [[metal, 0, 0, 0]];
  for (const u of directions) {
    const at = (d: number, v: Vec3, s: number): Place => [
      "H",
      d * u[0] + s * v[0],
      d * u[1] + s * v[1],
      d * u[2] + s * v[2],
    ];
    places.push([donor, distance * u[0], distance * u[1], distance * u[2]]);
    const p: Vec3 = Math.abs(u[0]) > 0.9 ? [0, 1, 0] : [1, 0, 0];
    const k = p[0] * u[0] + p[1] * u[1] + p[2] * u[2];
    const flat: Vec3 = [p[0] - k * u[0], p[1] - k * u[1], p[2] - k * u[2]];
    const size = Math.hypot(...flat);
    const v: Vec3 = [flat[0] / size, flat[1] / size, flat[2] / size];
    const w: Vec3 = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
    for (let h = 0; h < hydrogen; h++) {
      const a = (2 * Math.PI * h) / hydrogen;
      const out: Vec3 = [0, 1, 2].map((i) => Math.cos(a) * v[i]! + Math.sin(a) * w[i]!) as unknown as Vec3;
      places.push(at(distance + 0.5, out, 0.8));
    }
  }
  return places;
}

/** A vanadyl ion with water in its equatorial plane, near enough to its short bond for one shell. */
function aquavanadyl(): Place[] {
  const water = hydrated("V", OCTAHEDRON.slice(0, 4), "O", 1.85, 2);
  return [...water, ["O", 0, 0, 1.6]];
}

describe("covalent radii", () => {
  test("are there for the first 96 elements, in order, and for no other", () => {
    const symbols = "H He Li C N O Si S Cl Ca Fe Mo Cs W Pb U Cm".split(" ");
    for (const symbol of symbols) expect(covalentRadius(symbol)).toBeGreaterThan(0.2);
    const known = Array.from({ length: 118 }, (_, i) => i + 1);
    const all =
      "H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar K Ca Sc Ti V Cr Mn Fe Co Ni Cu Zn Ga Ge As Se Br Kr Rb Sr Y Zr Nb Mo Tc Ru Rh Pd Ag Cd In Sn Sb Te I Xe Cs Ba La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Hf Ta W Re Os Ir Pt Au Hg Tl Pb Bi Po At Rn Fr Ra Ac Th Pa U Np Pu Am Cm";
    expect(all.split(" ").map((s) => element(s)!.number)).toEqual(known.slice(0, 96));
    for (const s of all.split(" ")) expect(covalentRadius(s)).toBeGreaterThan(0);
    expect(covalentRadius("Bk")).toBeNull();
    expect(covalentRadius("D")).toBe(covalentRadius("H"));
  });

  // bond lengths of gas molecules; D. R. Lide (ed.), Handbook of Chemistry and Physics, section 9 (from memory)
  test.each([
    ["C", "C", 1.535],
    ["C", "H", 1.09],
    ["N", "H", 1.012],
    ["Cl", "Cl", 1.988],
    ["Si", "Cl", 2.02],
    ["S", "S", 2.055],
    ["I", "I", 2.666],
  ] as const)("add up to the length of a single bond %s-%s", (a, b, length) => {
    expect(Math.abs(radiusSum(a, b)! - length)).toBeLessThan(0.12);
  });
});

describe("bonds to metals", () => {
  test.each([
    ["hexacyanoferrate", complex("Fe", OCTAHEDRON, ["C", 1.92], ["N", 3.08]), ["Fe(CN)6"]],
    ["tetracarbonylnickel", complex("Ni", TETRAHEDRON, ["C", 1.84], ["O", 2.98]), ["Ni(CO)4"]],
    ["hexaamminecobalt", hydrated("Co", OCTAHEDRON, "N", 1.97, 3), ["Co(NH3)6"]],
    ["hexaaquanickel", hydrated("Ni", OCTAHEDRON, "O", 2.06, 2), [...new Array(6).fill("H2O"), "Ni"]],
    ["vanadyl with water", aquavanadyl(), [...new Array(4).fill("H2O"), "VO"]],
    ["hydroxide round magnesium", hydrated("Mg", OCTAHEDRON, "O", 2.1, 1), ["Mg", ...new Array(6).fill("OH")]],
    ["hydrated calcium", hydrated("Ca", OCTAHEDRON, "O", 2.37, 2), ["Ca", ...new Array(6).fill("H2O")]],
    ["hydrated sodium", hydrated("Na", OCTAHEDRON, "O", 2.4, 2), [...new Array(6).fill("H2O"), "Na"]],
    ["thiocyanate by nitrogen", complex("Co", TETRAHEDRON, ["N", 1.96], ["C", 3.12], ["S", 4.75]), ["Co(SCN)4"]],
    [
      "cyanide by its nitrogen",
      complex("Fe", OCTAHEDRON, ["N", 2.03], ["C", 3.18]),
      [...new Array(6).fill("CN"), "Fe"],
    ],
    ["chromate", complex("Cr", TETRAHEDRON, ["O", 1.65]), ["CrO4"]],
    ["chromium oxide", complex("Cr", OCTAHEDRON, ["O", 1.99]), ["Cr", ...new Array(6).fill("O")]],
    ["permanganate", complex("Mn", TETRAHEDRON, ["O", 1.61]), ["MnO4"]],
    ["perrhenate", complex("Re", TETRAHEDRON, ["O", 1.72]), ["ReO4"]],
    ["octahedral tungstate", complex("W", OCTAHEDRON, ["O", 1.92]), ["WO6"]],
    ["titanate", complex("Ti", OCTAHEDRON, ["O", 1.95]), [...new Array(6).fill("O"), "Ti"]],
    ["thiomolybdate", complex("Mo", TETRAHEDRON, ["S", 2.18]), ["MoS4"]],
    ["molybdenum disulfide", complex("Mo", OCTAHEDRON, ["S", 2.41]), ["Mo", ...new Array(6).fill("S")]],
    ["hexachlorostannate", complex("Sn", OCTAHEDRON, ["Cl", 2.42]), ["SnCl6"]],
    ["hexafluorosilicate", complex("Si", OCTAHEDRON, ["F", 1.69]), ["SiF6"]],
    ["iron dichloride", complex("Fe", OCTAHEDRON, ["Cl", 2.5]), [...new Array(6).fill("Cl"), "Fe"]],
    ["sodium chloride", complex("Na", OCTAHEDRON, ["Cl", 2.82]), [...new Array(6).fill("Cl"), "Na"]],
    ["alanate", complex("Al", TETRAHEDRON, ["H", 1.61]), ["AlH4"]],
  ] as const)("%s", (_, places, expected) => {
    expect(pieces(places)).toEqual([...expected].sort());
  });

  test("leave equatorial oxygen of uranyl out, and keep the shell of a strained octahedron whole", () => {
    const uranyl: Place[] = [
      ["U", 0, 0, 0],
      ["O", 0, 0, 1.77],
      ["O", 0, 0, -1.77],
    ];
    for (const [x, y] of OCTAHEDRON.slice(0, 4)) uranyl.push(["O", 2.35 * x, 2.35 * y, 0]);
    expect(pieces(uranyl)).toEqual(["O", "O", "O", "O", "UO2"]);
    const strained: Place[] = [["W", 0, 0, 0]];
    [1.79, 1.79, 1.91, 1.91, 2.13, 2.13].forEach((d, i) => {
      const [x, y, z] = OCTAHEDRON[i]!;
      strained.push(["O", d * x, d * y, d * z]);
    });
    expect(pieces(strained)).toEqual(["WO6"]);
  });

  test("name the rule and the range of every pair", () => {
    const { choice } = bondsOf(cluster(complex("Fe", OCTAHEDRON, ["C", 1.92], ["N", 3.08])));
    expect(choice.bonded).toEqual([
      {
        elements: ["C", "N"],
        rule: "non-metals",
        count: 6,
        shortest: expect.closeTo(1.16, 6),
        longest: expect.closeTo(1.16, 6),
      },
      {
        elements: ["Fe", "C"],
        rule: "carbon ligand",
        count: 6,
        shortest: expect.closeTo(1.92, 6),
        longest: expect.closeTo(1.92, 6),
      },
    ]);
  });

  test("close a chelate ring with oxygen once nitrogen holds the metal", () => {
    const glycinate: Place[] = [
      ["Cu", 0, 0, 0],
      ["N", 1.98, 0, 0],
      ["C", 2.5, 1.39, 0],
      ["C", 1.4, 2.42, 0],
      ["O", 0.2, 1.95, 0],
      ["O", 1.6, 3.63, 0],
    ];
    expect(pieces(glycinate)).toEqual(["Cu(C2NO2)"]);
    expect(pieces(glycinate.filter(([symbol]) => symbol !== "N"))).toEqual(["C2O2", "Cu"]);
  });
});

describe("formulae", () => {
  const star = (centre: string, ...ligands: string[]) => ({
    elements: [centre, ...ligands],
    bonds: ligands.map((_, i) => [0, i + 1] as const),
  });

  test.each([
    [star("S", "O", "O", "O", "O"), "SO4", "O4S"],
    [star("Cl", "O", "O", "O", "O"), "ClO4", "ClO4"],
    [star("N", "H", "H", "H", "H"), "NH4", "H4N"],
    [star("O", "H", "H"), "H2O", "H2O"],
    [star("O", "D", "D"), "D2O", "D2O"],
    [star("O", "H"), "OH", "HO"],
    [star("C", "O", "O", "O"), "CO3", "CO3"],
    [star("C", "N", "S"), "SCN", "CNS"],
    [star("C", "O", "N"), "OCN", "CNO"],
    [star("C", "H", "H", "H", "H"), "CH4", "CH4"],
    [star("Pt", "Cl", "Cl", "N"), "PtNCl2", "Cl2NPt"],
    [star("S", "S", "O", "O", "O"), "S2O3", "O3S2"],
    [
      {
        elements: ["C", "O", "O", "O", "H"],
        bonds: [
          [0, 1],
          [0, 2],
          [0, 3],
          [3, 4],
        ],
      },
      "HCO3",
      "CHO3",
    ],
    [
      {
        elements: ["C", "O", "O", "H"],
        bonds: [
          [0, 1],
          [0, 2],
          [0, 3],
        ],
      },
      "CHO2",
      "CHO2",
    ],
    [
      {
        elements: ["B", "O", "O", "O", "H", "H", "H"],
        bonds: [
          [0, 1],
          [0, 2],
          [0, 3],
          [1, 4],
          [2, 5],
          [3, 6],
        ],
      },
      "B(OH)3",
      "BH3O3",
    ],
    [
      {
        elements: ["O", "Si", "Si", "O", "O", "O", "O", "O", "O"],
        bonds: [
          [0, 1],
          [0, 2],
          [1, 3],
          [1, 4],
          [1, 5],
          [2, 6],
          [2, 7],
          [2, 8],
        ],
      },
      "Si2O7",
      "O7Si2",
    ],
  ] as const)("%j is %s, after Hill %s", (group, formula, hill) => {
    expect(unitFormula(group)).toBe(formula);
    expect(hillFormula(group.elements)).toBe(hill);
  });

  test("follow the sequence of elements where nothing is bonded by name", () => {
    expect(sequenceFormula(["O", "Al", "Si", "O", "O", "O", "Na"])).toBe("NaAlSiO4");
    expect(sequenceFormula(["S", "Zn"])).toBe("ZnS");
  });
});
