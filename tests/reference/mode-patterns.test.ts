import { describe, expect, it } from "vitest";
import { modePatterns } from "../../lib/vibrations/index.ts";
import { fixture } from "../support/crystals.ts";

type Vector = readonly [number, number, number];
/** Cartesian displacement of an atom by its site and its Cartesian position in the cell of the file. */
type Motion = (site: string, at: Vector) => Vector;

interface Published {
  readonly crystal: string;
  readonly species: string;
  /** Number of repeats that the motion must lie in: 1 where the species fixes it. */
  readonly repeats: number;
  readonly what: string;
  readonly motion: Motion;
}

const STILL: Vector = [0, 0, 0];
const only =
  (element: string, motion: (at: Vector) => Vector): Motion =>
  (site, at) =>
    site.startsWith(element) ? motion(at) : STILL;
/** 1 or -1 by the half of the cell along an edge in which an atom lies. */
const half = (x: number, edge: number): number => ((((x / edge) % 1) + 1.25) % 1 < 0.5 ? 1 : -1);

const RUTILE = { a: 4.594, c: 2.959 };
/** 1 for the titanium at the corner and the oxygens beside it in the plane z = 0, -1 half a cell above. */
const layer = (at: Vector): number => half(at[2], RUTILE.c);
/** Unit vector from the titanium in the plane of an oxygen of rutile, along [110] or [1-10], to it. */
function fromTitanium(at: Vector): Vector {
  const s = Math.SQRT1_2;
  const centre = layer(at) > 0 ? 0 : 0.5;
  const x = at[0] / RUTILE.a - centre;
  const [dx, dy] = [x - Math.round(x), at[1] / RUTILE.a - centre];
  return [Math.sign(dx) * s, Math.sign(dy - Math.round(dy)) * s, 0];
}
const across = ([x, y]: Vector): Vector => [-y, x, 0];
const times = (k: number, [x, y, z]: Vector): Vector => [k * x, k * y, k * z];

/**
 * Rutile: S. P. S. Porto, P. A. Fleury and T. C. Damen, Phys. Rev. 154 (1967) 522, figure of the modes (from memory);
 * the others: textbook descriptions, G. Turrell, Infrared and Raman Spectra of Crystals, Academic Press 1972, and
 * G. Herzberg, Infrared and Raman Spectra, Van Nostrand 1945 (from memory).
 */
const PUBLISHED: readonly Published[] = [
  {
    crystal: "rutile",
    species: "A1g",
    repeats: 1,
    what: "oxygens breathe about titanium",
    motion: only("O", (at) => fromTitanium(at)),
  },
  {
    crystal: "rutile",
    species: "B2g",
    repeats: 1,
    what: "oxygens go out at one titanium and in at the other",
    motion: only("O", (at) => times(layer(at), fromTitanium(at))),
  },
  {
    crystal: "rutile",
    species: "B1g",
    repeats: 1,
    what: "the oxygens of both titaniums turn about z in opposite senses",
    motion: only("O", (at) => times(layer(at), across(fromTitanium(at)))),
  },
  {
    crystal: "rutile",
    species: "A2g",
    repeats: 1,
    what: "the oxygens of both titaniums turn about z in the same sense",
    motion: only("O", (at) => across(fromTitanium(at))),
  },
  {
    crystal: "rutile",
    species: "B1u",
    repeats: 2,
    what: "titaniums go up and down by turns",
    motion: only("Ti", (at) => [0, 0, layer(at)]),
  },
  {
    crystal: "calcite",
    species: "A1g",
    repeats: 1,
    what: "carbonate breathes",
    motion: only("O", ([x, y]) => [x / Math.hypot(x, y), y / Math.hypot(x, y), 0]),
  },
  {
    crystal: "halite",
    species: "T1u",
    repeats: 2,
    what: "sodium moves against chlorine",
    motion: (site) => (site === "Na" ? [0, 0, 1] : [0, 0, -1]),
  },
  {
    crystal: "diamond",
    species: "T2g",
    repeats: 1,
    what: "the two sublattices move against each other",
    motion: (_site, at) => [0, 0, (Math.round((at[0] + at[1] + at[2]) / (3.567 / 4)) % 4) % 2 === 0 ? 1 : -1],
  },
  {
    crystal: "fluorite",
    species: "T2g",
    repeats: 1,
    what: "fluorines move against each other, calcium rests",
    motion: only("F", (at) => [
      at.reduce((sign, x) => (Math.round((2 * x) / 5.463 - 0.5) % 2 === 0 ? sign : -sign), 1),
      0,
      0,
    ]),
  },
  {
    crystal: "strontium-titanate",
    species: "T2u",
    repeats: 1,
    what: "of the oxygens on three bonds of titanium one rests and the others move against each other, across their bonds",
    motion: only("O", ([x, y]) => [x > 1 ? 0 : y > 1 ? 1 : -1, 0, 0]),
  },
  {
    crystal: "wurtzite",
    species: "E2",
    repeats: 2,
    what: "atoms of one kind move against each other across the axis",
    motion: only("S", ([, , z]) => [0, half(z + 0.1, 6.26), 0]),
  },
];

/** Square of the length of the part of a motion in the span of a species, over the whole square. */
function share({ crystal: name, species, motion }: Published): { share: number; repeats: number } {
  const crystal = fixture(name);
  const { patterns, atoms, sites, group, frame } = modePatterns(crystal);
  const own = patterns.filter((p) => group.irreps[p.irrep]!.label === species);
  const wanted = atoms.map((a) => {
    const [u, v, w] = a.position;
    const [, b1, c1, , b2, c2, , , c3] = frame.toCartesian;
    const nearest = (x: number) => (x > 0.6 ? x - 1 : x); // the oxygens about the axis through the origin
    const [x, y] = name === "calcite" ? [nearest(u), nearest(v)] : [u, v];
    return motion(sites[a.site]!.label, [frame.toCartesian[0] * x + b1 * y + c1 * w, b2 * y + c2 * w, c3 * w]);
  });
  const whole = wanted.flat().reduce((s, e) => s + e * e, 0);
  expect(whole).toBeGreaterThan(0.5);
  const along = own.flatMap((p) =>
    p.partners.map((partner) =>
      p.atoms.reduce((s, a, k) => s + wanted[a]!.reduce((t, e, c) => t + e * partner[3 * k + c]!, 0), 0),
    ),
  );
  return { share: along.reduce((s, e) => s + e * e, 0) / whole, repeats: own.length };
}

describe("published patterns of modes", () => {
  it.each(PUBLISHED)("$crystal, $species: $what", (published) => {
    const found = share(published);
    expect(found.repeats).toBe(published.repeats);
    expect(found.share).toBeCloseTo(1, 9);
  });
});
