import { mod, type RatVec3, ratVec3 } from "../algebra/index.ts";
import { type AffineForm, directionsOfForm, formatForm, formThrough, imageOfForm } from "./affine-form.ts";
import type { SpaceGroup } from "./space-group.ts";

/**
 * The plainest way to write a position: of all its equivalent points those with the fewest minus signs, then the
 * smallest constants, then the letter x before y and z. Where a threefold axis permutes x, y, z, few different constants
 * count before small ones (1/2,1/2,1/2 before 0,0,1/2). Of equals the first image. A change of origin makes 0,1/2,1/4 of
 * a position that has 0,0,0 as well.
 */
export function plainestForm(group: SpaceGroup, form: AffineForm): AffineForm {
  const isPoint = directionsOfForm(form).every((v) => v.every((e) => e === 0));
  const isCyclic = group.representatives.some(({ W }) => W.join() === "0,0,1,1,0,0,0,1,0");
  const forms = group.operations.map((a) => {
    const image = imageOfForm(a, form);
    if (isPoint) return image;
    const { M, t } = formThrough(image.t, directionsOfForm(image));
    return { M, t: inCell(t) };
  });
  const ranked = forms.map((f) => ({ form: f, rank: rankOf(f, isCyclic) }));
  return ranked.reduce((best, next) => (compare(next.rank, best.rank) < 0 ? next : best)).form;
}

function inCell({ n, d }: RatVec3): RatVec3 {
  return ratVec3([mod(n[0], d), mod(n[1], d), mod(n[2], d)], d);
}

function rankOf(form: AffineForm, isCyclic: boolean): number[] {
  const text = formatForm(form);
  const constants = form.t.n.map((e) => e / form.t.d);
  const minus = [...text].filter((c) => c === "-").length;
  const letters = new Set(text.match(/[xyz]/g));
  const letter = letters.size === 1 ? "xyz".indexOf([...letters][0]!) : 0;
  const size = isCyclic ? [new Set(constants).size, constants.reduce((a, b) => a + b)] : constants;
  return [minus, ...size, letter];
}

function compare(a: readonly number[], b: readonly number[]): number {
  const i = a.findIndex((e, k) => e !== b[k]);
  return i < 0 ? 0 : a[i]! - b[i]!;
}
