import { Ajv2020, type ValidateFunction } from "ajv/dist/2020.js";
import { answersSchema } from "../../lib/report/schema/answers-schema.ts";
import type { JsonSchema } from "../../lib/report/schema/shape.ts";

/** The schema with no field let pass that it does not name: what we print today is described in full. */
export function closedSchema(): JsonSchema {
  const schema = answersSchema();
  return { ...schema, $defs: closed(schema["$defs"]) };
}

function closed(part: unknown): unknown {
  if (Array.isArray(part)) return part.map(closed);
  if (typeof part !== "object" || part === null) return part;
  const copy = Object.fromEntries(Object.entries(part).map(([key, value]) => [key, closed(value)]));
  const ofFields = copy["type"] === "object" && typeof copy["properties"] === "object";
  return ofFields ? { ...copy, additionalProperties: false } : copy;
}

export function validatorOf(schema: JsonSchema): ValidateFunction {
  return new Ajv2020({ strict: true, strictRequired: false, allowUnionTypes: true }).compile(schema);
}

/** What is wrong with a document, each fault with its place; empty if nothing is. */
export function faultsOf(validate: ValidateFunction, document: unknown): string[] {
  validate(document);
  return (validate.errors ?? []).map((e) => `${e.instancePath} ${e.message} ${JSON.stringify(e.params)}`);
}
