import type {
  PointAnswer,
  PointClassAnswer,
  PointSpeciesAnswer,
  PointTensorsAnswer,
  ProductAnswer,
  SubgroupAnswer,
} from "../../vibrations/index.ts";
import { type Heading, heading, positionTolerance } from "./common.ts";
import { hyperRaman } from "./modes.ts";
import { choice, count, either, flag, list, number, object, orNull, type Shape, text, whole } from "./shape.ts";
import { species } from "./units.ts";

export function pointSchema(): Shape<Heading & PointAnswer> {
  const infinite = "null in an infinite group";
  return object<Heading & PointAnswer>({
    ...heading("point"),
    tolerance: positionTolerance(),
    schoenflies: text(),
    hermannMauguin: orNull(text(), "null where no international symbol is in use"),
    order: orNull(count("", 1), infinite),
    frame: text(),
    axes: text("directions that the labels refer to"),
    classes: list(
      object<PointClassAnswer>({
        name: text(),
        size: orNull(count("", 1), infinite),
        directions: list(text(), "axes, and normals of planes"),
        containsAxes: list(text(), "classes of lateral twofold axes in vertical planes"),
      }),
    ),
    planeNaming: orNull(
      choice({ crystal: true, molecule: true }),
      "whose names of sigma_v and sigma_d these are where the two differ",
    ),
    species: list(pointSpecies()),
    closedForms: list(
      object<PointAnswer["closedForms"][number]>({ value: number(), text: text() }),
      "characters that are no whole numbers",
    ),
    tensors: orNull(tensors(), "null unless asked for"),
    products: list(
      object<ProductAnswer>({
        factors: list(text()),
        sum: species(),
        symmetric: orNull(species(), "of the square of one species"),
        antisymmetric: orNull(species()),
      }),
    ),
    subgroups: list(
      object<SubgroupAnswer>({
        schoenflies: text(),
        hermannMauguin: orNull(text()),
        order: count("", 1),
        kept: text("elements kept, by their names in the group"),
        directions: list(text()),
        conjugates: orNull(count("", 1), infinite),
        axes: text(),
        table: list(object<SubgroupAnswer["table"][number]>({ species: text(), to: species() })),
      }),
    ),
  });
}

const pointSpecies = () =>
  object<PointSpeciesAnswer>({
    label: text(),
    dimension: whole(),
    complexPair: flag("two species that are conjugate complex, taken as one"),
    characters: list(either(number(), text("of an infinite group, `2cos(phi)`"))),
    vectors: list(text()),
    rotations: list(text()),
    quadratics: list(text()),
    infrared: flag(),
    raman: flag(),
    hyperRaman: flag(),
    hyperRamanGeneral: flag(),
  });

function tensors(): Shape<PointTensorsAnswer> {
  const rows = list(list(text()));
  return object<PointTensorsAnswer>({
    dipoles: list(object<PointTensorsAnswer["dipoles"][number]>({ irrep: text(), directions: rows })),
    raman: list(object<PointTensorsAnswer["raman"][number]>({ irrep: text(), tensor: list(rows) })),
    hyperRaman: list(hyperRaman()),
  });
}
