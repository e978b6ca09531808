import type { CrystalAnalysis } from "./crystal-analysis.ts";
import type { CrystalClass } from "./schoenflies.ts";

/** Symbols whose meaning depends on the directions of the lateral axes: secondary first, then tertiary. */
const ORIENTED: Readonly<Record<string, readonly [string, string]>> = {
  D2d: ["-42m", "-4m2"],
  D3: ["321", "312"],
  C3v: ["3m1", "31m"],
  D3d: ["-3m1", "-31m"],
  D3h: ["-62m", "-6m2"],
};

/**
 * International symbol with the orientation that the frame gives it; the plain symbol of the crystal class where the
 * principal axis does not lie along a frame axis (as in rhombohedral axes).
 */
export function orientedSymbol(kind: CrystalClass, a: CrystalAnalysis): string {
  const { z, kind: form, secondary } = a.orientation;
  if (z < 0) return kind.hermannMauguin;
  const along = frameAxis(a, z);
  if (kind.schoenflies === "C2v") {
    const aligned = form === "orthorhombic" && a.axes.every((_, i) => frameAxis(a, i) >= 0);
    return aligned ? ["2mm", "m2m", "mm2"][along]! : kind.hermannMauguin;
  }
  const pair = ORIENTED[kind.schoenflies];
  if (!pair || along < 0) return kind.hermannMauguin;
  const axesFirst = a.elements.some((e) => e.order === 2 && secondary.includes(e.axis) && (e.proper || !hasAxes(a)));
  return axesFirst ? pair[0] : pair[1];
}

/** Whether the group has twofold axes perpendicular to the principal axis. */
function hasAxes(a: CrystalAnalysis): boolean {
  return a.elements.some((e) => e.proper && e.order === 2 && e.axis !== a.orientation.z);
}

/** 0, 1 or 2 if the axis lies along a, b or c of the frame, else -1. */
function frameAxis(a: CrystalAnalysis, axis: number): number {
  const [u, v, w] = a.axes[axis]!.uvw;
  if (v === 0 && w === 0) return 0;
  if (u === 0 && w === 0) return 1;
  return u === 0 && v === 0 ? 2 : -1;
}
