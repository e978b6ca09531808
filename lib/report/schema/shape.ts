/** A JSON Schema, draft 2020-12, or a part of one. */
export type JsonSchema = { readonly [keyword: string]: unknown };

/** A schema of values of type T. T stands on both sides of a function, so that no wider or narrower schema passes for it. */
export interface Shape<T> {
  readonly schema: JsonSchema;
  readonly of?: (value: T) => T;
}

/** Of a field that may be absent. */
export interface OptionalShape<T> extends Shape<T> {
  readonly optional: true;
}

/** One shape for each field of T, the optional ones marked, so that the compiler finds what a schema forgets. */
export type Fields<T> = {
  readonly [K in keyof T]-?: Record<never, never> extends Pick<T, K>
    ? OptionalShape<Required<T>[K]>
    : Shape<T[K]> & { readonly optional?: never };
};

/** `description` tells meaning and unit, where the name of the field does not. */
const described = (schema: JsonSchema, description: string): JsonSchema =>
  description === "" ? schema : { ...schema, description };

export const text = (description = ""): Shape<string> => ({ schema: described({ type: "string" }, description) });

/** Text of which a pattern holds. */
export const textLike = (pattern: RegExp, description = ""): Shape<string> => ({
  schema: described({ type: "string", pattern: pattern.source }, description),
});

export const number = (description = ""): Shape<number> => ({ schema: described({ type: "number" }, description) });

/** A number of at least 0, such as a length. */
export const amount = (description = ""): Shape<number> => ({
  schema: described({ type: "number", minimum: 0 }, description),
});

export const whole = (description = ""): Shape<number> => ({ schema: described({ type: "integer" }, description) });

/** A whole number of things, at least `least`. */
export const count = (description = "", least = 0): Shape<number> => ({
  schema: described({ type: "integer", minimum: least }, description),
});

export const flag = (description = ""): Shape<boolean> => ({ schema: described({ type: "boolean" }, description) });

/** One of the texts listed; the list is complete or does not compile. */
export const choice = <T extends string>(values: Readonly<Record<T, true>>, description = ""): Shape<T> => ({
  schema: described({ type: "string", enum: Object.keys(values) }, description),
});

export const list = <T>(items: Shape<T>, description = ""): Shape<readonly T[]> => ({
  schema: described({ type: "array", items: items.schema }, description),
});

/** A list of three. */
export const triple = <T>(items: Shape<T>, description = ""): Shape<readonly [T, T, T]> => ({
  schema: described({ type: "array", items: items.schema, minItems: 3, maxItems: 3 }, description),
});

export const pair = <T>(items: Shape<T>, description = ""): Shape<readonly [T, T]> => ({
  schema: described({ type: "array", items: items.schema, minItems: 2, maxItems: 2 }, description),
});

/** Values by names that are not known beforehand. */
export const byName = <T>(values: Shape<T>, description = ""): Shape<Readonly<Record<string, T>>> => ({
  schema: described({ type: "object", additionalProperties: values.schema }, description),
});

export const orNull = <T>(shape: Shape<T>, description = ""): Shape<T | null> => ({
  schema: described({ anyOf: [shape.schema, { type: "null" }] }, description),
});

export const either = <A, B>(a: Shape<A>, b: Shape<B>, description = ""): Shape<A | B> => ({
  schema: described({ anyOf: [a.schema, b.schema] }, description),
});

export const optional = <T>(shape: Shape<T>): OptionalShape<T> => ({ schema: shape.schema, optional: true });

/** An object with these fields. Others are let pass: later versions may add some. */
export function object<T>(fields: Fields<T>, description = ""): Shape<T> {
  const entries = Object.entries(fields as Readonly<Record<string, { schema: JsonSchema; optional?: true }>>);
  const schema = {
    type: "object",
    required: entries.filter(([, shape]) => !shape.optional).map(([name]) => name),
    properties: Object.fromEntries(entries.map(([name, shape]) => [name, shape.schema])),
  };
  return { schema: described(schema, description) };
}

/** The schema of this name among the $defs. */
export const defined = <T>(name: string): Shape<T> => ({ schema: { $ref: `#/$defs/${name}` } });

/** What holds `then` where a condition is met, and `otherwise` where it is not. */
export function when(condition: JsonSchema, then: JsonSchema, otherwise: JsonSchema | null = null): JsonSchema {
  const branches = [["if", condition], ["then", then], ...(otherwise ? [["else", otherwise]] : [])];
  return Object.fromEntries(branches); // an object written with the key `then` would pass for a promise
}
