import { seededRandom } from '../../../solver/math/random';
import { castRays } from '../../../solver/quadrature/rays/cast';
import { insideIntervals, subtractIntervals } from '../../../solver/quadrature/rays/intervals';
import { rayLattice, rayPlace } from '../../../solver/quadrature/rays/lattice';
import { patchSoup } from '../../../solver/quadrature/rays/patch-soup';
import type { TriangleSoup } from '../../../solver/quadrature/rays/soup';
import { buildWindingTree, windingNumber } from '../../../solver/quadrature/rays/winding-tree';
import { box, patchesOf } from './test-scenes';

const all = (soup: TriangleSoup) => Int32Array.from(soup.patch, (_, t) => t);
const unit = { min: Float64Array.of(0, 0, 0), max: Float64Array.of(1, 1, 1) };

test.each([0, 1, 2])('rays along axis %i through shared corners and edges hit one triangle only', (axis) => {
  // A square grid whose corners sit on rays: every ray inside meets four to eight triangles at a corner.
  const lattice = rayLattice(axis, unit, [12, 9, 12]);
  const sites: number[] = [];
  const place = new Float64Array(2);
  const positions: number[] = [];
  const number = new Map<string, number>();
  for (let a = 0; a < lattice.countA; a++) {
    for (let b = 0; b < lattice.countB; b++) {
      const p = [0, 0, 0];
      rayPlace(place, lattice, a * lattice.countB + b);
      p[axis] = 0.5;
      p[lattice.u] = place[0]!;
      p[lattice.v] = place[1]!;
      number.set(`${a},${b}`, positions.length / 3);
      positions.push(...p);
      if (a > 0 && b > 0 && a + 1 < lattice.countA && b + 1 < lattice.countB) sites.push(a * lattice.countB + b);
    }
  }
  const triangles: number[] = [];
  for (let a = 0; a + 1 < lattice.countA; a++) {
    for (let b = 0; b + 1 < lattice.countB; b++) {
      const [p, q, r, s] = [
        [a, b],
        [a + 1, b],
        [a + 1, b + 1],
        [a, b + 1],
      ].map((k) => number.get(k.join(','))!);
      triangles.push(p!, q!, r!, p!, r!, s!);
    }
  }
  const soup = {
    positions: Float64Array.from(positions),
    triangles: Int32Array.from(triangles),
    patch: new Int32Array(triangles.length / 3),
  };
  const hits = castRays(lattice, soup, all(soup));
  expect(sites.length).toBeGreaterThan(100);
  expect(sites.map((site) => hits.start[site + 1]! - hits.start[site]!)).toEqual(sites.map(() => 1));
});

test('hits come in order along the ray, in and out by turns through a closed body', () => {
  const soup = patchSoup(
    patchesOf({ kind: 'torus', centre: [0, 0, 0], axis: [1, 2, 2], majorRadius: 1, minorRadius: 0.3 }),
  );
  const bounds = { min: Float64Array.of(-1.3, -1.3, -1.3), max: Float64Array.of(1.3, 1.3, 1.3) };
  const hits = castRays(rayLattice(0, bounds, [40, 40, 40]), soup, all(soup));
  let wrong = 0;
  for (let ray = 0; ray + 1 < hits.start.length; ray++) {
    let sum = 0;
    for (let h = hits.start[ray]!; h < hits.start[ray + 1]!; h++) {
      if (h > hits.start[ray]! && hits.at[h]! < hits.at[h - 1]!) wrong++;
      sum += hits.sign[h]!;
      if (sum !== 0 && sum !== 1) wrong++;
    }
    if (sum !== 0) wrong++;
  }
  expect(hits.at.length).toBeGreaterThan(500);
  expect(wrong).toBe(0);
});

describe('winding number', () => {
  const random = seededRandom(3);
  const places = Array.from({ length: 300 }, () => [0, 1, 2].map(() => 4 * random() - 2) as [number, number, number]);

  test('is 1 inside and 0 outside a closed box, exactly', () => {
    const soup = patchSoup(patchesOf(box([-1, -1, -1], [1, 1, 1])));
    const tree = buildWindingTree(soup, all(soup));
    for (const p of places) {
      const inside = p.every((x) => Math.abs(x) < 1);
      expect(Math.abs(windingNumber(tree, ...p) - (inside ? 1 : 0))).toBeLessThan(1e-12);
    }
  });

  test('on a finely cut torus the far field errs by less than .05', () => {
    const soup = patchSoup(
      patchesOf({ kind: 'torus', centre: [0, 0, 0], axis: [0, 0, 1], majorRadius: 1.2, minorRadius: 0.5 }),
    );
    const tree = buildWindingTree(soup, all(soup));
    let worst = 0;
    for (const [x, y, z] of places) {
      const toTube = Math.hypot(Math.hypot(x, y) - 1.2, z) - 0.5;
      if (Math.abs(toTube) > 0.01)
        worst = Math.max(worst, Math.abs(windingNumber(tree, x, y, z) - (toTube < 0 ? 1 : 0)));
    }
    expect(worst).toBeLessThan(0.05);
  });

  test('in the middle of a cube with one face open it is 5/6', () => {
    const soup = patchSoup(patchesOf(box([-1, -1, -1], [1, 1, 1])).slice(1));
    expect(windingNumber(buildWindingTree(soup, all(soup)), 0, 0, 0)).toBeCloseTo(5 / 6, 12);
  });
});

test('subtracting intervals keeps what is outside', () => {
  const list = (rows: [number, number, number][]) => ({
    count: rows.length,
    ray: Int32Array.from(rows, (r) => r[0]),
    from: Float64Array.from(rows, (r) => r[1]),
    to: Float64Array.from(rows, (r) => r[2]),
  });
  const left = subtractIntervals(
    list([
      [0, 0, 10],
      [0, 12, 14],
      [2, 0, 4],
    ]),
    list([
      [0, 1, 2],
      [0, 3, 13],
      [1, 0, 9],
      [2, -1, 5],
    ]),
  );
  const rows = Array.from({ length: left.count }, (_, n) => [left.ray[n], left.from[n], left.to[n]]);
  expect(rows).toEqual([
    [0, 0, 1],
    [0, 2, 3],
    [0, 13, 14],
  ]);
});

test('rays without hits ask the winding number and find where it passes ½', () => {
  const lattice = rayLattice(0, unit, [8, 8, 8]);
  const hits = castRays(
    lattice,
    { positions: new Float64Array(0), triangles: new Int32Array(0), patch: new Int32Array(0) },
    new Int32Array(0),
  );
  const rule = { bounds: unit, winding: (x: number) => x * x, trustCrossings: true };
  const open = insideIntervals(lattice, hits, { ...rule, closed: false });
  expect(Math.abs(open.count / 64 - 1)).toBeLessThan(0.1);
  for (let n = 0; n < open.count; n++) {
    // Five samples a ray, halved eight times.
    expect(Math.abs(open.from[n]! - Math.SQRT1_2)).toBeLessThan(0.2 / 2 ** 8);
    expect(open.to[n]).toBe(1);
  }
  expect(insideIntervals(lattice, hits, { ...rule, closed: true }).count).toBe(0);
});
