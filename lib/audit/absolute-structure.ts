import { groupProperties, spaceGroupType } from "../symmetry/index.ts";
import { type AuditInput, statedNumber, statedText, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";
import { radiationOf } from "./radiation.ts";

/** A Flack parameter with a larger uncertainty tells nothing. */
const USELESS_SU = 0.3;
/** Standard uncertainties by which it must differ from 0. */
const SU_FACTOR = 3;
/** From here on the inverted structure fits better. */
const INVERTED_FROM = 0.5;

const SOURCE = "H. D. Flack, G. Bernardinelli, Journal of Applied Crystallography 33 (2000) 1143-1148.";

const CENTRIC: Criterion = {
  id: "absolute-structure-centric",
  severity: "contradiction",
  criterion: "A Flack (or Rogers) parameter is given for a group with inversion, which is its own mirror image.",
  source: "H. D. Flack, Acta Crystallographica A39 (1983) 876-881: defined for structures without inversion.",
  advice: "The parameter or the group is left from another refinement.",
};

const INVERTED: Criterion = {
  id: "absolute-structure-inverted",
  severity: "doubt",
  criterion: `The Flack parameter exceeds ${INVERTED_FROM} and differs from 0 by more than ${SU_FACTOR} standard uncertainties.`,
  source: SOURCE,
  advice: "Invert the structure (and the group, if it is one of an enantiomorphic pair) and refine again.",
};

const UNKNOWN: Criterion = {
  id: "absolute-structure-unknown",
  severity: "remark",
  criterion:
    "A structure without inversion was refined against X-ray data of a single crystal, and no parameter of its absolute " +
    `structure is given, or one with an uncertainty above ${USELESS_SU}.`,
  source: SOURCE,
  advice: "Say how the absolute structure was chosen, or that it was not.",
};

const ACHIRAL: Criterion = {
  id: "absolute-configuration-achiral",
  severity: "doubt",
  criterion:
    "An absolute configuration is claimed in a group with operations of the second kind, in which no crystal is chiral.",
  source: "H. D. Flack, Helvetica Chimica Acta 86 (2003) 905-921: chiral and achiral crystal structures.",
  advice: "Write `.` for achiral structures; `absolute structure` (polarity) is another matter.",
};

const SOHNCKE: Criterion = {
  id: "sohncke-group",
  severity: "remark",
  criterion: "The group has only rotations and screw rotations, so that the crystal structure is chiral.",
  source: "L. Sohncke (1879); H. D. Flack, Helvetica Chimica Acta 86 (2003) 905-921.",
  advice:
    "One enantiomorph was chosen; the mirror image is the other, in the enantiomorphic group where there are two.",
};

export const criteria: readonly Criterion[] = [CENTRIC, INVERTED, UNKNOWN, ACHIRAL, SOHNCKE];

const PARAMETERS = ["_refine_ls.abs_structure_Flack", "_refine_ls.abs_structure_Rogers"];

/** Does the file say of handedness what the group allows? */
export function check(input: AuditInput): Finding[] {
  const summary = input.symmetry?.identified.summary;
  if (!summary) return [];
  const stated = PARAMETERS.flatMap((name) => statedNumber(input, name) ?? [])[0] ?? null;
  const group = { what: "group in use", value: `No. ${summary.number}, ${summary.hermannMauguin}` };
  const found: Finding[] = [];
  if (stated && summary.centrosymmetric) {
    const message = `an absolute-structure parameter, ${statementOf(stated).value}, is given for ${summary.hermannMauguin}, which has inversion centres`;
    found.push(
      finding(CENTRIC, input.place(stated.name, stated.span), message, { stated: statementOf(stated), against: group }),
    );
  }
  if (!summary.centrosymmetric) found.push(...acentric(input, stated, group));
  const configuration = statedText(input, "_chemical.absolute_configuration");
  if (configuration && !summary.sohncke && /^(?:rm|ad|rmad)$/i.test(configuration.text)) {
    const message = `an absolute configuration (${configuration.text}) is claimed in ${summary.hermannMauguin}, in which no crystal is chiral`;
    const evidence = { stated: { what: configuration.name, value: configuration.text }, against: group };
    found.push(finding(ACHIRAL, input.place(configuration.name, configuration.span), message, evidence));
  }
  return [...found, ...sohncke(input)];
}

function acentric(
  input: AuditInput,
  stated: ReturnType<typeof statedNumber>,
  group: { what: string; value: string },
): Finding[] {
  if (stated && (stated.su ?? 0) <= USELESS_SU) {
    if (stated.value <= INVERTED_FROM || stated.value <= SU_FACTOR * (stated.su ?? 0)) return [];
    const message = `the absolute-structure parameter is ${statementOf(stated).value}: the inverted structure fits better`;
    return [
      finding(INVERTED, input.place(stated.name, stated.span), message, {
        stated: statementOf(stated),
        against: { what: "for the right enantiomorph", value: 0 },
        difference: stated.value,
        tolerance: INVERTED_FROM,
      }),
    ];
  }
  const refined = statedNumber(input, "_refine_ls.R_factor_gt") && statedNumber(input, "_diffrn_reflns.number");
  const powder = input.block.names().some((name) => /^_pd_/i.test(name));
  if (!refined || powder || radiationOf(input).probe !== "x-ray") return [];
  const name = stated?.name ?? "_refine_ls_abs_structure_Flack";
  const message = stated
    ? `the absolute-structure parameter ${statementOf(stated).value} is too uncertain to tell`
    : "nothing is said of the absolute structure";
  return [
    finding(UNKNOWN, input.place(name, stated?.span ?? null), message, {
      stated: stated ? statementOf(stated) : { what: name, value: "absent" },
      against: group,
    }),
  ];
}

function sohncke(input: AuditInput): Finding[] {
  const { summary, number } = input.symmetry!.identified;
  if (!summary.sohncke) return [];
  const other = groupProperties(number).enantiomorph;
  const pair =
    other === null ? "" : `; the mirror image has the group ${spaceGroupType(other).hermannMauguin} (No. ${other})`;
  const said = input.declared.hermannMauguin ?? input.declared.hall ?? input.declared.operations[0];
  const message = `${summary.hermannMauguin} has no operation of the second kind: the structure is chiral${pair}`;
  return [
    finding(SOHNCKE, input.place(said?.name ?? "_space_group_name_H-M_alt", said?.span ?? null), message, {
      stated: { what: "group in use", value: `No. ${number}, ${summary.hermannMauguin}` },
      against: { what: "operations of the second kind", value: 0 },
    }),
  ];
}
