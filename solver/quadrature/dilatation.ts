import { kMeans } from '../parts/k-means';
import type { Body, DilatationGroups, Parts, QuadraturePoints } from './prepared';

/**
 * About parts/2 groups of neighbouring parts in each body; a quadrature point belongs to the group
 * of its dominant part. The modes are {1, x, y, z} made orthonormal over the group with the points'
 * volumes (modified Gram–Schmidt); a mode without extent (all points in a plane) is zero.
 */
export function dilatationGroups(
  points: QuadraturePoints,
  dominant: Int32Array,
  parts: Parts,
  bodies: readonly Body[],
): DilatationGroups {
  const groupOfPart = new Int32Array(parts.count);
  const bodyOfGroup: number[] = [];
  bodies.forEach((body, b) => {
    const centres = parts.centres.slice(3 * body.firstPart, 3 * (body.firstPart + body.partCount));
    const clusters = kMeans(centres, null, Math.ceil(body.partCount / 2));
    for (let i = 0; i < body.partCount; i++) groupOfPart[body.firstPart + i] = bodyOfGroup.length + clusters.of[i]!;
    for (let c = 0; c < clusters.count; c++) bodyOfGroup.push(b);
  });
  const members: number[][] = bodyOfGroup.map(() => []);
  for (let k = 0; k < points.count; k++) members[groupOfPart[dominant[k]!]!]!.push(k);
  const filled = members.map((m, g) => ({ m, body: bodyOfGroup[g]! })).filter(({ m }) => m.length > 0);
  const start = new Int32Array(filled.length + 1);
  const list = new Int32Array(points.count);
  const modes = new Float64Array(4 * points.count);
  filled.forEach(({ m }, g) => {
    list.set(m, start[g]!);
    start[g + 1] = start[g]! + m.length;
    orthonormalModes(modes, 4 * start[g]!, m, points);
  });
  return { count: filled.length, start, points: list, modes, body: Int32Array.from(filled, ({ body }) => body) };
}

function orthonormalModes(out: Float64Array, o: number, members: readonly number[], points: QuadraturePoints): void {
  const volume = members.map((k) => points.volumes[k]!);
  const centre = [0, 0, 0];
  const total = volume.reduce((a, b) => a + b, 0);
  members.forEach((k, n) => {
    for (let d = 0; d < 3; d++) centre[d]! += (volume[n]! * points.positions[3 * k + d]!) / total;
  });
  const columns = [
    members.map(() => 1),
    ...[0, 1, 2].map((d) => members.map((k) => points.positions[3 * k + d]! - centre[d]!)),
  ];
  const dot = (a: number[], b: number[]) => a.reduce((sum, x, n) => sum + volume[n]! * x * b[n]!, 0);
  const extent = Math.sqrt(Math.max(...columns.slice(1).map((c) => dot(c, c))));
  columns.forEach((column, m) => {
    for (let before = 0; before < m; before++) {
      const share = dot(column, columns[before]!);
      for (let n = 0; n < column.length; n++) column[n]! -= share * columns[before]![n]!;
    }
    const norm = Math.sqrt(dot(column, column));
    const least = m === 0 ? 0 : 1e-6 * extent;
    for (let n = 0; n < column.length; n++) column[n] = norm > least ? column[n]! / norm : 0;
    column.forEach((value, n) => {
      out[o + 4 * n + m] = value;
    });
  });
}
