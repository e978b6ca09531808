import { cellOfMetric, crystalOf, type Mat3, metricOf, positionsAnswer, type Vec3 } from "../../lib/structure/index.ts";
import { identifyGroup, type SpaceGroup, settingOperations, settingsOf, spaceGroup } from "../../lib/symmetry/index.ts";
import { atom, invariantMetric } from "../support/crystals.ts";
import { randomNumbers } from "../support/random-structures.ts";
import { type Measurement, ratio } from "./ratio.ts";

const ATOMS = 10_000;
const VOLUME_PER_ATOM = 20; // cubic angstrom
const REFERENCE = "a plain triple loop that writes the same coordinates";

/** Sites on general positions, about so many atoms in all. */
function prepare(type: number) {
  const group = spaceGroup(settingOperations(settingsOf(type)[0]!));
  const identified = identifyGroup(group); // measured by its own bench
  const random = randomNumbers(type);
  const count = Math.ceil(ATOMS / group.operations.length);
  const g = invariantMetric(group, [1, 2, 3]);
  const { volume } = metricOf(cellOfMetric(g));
  const widened = g.map((e) => e * ((VOLUME_PER_ATOM * ATOMS) / volume) ** (2 / 3)) as unknown as Mat3;
  const metric = metricOf(cellOfMetric(widened));
  const sites = Array.from({ length: count }, (_, i) => atom(`O${i}`, "O", [random(), random(), random()]));
  return { name: `type ${type}`, metric, group, identified, sites, tolerance: 1e-4 };
}

/** The images of all points under all operations, coordinate by coordinate. */
function tripleLoop({ operations }: SpaceGroup, points: readonly Vec3[]): Float64Array {
  const rows = operations.map(({ W, w }) => ({ W, t: w.n.map((e) => e / w.d) }));
  const out = new Float64Array(3 * points.length * rows.length);
  let at = 0;
  for (const x of points) {
    for (const { W, t } of rows) {
      for (let i = 0; i < 3; i++) {
        const y = W[3 * i]! * x[0] + W[3 * i + 1]! * x[1] + W[3 * i + 2]! * x[2] + t[i]!;
        out[at++] = y - Math.floor(y);
      }
    }
  }
  return out;
}

/** Site symmetry, orbits and the search for coincidences of a large cell, and the list of its atoms. */
export function measure(): readonly Measurement[] {
  return [1, 14, 61, 225].flatMap((type) => {
    const parts = prepare(type);
    const points = parts.sites.map((s) => s.position);
    const reference = () => tripleLoop(parts.group, points)[7]!;
    const crystal = crystalOf(parts);
    const atoms = positionsAnswer(crystal).count;
    const rows = [
      ratio(
        `crystal from its sites, type ${type}`,
        REFERENCE,
        { ours: () => crystalOf(parts).sites.length, reference },
        10,
      ),
      ratio(
        `list of positions, type ${type}`,
        REFERENCE,
        { ours: () => positionsAnswer(crystal).count, reference },
        10,
      ),
    ];
    return rows.map((row) => ({ ...row, detail: `${atoms} atoms, ${row.detail}` }));
  });
}
