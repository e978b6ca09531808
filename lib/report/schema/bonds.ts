import type { BondChoice } from "../../structure/index.ts";
import { amount, choice, count, flag, list, object, orNull, pair, type Shape, text } from "./shape.ts";

/** How bonds were chosen. */
export function bondChoice(): Shape<BondChoice> {
  const elements = pair(text());
  const range = { count: count("in the cell", 1), shortest: amount("angstrom"), longest: amount("angstrom") };
  return object<BondChoice>({
    radii: text("source of the radii"),
    tolerance: amount("above the sum of the radii, angstrom"),
    bonded: list(object<BondChoice["bonded"][number]>({ elements, rule: { schema: text().schema }, ...range })),
    leftOut: list(
      object<BondChoice["leftOut"][number]>({
        elements,
        why: choice({ water: true, asked: true, ions: true }),
        bondedBelow: orNull(amount("angstrom"), "null where length does not decide"),
        ...range,
      }),
    ),
    nearLimit: list(
      object<BondChoice["nearLimit"][number]>({
        labels: pair(text()),
        distance: amount("angstrom"),
        limit: amount("angstrom"),
        bonded: flag(),
      }),
    ),
  });
}
