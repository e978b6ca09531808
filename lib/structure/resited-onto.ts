import { InputProblem } from "../problem.ts";
import { IDENTITY_TRANSFORMATION, type Transformation } from "../symmetry/index.ts";
import type { Vec3 } from "./cell.ts";
import { changeOfCell } from "./change-of-cell.ts";
import { compareStructures } from "./comparison-answer.ts";
import type { ComparisonOptions } from "./comparison-limits.ts";
import { type Crystal, crystalOf } from "./crystal.ts";
import { polarSenseNotes } from "./polar-sense.ts";
import { labelsOf, type Resited, resiteAnswer, uncertaintyNotes } from "./resite-answer.ts";
import { UNITS_IN_CELL, unitsInCell } from "./units-in-cell.ts";

/**
 * A structure compared with another, and where the two agree, written on the axes and origin of the other.
 * @example
 * ```ts
 * const calcite = crystalFromBlock(requireClean(readCif(text)).blocks[0]!);
 * const other = resited(calcite, { kind: "setting", text: "a,b,c;0,0,1/4" }).crystal;
 * const { answer } = resitedOnto(calcite, other);
 * [answer.comparison!.verdict, answer.P, answer.p]; // ["same", "a,b,c", "0,0,1/4"]
 * ```
 * @throws InputProblem as `compareStructures`
 */
export function resitedOnto(crystal: Crystal, other: Crystal, options: ComparisonOptions = {}): Resited {
  const { answer: comparison, match } = compareStructures(crystal, other, options);
  const sense = match && comparison.verdict !== "different" ? polarSenseNotes(crystal, other, match.P) : [];
  const stay = (note: string[]): Resited => ({
    crystal,
    answer: { ...unchanged(crystal), comparison },
    notes: [...sense, ...note],
  });
  if (!match || comparison.verdict === "different") return stay([]);
  if (comparison.hand === "other")
    return stay(["not written on the axes of the second file: axes of the other hand would turn the structure over"]);
  if (!match.exact)
    return stay(["not written on the axes of the second file: the operations of the two do not agree about an origin"]);
  const { origin, shift } = match.exact;
  try {
    const change: Transformation = { P: match.P, p: origin };
    const { crystal: carried, rotations } = changeOfCell(shifted(crystal, shift), change);
    const changed = unitsInCell(carried);
    const labels = labelsOf(crystal, changed);
    const notes =
      rotations.after < rotations.before
        ? [
            `on the axes of the second file ${rotations.after} of the ${rotations.before} rotation parts of its space group are left`,
          ]
        : [];
    notes.push(...sense, UNITS_IN_CELL, ...uncertaintyNotes(crystal, change));
    return {
      crystal: changed,
      answer: { ...resiteAnswer(crystal, changed, change, shift, labels), comparison },
      notes,
    };
  } catch (e) {
    if (!(e instanceof InputProblem)) throw e;
    return stay([`not written on the axes of the second file: ${e.message}`]);
  }
}

function unchanged(crystal: Crystal) {
  const labels = crystal.sites.map((s) => s.label);
  return resiteAnswer(crystal, crystal, IDENTITY_TRANSFORMATION, [0, 0, 0], labels);
}

/** The crystal with its origin moved along directions that its group leaves free; fractional. */
function shifted(crystal: Crystal, shift: Vec3): Crystal {
  if (shift.every((e) => e === 0)) return crystal;
  const { name, metric, group, identified, tolerance } = crystal;
  const sites = crystal.sites.map(({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...site }) => ({
    ...site,
    position: symmetry.point.map((e, i) => e - shift[i]!) as unknown as Vec3,
  }));
  return crystalOf({ name, metric, group, identified, sites, tolerance });
}
