import { absencesSchema } from "./absences.ts";
import { definitions } from "./common.ts";
import { groupSchema } from "./group.ts";
import { modesSchema, patternsSchema, polariseSchema } from "./modes.ts";
import { neighboursSchema } from "./neighbours.ts";
import { pointSchema } from "./point.ts";
import { resiteSchema } from "./resite.ts";
import { type JsonSchema, when } from "./shape.ts";
import { composeSchema, positionsSchema, reduceSchema, sitesSchema, symmetriseSchema } from "./structure.ts";
import { splitSchema } from "./units.ts";
import { vetSchema } from "./vet.ts";

/**
 * JSON Schema (draft 2020-12) of everything that commands print with --json: one of $defs for each command, chosen by the
 * field `command`. It names every field; objects may gain others in later versions, so others are let pass.
 */
export function answersSchema(): JsonSchema {
  const commands: Readonly<Record<string, JsonSchema>> = {
    group: groupSchema().schema,
    sites: sitesSchema().schema,
    positions: positionsSchema().schema,
    compose: composeSchema().schema,
    modes: modesSchema().schema,
    split: splitSchema().schema,
    polarise: polariseSchema().schema,
    patterns: patternsSchema().schema,
    point: pointSchema().schema,
    reduce: reduceSchema().schema,
    symmetrise: symmetriseSchema().schema,
    neighbours: neighboursSchema().schema,
    resite: resiteSchema().schema,
    vet: vetSchema().schema,
    absences: absencesSchema().schema,
  };
  const shared = Object.entries(definitions()).map(([name, { schema }]) => [name, schema]);
  return {
    $schema: "https://json-schema.org/draft/2020-12/schema",
    title: "Answers of sitefold",
    type: "object",
    required: ["command"],
    properties: { command: { enum: Object.keys(commands) } },
    allOf: Object.keys(commands).map((name) =>
      when({ properties: { command: { const: name } } }, { $ref: `#/$defs/${name}` }),
    ),
    $defs: { ...commands, ...Object.fromEntries(shared) },
  };
}
