import { describe, expect, test } from "vitest";
import type { MolecularUnit } from "../../lib/structure/index.ts";
import { freeUnitsLike } from "../../lib/vibrations/index.ts";

const unit = (...elements: string[]) =>
  ({ atoms: elements.map((element) => ({ element })) }) as unknown as MolecularUnit;

const wavenumbers = (u: MolecularUnit, pointGroup: string) =>
  freeUnitsLike(u, pointGroup)[0]?.modes.map((m) => m.wavenumber) ?? null;

describe("isotopes of hydrogen in free units", () => {
  test("heavy water has the wavenumbers of D2O, light water those of H2O (Herzberg 1945, from memory)", () => {
    expect(wavenumbers(unit("O", "H", "H"), "C2v")).toEqual([3657, 1595, 3756]);
    expect(wavenumbers(unit("O", "D", "D"), "C2v")).toEqual([2671, 1178, 2788]);
    expect(freeUnitsLike(unit("N", "D", "D", "D", "D"), "Td")[0]?.modes[0]).toMatchObject({ wavenumber: 2214 });
  });

  test("a heavy unit without an entry of its own is numbered alike but given no wavenumber", () => {
    const [light] = freeUnitsLike(unit("O", "H"), "Cinfv");
    const [heavy] = freeUnitsLike(unit("O", "D"), "Cinfv");
    expect(light?.modes.map((m) => m.name)).toEqual(heavy?.modes.map((m) => m.name));
    expect(light?.modes[0]?.wavenumber).toBeGreaterThan(3000);
    expect(heavy).toMatchObject({ name: "hydroxide, deuterated", modes: [{ wavenumber: null }] });
  });

  test("a unit of both isotopes is no known one: its modes are neither symmetric nor antisymmetric", () => {
    expect(freeUnitsLike(unit("O", "H", "D"), "C2v")).toEqual([]);
  });
});
