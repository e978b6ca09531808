import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  formatDirection,
  formatGeometry,
  parseDirection,
  parseGeometry,
  type WrittenDirection,
} from "../../lib/vibrations/index.ts";
import { problemOf } from "../support/problem-of.ts";

const index = fc.oneof(fc.integer({ min: -3, max: 3 }), fc.integer({ min: -120, max: 120 }));
const direction: fc.Arbitrary<WrittenDirection> = fc.oneof(
  fc.record({
    kind: fc.constant("axis" as const),
    axis: fc.constantFrom("x" as const, "y" as const, "z" as const),
    negative: fc.boolean(),
  }),
  fc.record({
    kind: fc.constantFrom("direction" as const, "normal" as const),
    indices: fc.tuple(index, index, index),
    negative: fc.boolean(),
  }),
);
const geometry = fc.record({
  incident: direction,
  incidentPolarisation: direction,
  scatteredPolarisation: direction,
  scattered: direction,
});

describe("a geometry in Porto's notation", () => {
  it("is read back as it was written", () => {
    fc.assert(
      fc.property(geometry, direction, (g, d) => {
        expect(parseGeometry(formatGeometry(g))).toEqual(g);
        expect(parseDirection(formatDirection(d))).toEqual(d);
      }),
    );
  });

  it.each([
    [" z ( x y ) - z ", "z(xy)-z"],
    ["Z(X,Y)-Z", "z(xy)-z"],
    ["z(xy)\u2212z", "z(xy)-z"], // a minus sign
    ["z\u0304(xy)z", "-z(xy)z"], // a bar above the letter, as printed
    ["z\u0305(xy)z\u0305", "-z(xy)-z"],
    ["[1 -1 0]([110] z)[1,-1,0]", "[1-10]([110]z)[1-10]"],
    ["(10 1 0)(z z)-( 10,1,0 )", "(10 1 0)(zz)-(10 1 0)"],
    ["-[110](zz)[\u2212110]", "-[110](zz)[-110]"],
    ["z(x[010])-z", "z(x[010])-z"],
    ["(104)((010)[42-1])-(104)", "(104)((010)[42-1])-(104)"],
  ])("may be spelled %s", (text, plain) => expect(formatGeometry(parseGeometry(text))).toBe(plain));

  it.each([
    ["", 0, "it ends too early"],
    ["z(xy)", 5, "it ends too early"],
    ["z(xy-z", 4, 'character 5, "-", does not fit'],
    ["z(x)-z", 3, 'character 4, ")", does not fit'],
    ["z(xyz)-z", 4, 'character 5, "z", does not fit'],
    ["z xy -z", 2, 'character 3, "x", does not fit'],
    ["a(bc)-a", 0, 'character 1, "a", does not fit'],
    ["--z(xy)z", 1, 'character 2, "-", does not fit'],
    ["[11](zz)-[11]", 3, 'character 4, "]", does not fit'],
    ["[1.5 0 0](zz)z", 2, 'character 3, ".", does not fit'],
    ["[110)(zz)z", 4, 'character 5, ")", does not fit'],
    ["z(xy)-z; x(yz)-x", 7, 'character 8, ";", does not fit'],
  ])("%j is refused where it stops to make sense", (text, at, why) => {
    const problem = problemOf(() => parseGeometry(text));
    expect(problem.code).toBe("geometry-unreadable");
    expect(problem.message).toBe(`"${text}" is not a scattering geometry: ${why}`);
    expect(problem.span).toEqual({ start: at, end: Math.min(at + 1, text.length) });
    expect(problem.hint).toBe("write it like z(xy)-z or [110](zz)-[110]");
  });

  it("is refused at a character that belongs nowhere, wherever it stands", () => {
    fc.assert(
      fc.property(geometry, fc.nat(), fc.constantFrom(..."w#;/*{\u00e9"), (g, place, wrong) => {
        const text = formatGeometry(g);
        const at = place % (text.length + 1);
        const { span } = problemOf(() => parseGeometry(text.slice(0, at) + wrong + text.slice(at)));
        expect(text.slice(span!.start, at)).toMatch(/^-?$/); // a minus belongs to the number after it
        expect(span!.end).toBe(span!.start + 1);
      }),
    );
  });

  it("has single directions that are refused in their own words", () => {
    const { message, hint } = problemOf(() => parseDirection("[12]"));
    expect(message).toBe('"[12]" is not a direction: character 4, "]", does not fit');
    expect(hint).toBe("write x, -z, [110] for a row or (104) for a face normal");
  });
});
