import type { CharacterTable } from "./character-table.ts";
import { closedForm, formatTerm } from "./closed-form.ts";
import type { TensorForms } from "./tensor-forms.ts";
import { tensorSpace } from "./tensor-space.ts";

/** Functions that transform like the species of a group, one text per set of partners: `z`, `(x, y)`, `x2+y2`. */
export interface SpeciesFunctions {
  readonly vectors: readonly string[];
  readonly rotations: readonly string[];
  readonly quadratics: readonly string[];
}

/** Functions of every species, from its forms of vectors, axial vectors and symmetric tensors. */
export function speciesFunctions(
  group: CharacterTable,
  forms: { readonly vector: TensorForms; readonly axial: TensorForms; readonly symmetric2: TensorForms },
): SpeciesFunctions[] {
  return group.irreps.map((_, irrep) => ({
    vectors: texts(group, forms.vector, irrep, (name) => name),
    rotations: texts(group, forms.axial, irrep, (name) => `R${name}`),
    quadratics: texts(group, forms.symmetric2, irrep, (name) => (name[0] === name[1] ? `${name[0]}2` : name)),
  }));
}

function texts(
  group: CharacterTable,
  { kind, forms }: TensorForms,
  irrep: number,
  symbol: (component: string) => string,
): string[] {
  const form = forms.find((f) => f.irrep === irrep);
  if (!form) return [];
  const { components, tuples } = tensorSpace(kind);
  const step = group.irreps[irrep]!.norm; // of a complex pair, every second form is the first one turned
  return form.letters
    .map((_, k) => k)
    .filter((k) => k % step === 0)
    .map((k) => {
      // xy stands twice in the sum of T_ij x_i x_j
      const partners = form.partners.map((p) => p.coefficients.map((row, c) => row[k]! * tuples[c]!.length));
      const scale = leading(partners[0]!, components);
      const text = partners.map((p) =>
        sum(
          p.map((e) => e / scale),
          components.map(symbol),
        ),
      );
      return text.length > 1 ? `(${text.join(", ")})` : text[0]!;
    });
}

/** The coefficient that is set to 1, or to 2 for zz beside xx and yy. */
function leading(coefficients: readonly number[], components: readonly string[]): number {
  const zz = components.indexOf("zz");
  const first = coefficients.find((e) => e !== 0)!;
  const axial = zz >= 0 && coefficients[zz] !== 0 && first !== coefficients[zz];
  return axial && Math.abs(coefficients[zz]! / first + 2) < 1e-9 ? -first : first;
}

/** `x2-y2`, `2z2-x2-y2`, `sqrt3(x2-y2)`: largest coefficients first, a common factor in front. */
function sum(coefficients: readonly number[], symbols: readonly string[]): string {
  const terms = coefficients.map((c, k) => ({ c, name: symbols[k]! })).filter(({ c }) => closedForm(c)?.p !== 0);
  terms.sort((a, b) => (Math.abs(Math.abs(a.c) - Math.abs(b.c)) < 1e-9 ? 0 : Math.abs(b.c) - Math.abs(a.c)));
  const size = Math.abs(terms[0]!.c);
  const common = terms.length > 1 && terms.every(({ c }) => Math.abs(Math.abs(c) - size) < 1e-9) ? terms[0]!.c : 1;
  const inner = terms
    .map(({ c, name }, k) => {
      const text = formatTerm(c / common, name);
      return k > 0 && !text.startsWith("-") ? `+${text}` : text;
    })
    .join("");
  return Math.abs(common - 1) < 1e-9 ? inner : formatTerm(common, `(${inner})`).replace(" (", "(");
}
