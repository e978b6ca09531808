import { type AuditInput, type StatedNumber, statedNumber, statedText, statementOf } from "./audit-input.ts";
import { type Criterion, type Finding, finding } from "./finding.ts";

/** The wavelength may differ from that of the line by this; angstrom; K alpha 1 and the mean of both differ by 0.005. */
const LINE_TOLERANCE = 0.006;

/**
 * K alpha wavelengths (mean of both lines, weights 2 and 1) in angstrom.
 * Source: International Tables for Crystallography C (2006), table 4.2.2.4 (from memory).
 */
const K_ALPHA: Readonly<Record<string, number>> = {
  Cr: 2.291,
  Fe: 1.93736,
  Co: 1.79026,
  Cu: 1.54184,
  Ga: 1.34139,
  Mo: 0.71073,
  Ag: 0.56087,
  In: 0.51359,
};

const WAVELENGTH: Criterion = {
  id: "radiation-wavelength",
  severity: "contradiction",
  criterion: `The wavelength is not that of the K alpha lines of the anode named, within ${LINE_TOLERANCE} Å.`,
  source: "International Tables for Crystallography C (2006), table 4.2.2.4.",
  advice: "Correct the wavelength or the kind of radiation; resolution and absorption follow from them.",
};

export const criteria: readonly Criterion[] = [WAVELENGTH];

/** What a diffraction experiment was made with. */
export interface Radiation {
  readonly probe: "x-ray" | "neutron" | "electron";
  /** Angstrom; null where not stated. */
  readonly wavelength: StatedNumber | null;
}

/** Probe and wavelength of the experiment; X-rays where nothing else is said. */
export function radiationOf(input: Pick<AuditInput, "block">): Radiation {
  const words = ["probe", "type", "source"].map((item) => statedText(input, `_diffrn_radiation.${item}`)?.text ?? "");
  const said = [...words, statedText(input, "_diffrn_source.source")?.text ?? ""].join(" ").toLowerCase();
  const wavelength = statedNumber(input, "_diffrn_radiation_wavelength.value");
  if (/neutron/.test(said)) return { probe: "neutron", wavelength };
  if (/electron/.test(said) && !/synchrotron|x-?ray/.test(said)) return { probe: "electron", wavelength };
  return { probe: "x-ray", wavelength };
}

/** Is the wavelength that of the anode? */
export function check(input: AuditInput): Finding[] {
  const type = statedText(input, "_diffrn_radiation.type");
  const { probe, wavelength } = radiationOf(input);
  const anode = /^['"]?\s*(Cr|Fe|Co|Cu|Ga|Mo|Ag|In)\s*[-_ ]?\s*K[\s\\~^]*(?:a|α|alpha)(?![a-z])/i.exec(
    type?.text ?? "",
  )?.[1];
  if (!type || !anode || !wavelength || probe !== "x-ray") return [];
  const symbol = anode[0]!.toUpperCase() + anode.slice(1).toLowerCase();
  const line = K_ALPHA[symbol]!;
  const difference = wavelength.value - line;
  if (Math.abs(difference) <= LINE_TOLERANCE) return [];
  const message = `the wavelength ${wavelength.text} Å is not that of ${type.text} radiation, ${line} Å`;
  return [
    finding(WAVELENGTH, input.place(wavelength.name, wavelength.span), message, {
      stated: statementOf(wavelength),
      against: { what: `${type.name} ${type.text}`, value: line },
      difference,
      tolerance: LINE_TOLERANCE,
      unit: "Å",
    }),
  ];
}
