import { lengthOf, type Metric, reciprocalLengths, type Vec3 } from "./cell.ts";

/** More boxes along an axis would only spread the points thinner. */
const MOST_BOXES = 128;

/**
 * Points in a crystal, found again by place in constant time: the cell is cut into boxes no thinner than the search
 * distance, and only a box and its neighbours are searched.
 */
export class PeriodicPoints {
  private readonly metric: Metric;
  private readonly reach: number;
  private readonly boxes: readonly [number, number, number];
  private readonly members = new Map<number, number[]>();
  private readonly positions: Vec3[] = [];

  /** @param reach largest distance that `near` will be asked for, angstrom */
  constructor(metric: Metric, reach: number) {
    this.metric = metric;
    this.reach = reach;
    const thickness = reciprocalLengths(metric).map((e) => 1 / e);
    const count = (d: number) => Math.max(1, Math.min(MOST_BOXES, Math.floor(d / Math.max(reach, 1e-6))));
    this.boxes = [count(thickness[0]!), count(thickness[1]!), count(thickness[2]!)];
  }

  /** Adds a point, fractional and anywhere; returns its index. */
  add(position: Vec3): number {
    const index = this.positions.length;
    this.positions.push(position);
    const key = this.key(this.box(position));
    const list = this.members.get(key);
    if (list) list.push(index);
    else this.members.set(key, [index]);
    return index;
  }

  /** Indices of the points within the reach of a position, nearest first. */
  near(position: Vec3): number[] {
    const found: { index: number; distance: number }[] = [];
    for (const key of this.keysAround(this.box(position))) {
      for (const index of this.members.get(key) ?? []) {
        const distance = nearestDistance(this.metric, position, this.positions[index]!);
        if (distance <= this.reach) found.push({ index, distance });
      }
    }
    return found.sort((a, b) => a.distance - b.distance).map((f) => f.index);
  }

  private box(x: Vec3): [number, number, number] {
    return x.map((e, i) => Math.min(this.boxes[i]! - 1, Math.floor((e - Math.floor(e)) * this.boxes[i]!))) as [
      number,
      number,
      number,
    ];
  }

  private key(b: readonly [number, number, number]): number {
    return (b[0] * this.boxes[1] + b[1]) * this.boxes[2] + b[2];
  }

  private keysAround(b: readonly [number, number, number]): Set<number> {
    const keys = new Set<number>();
    const along = (i: 0 | 1 | 2) => [-1, 0, 1].map((s) => (b[i] + s + this.boxes[i]) % this.boxes[i]);
    for (const i of along(0)) for (const j of along(1)) for (const k of along(2)) keys.add(this.key([i, j, k]));
    return keys;
  }
}

/**
 * Distance in angstrom between two points modulo the lattice, each coordinate difference rounded to the nearest
 * lattice point: exact for distances below half the smallest plane spacing of the cell, which is all it is used for.
 */
export function nearestDistance(metric: Metric, x: Vec3, y: Vec3): number {
  const d = [0, 1, 2].map((i) => x[i]! - y[i]! - Math.round(x[i]! - y[i]!)) as [number, number, number];
  return lengthOf(metric, d);
}
