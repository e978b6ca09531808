import type { Criterion, Evidence, Finding, Severity, Statement, VetAnswer, Where } from "../../audit/index.ts";
import { type Heading, heading, positionTolerance } from "./common.ts";
import {
  choice,
  count,
  either,
  type Fields,
  type JsonSchema,
  list,
  number,
  object,
  optional,
  type Shape,
  text,
  textLike,
  when,
} from "./shape.ts";

const id = () => textLike(/^[a-z][a-z0-9]*(-[a-z0-9]+)*$/);
const severity = () => choice<Severity>({ contradiction: true, doubt: true, remark: true });

/** One structure; a table of several, or of files that could not be read; or what --explain tells. */
export function vetSchema(): Shape<object> {
  const common = { ...heading("vet"), tolerance: positionTolerance() };
  const readable = object<ReadableFile>({ source: common.source, ...answer() });
  const unreadable = object<UnreadableFile>({ source: common.source, problem: text("why it could not be read") });
  const table = object<Heading & { readonly files: readonly (ReadableFile | UnreadableFile)[] }>({
    ...common,
    files: list(either(readable, unreadable)),
  });
  const one = object<Heading & VetAnswer>({ ...common, ...answer() });
  const explained = object<Heading & { readonly criteria: readonly Criterion[] }>({
    ...common,
    criteria: list(
      object<Criterion>({ id: id(), severity: severity(), criterion: text(), source: text(), advice: text() }),
    ),
  });
  return { schema: byField({ files: table.schema, criteria: explained.schema }, one.schema) };
}

/** Chooses by a field that is present, so that a fault is told of the right schema. */
function byField(schemas: Readonly<Record<string, JsonSchema>>, otherwise: JsonSchema): JsonSchema {
  return Object.entries(schemas).reduceRight(
    (rest, [field, schema]) => when({ type: "object", required: [field] }, schema, rest),
    otherwise,
  );
}

type ReadableFile = Pick<Heading, "source"> & VetAnswer;
type UnreadableFile = Pick<Heading, "source"> & { readonly problem: string };

function answer(): Fields<VetAnswer> {
  const statement = () =>
    object<Statement>({ what: text("who says it"), value: { schema: { type: ["string", "number"] } } });
  const evidence = object<Evidence>({
    stated: statement(),
    against: statement(),
    difference: optional(number()),
    tolerance: optional(number("what the difference was allowed to be")),
    unit: optional(text()),
    also: optional(list(text(), "further places with the same fault")),
  });
  const finding = object<Finding>({
    id: id(),
    severity: severity(),
    message: text(),
    where: object<Where>({ dataName: text(), line: optional(count("from 1; absent for what is missing", 1)) }),
    evidence,
    advice: text(),
  });
  return {
    findings: list(finding),
    counts: object<VetAnswer["counts"]>({ contradiction: count(), doubt: count(), remark: count() }),
  };
}
