import { directionElements } from "./direction-elements.ts";
import {
  type DirectionSystem,
  directionSystem,
  type SymbolPart,
  shortSymbol,
  splitSymbol,
  symmetryDirections,
} from "./hermann-mauguin-symbol.ts";
import { settingOperations } from "./setting-group.ts";
import { type Setting, settingsOf } from "./settings.ts";
import { spaceGroupTypes } from "./space-group-type.ts";

/**
 * Settings whose symbol is the one written, short or full, with `e` or the letter used before it.
 * @param open accepts trigonal symbols that leave out the direction without elements, `P -3 m`
 */
export function settingsNamed(lattice: string, parts: readonly SymbolPart[], open: boolean): Setting[] {
  return settingsLike(lattice, parts, signature(parts)).filter((s) => sameSymbol(s, parts, open));
}

/**
 * Settings that hold the elements written although their symbol is another, as the extended symbols of International
 * Tables list them: `I 4/m m n`.
 */
export function settingsHolding(lattice: string, parts: readonly SymbolPart[]): Setting[] {
  return settingsLike(lattice, parts, null).filter((s) => s.choice !== "R" && holds(s, parts));
}

/**
 * Settings with the lattice and of a system of the parts; a signature spares the orthorhombic types that cannot be
 * meant the work of carrying their symbols to six settings.
 */
function settingsLike(lattice: string, parts: readonly SymbolPart[], wanted: string | null): Setting[] {
  const systems = systemsOf(parts);
  const found: Setting[] = [];
  for (const type of spaceGroupTypes()) {
    const system = directionSystem(type.number);
    if (!systems.includes(system) || !latticeFits(system, type.hermannMauguin[0]!, lattice)) continue;
    const own = splitSymbol(type.hermannMauguin).parts;
    if (wanted !== null && system === "orthorhombic" && signature(own) !== wanted) continue;
    for (const s of settingsOf(type.number)) if (s.hermannMauguin.full.startsWith(lattice)) found.push(s);
  }
  return found;
}

/** The kinds of the parts without their order: what no change of axes alters. */
function signature(parts: readonly SymbolPart[]): string {
  return parts
    .map(({ axis, plane }) => (plane === null ? axis : /[mnd]/.test(plane) ? plane : "glide"))
    .sort()
    .join();
}

/** Systems that a list of parts can belong to: told by the order of the first axis and the place of the threefold. */
function systemsOf(parts: readonly SymbolPart[]): readonly DirectionSystem[] {
  const order = (i: number) => Number(/\d/.exec(parts[i]?.axis ?? "")?.[0] ?? 0);
  if (order(1) === 3) return ["cubic"];
  if (order(0) === 3) return ["trigonal", "rhombohedral"];
  if (order(0) === 4) return ["tetragonal"];
  if (order(0) === 6) return ["hexagonal"];
  if (parts.length === 1) return order(0) === 1 ? ["triclinic"] : ["monoclinic"];
  return parts.some((p) => p.axis === "1") ? ["monoclinic"] : ["orthorhombic"];
}

function latticeFits(system: DirectionSystem, reference: string, lattice: string): boolean {
  switch (system) {
    case "triclinic":
      return true;
    case "monoclinic":
      return (reference === "P") === (lattice === "P");
    case "orthorhombic":
      return "ABC".includes(reference) ? "ABC".includes(lattice) : reference === lattice;
    case "tetragonal":
      return reference === "P" ? lattice === "P" || lattice === "C" : lattice === "I" || lattice === "F";
    case "trigonal":
    case "hexagonal":
      return lattice === "P" || lattice === "H";
    default:
      return reference === lattice;
  }
}

/** One direction of a setting's symbol: its place and the ways to write it, full and short. */
interface Place {
  readonly at: number;
  readonly forms: readonly SymbolPart[];
}

/** The places that the written parts fill, one by one; null where their number does not fit. */
function placesFor(setting: Setting, written: readonly SymbolPart[], open: boolean): Place[] | null {
  const system = directionSystem(setting.number);
  const full = splitSymbol(setting.hermannMauguin.full);
  const short = system === "monoclinic" ? full : shortSymbol(full, system);
  const all = full.parts.map((part, at): Place => ({ at, forms: [part, short.parts[at]!] }));
  if (all.length === written.length) return all;
  // P 21/c leaves the unique axis open, P 3 2 and P -3 m the direction of the second part
  const named = all.filter((place) => place.forms[0]!.axis !== "1");
  const mayBeShorter = system === "monoclinic" || (open && system === "trigonal");
  return mayBeShorter && named.length === written.length ? named : null;
}

function sameSymbol(setting: Setting, parts: readonly SymbolPart[], open: boolean): boolean {
  const written = withoutClosingOne(setting, parts);
  const places = placesFor(setting, written, open);
  if (!places) return false;
  return written.every((w, k) => {
    const { at, forms } = places[k]!;
    const letters = setting.planeLetters[at]!;
    const same = (own: SymbolPart) =>
      own.axis === w.axis &&
      (own.plane === w.plane ||
        (own.plane !== null && w.plane !== null && (letters.includes(w.plane) || OLD_GLIDES[own.plane] === w.plane)));
    return forms.some(same) || oldThreefold(setting, at, w, forms);
  });
}

/**
 * Glides normal to the diagonals of C-centred tetragonal cells as they were written before g1 and g2 came into use, by
 * the glides b and n of the primitive cell: `C -4 2 b` for P -4 b 2, `C 4 c n` for P 4 n c.
 * Source: International Tables for X-ray Crystallography I (1952), symbols of other settings (from memory).
 */
const OLD_GLIDES: Readonly<Partial<Record<string, string>>> = { g1: "b", g2: "n" };

/** `R -3 m 1` and `R 3 2 1` for R -3 m and R 3 2. */
function withoutClosingOne(setting: Setting, parts: readonly SymbolPart[]): readonly SymbolPart[] {
  const rhombohedral = directionSystem(setting.number) === "rhombohedral";
  return rhombohedral && parts.length === 3 && parts[2]!.axis === "1" ? parts.slice(0, 2) : parts;
}

/** `F d 3 m` for F d -3 m, as before 1983: the threefold axis after a plane is a rotoinversion. */
function oldThreefold(setting: Setting, at: number, w: SymbolPart, forms: readonly SymbolPart[]): boolean {
  const cubic = directionSystem(setting.number) === "cubic";
  return cubic && at === 1 && w.axis === "3" && w.plane === null && forms[0]!.axis === "-3";
}

function holds(setting: Setting, written: readonly SymbolPart[]): boolean {
  const places = placesFor(setting, written, false);
  if (!places) return false;
  const sameKind = (w: SymbolPart, own: SymbolPart) =>
    (w.axis === null) === (own.axis === null) &&
    (w.plane === null) === (own.plane === null) &&
    (w.axis === "1") === (own.axis === "1");
  if (!written.every((w, k) => places[k]!.forms.some((own) => sameKind(w, own)))) return false;
  const system = directionSystem(setting.number);
  const hexagonal = system === "trigonal" || system === "hexagonal" || system === "rhombohedral";
  const directions = symmetryDirections(system);
  const operations = settingOperations(setting);
  return written.every((w, k) => {
    if (w.axis === "1" || system === "triclinic") return true;
    const { axes, planes } = directionElements(operations, directions[places[k]!.at]!, hexagonal);
    return (w.axis === null || axes.includes(w.axis)) && (!w.plane || planes.some((p) => p.includes(w.plane!)));
  });
}
