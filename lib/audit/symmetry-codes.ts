import { type Vec3, type WrittenOperation, writtenOperations } from "../structure/index.ts";
import type { AuditInput, StatedText } from "./audit-input.ts";

/** An image of a site as a symmetry code names it: x' = W x + t, whole cells included. */
export type CodedImage = WrittenOperation;

/** What a code means: an image; an operation that is not listed; or nothing that can be read. */
export type CodeReading =
  | { readonly kind: "image"; readonly image: CodedImage }
  | { readonly kind: "absent"; readonly operation: string }
  | { readonly kind: "unreadable" };

const IDENTITY: CodedImage = { W: [1, 0, 0, 0, 1, 0, 0, 0, 1], t: [0, 0, 0] };

/**
 * Reader of codes such as `.`, `3`, `7_654`: operation by its id, or by its place where the list has no ids; then whole
 * cells along the axes, each with 5 added. The translation is that of the operation as written.
 * Source: IUCr core CIF dictionary, _geom_bond.site_symmetry_1.
 */
export function codeReader(input: AuditInput): (code: StatedText | null) => CodeReading {
  const operations = writtenOperations(input.block, input.declared.operations);
  return (code) => {
    if (code === null) return { kind: "image", image: IDENTITY };
    const parts = /^(\d+)(?:_(\d)(\d)(\d))?$/.exec(code.text);
    if (!parts) return { kind: "unreadable" };
    const [, id, ...digits] = parts;
    const cells = digits.map((d) => (d === undefined ? 0 : Number(d) - 5));
    const found = operations.get(id!);
    if (operations.size === 0 && id === "1")
      return { kind: "image", image: { ...IDENTITY, t: cells as unknown as Vec3 } };
    if (found === undefined) return operations.size === 0 ? { kind: "unreadable" } : { kind: "absent", operation: id! };
    if (found === null) return { kind: "unreadable" };
    const t = found.t.map((e, i) => e + cells[i]!) as unknown as Vec3;
    return { kind: "image", image: { W: found.W, t } };
  };
}

/** Image of a point. */
export function imageOf({ W, t }: CodedImage, x: Vec3): Vec3 {
  const row = (i: 0 | 1 | 2) => W[3 * i]! * x[0] + W[3 * i + 1]! * x[1] + W[3 * i + 2]! * x[2] + t[i];
  return [row(0), row(1), row(2)];
}
