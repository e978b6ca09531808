import { IDENTITY, type IntMat3, multiply, multiplyRatMat, ratMat3, ratVec3 } from "../../lib/algebra/index.ts";
import { apply3, type Crystal, crystalOf, type Vec3 } from "../../lib/structure/index.ts";
import { transformPoint } from "../../lib/symmetry/index.ts";
import { inSetting } from "./crystals.ts";

/** The same crystal on other axes, with another origin, other images listed, in another order. */
export function retold(crystal: Crystal, random: () => number): Crystal {
  const { group } = crystal;
  const P = multiplyRatMat(group.primitive, ratMat3(randomUnimodular(random)));
  const p = ratVec3([0, 1, 2].map(() => Math.floor(random() * 24)) as unknown as [number, number, number], 24);
  const shift = freeShift(crystal, random);
  const sites = crystal.sites
    .map(({ images: _, alsoListedAs: __, sharesPositionOf: ___, symmetry, ...site }) => {
      const a = group.operations[Math.floor(random() * group.operations.length)]!;
      const position = transformPoint(a, symmetry.point).map((e, i) => e + shift[i]!) as unknown as Vec3;
      return { site: { ...site, position }, key: random() };
    })
    .sort((a, b) => a.key - b.key)
    .map(({ site }) => site);
  const { name, metric, tolerance } = crystal;
  return inSetting(crystalOf({ name, metric, group, sites, tolerance }), { P, p })!;
}

/** A shift of the origin that no operation opposes. */
function freeShift({ group }: Crystal, random: () => number): Vec3 {
  const v: Vec3 = [random(), random(), random()];
  const sum = [0, 0, 0];
  for (const { W } of group.representatives) {
    apply3(W, v).forEach((e, i) => {
      sum[i]! += e / group.representatives.length;
    });
  }
  return sum as unknown as Vec3;
}

function randomUnimodular(random: () => number): IntMat3 {
  let m: IntMat3 = IDENTITY;
  for (let k = 0; k < 4; k++) {
    const i = Math.floor(random() * 3);
    const j = (i + 1 + Math.floor(random() * 2)) % 3;
    const e = [...IDENTITY];
    e[3 * i + j] = random() < 0.5 ? -1 : 1;
    m = multiply(m, e as unknown as IntMat3);
  }
  return m;
}
