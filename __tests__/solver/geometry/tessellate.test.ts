import { tessellateForDisplay } from '../../../solver/geometry/display-mesh';
import { PatchEvaluator } from '../../../solver/geometry/evaluate-patch';
import { fitsShape } from '../../support/shape-distance';
import { shapePatches } from '../../../solver/geometry/shapes';
import { boundsOf, tessellate, type Tessellation } from '../../../solver/geometry/tessellate';
import { seededRandom } from '../../../solver/math/random';
import type { Shape } from '../../../solver/scene';
import { randomPatch } from '../../support/random-patch';

const shapes: Record<string, Shape> = {
  sphere: { kind: 'sphere', centre: [1, 2, 3], radius: 0.5 },
  torus: { kind: 'torus', centre: [0, 0, 0], axis: [1, 1, 0], majorRadius: 1, minorRadius: 0.25 },
  cylinder: { kind: 'cylinder', start: [0, 0, 0], end: [1, 2, 3], radius: 0.25 },
  box: { kind: 'box', min: [0, 0, 0], max: [3, 2, 1], gap: 0 },
};

const corner = (mesh: Tessellation, triangle: number, k: number) => {
  const at = 3 * mesh.triangles[3 * triangle + k]!;
  return mesh.positions.subarray(at, at + 3);
};

function volume(mesh: Tessellation): number {
  let sum = 0;
  for (let t = 0; t < mesh.triangles.length / 3; t++) {
    const [a, b, c] = [corner(mesh, t, 0), corner(mesh, t, 1), corner(mesh, t, 2)];
    sum +=
      a[0]! * (b[1]! * c[2]! - b[2]! * c[1]!) +
      a[1]! * (b[2]! * c[0]! - b[0]! * c[2]!) +
      a[2]! * (b[0]! * c[1]! - b[1]! * c[0]!);
  }
  return sum / 6;
}

describe.each(Object.entries(shapes))('%s', (_, shape) => {
  const chord = 1e-3;
  const mesh = tessellate(shapePatches(shape), { chord, maxCells: 400 });

  test('the middles of triangles miss the surface by one chord for each direction at most', () => {
    for (let t = 0; t < mesh.triangles.length / 3; t++) {
      const middle = [0, 1, 2].map(
        (d) => (corner(mesh, t, 0)[d]! + corner(mesh, t, 1)[d]! + corner(mesh, t, 2)[d]!) / 3,
      );
      expect(fitsShape(shape, middle)).toBeLessThan(2 * chord);
    }
  });

  test('no triangle is collapsed, and each turns the way its normals point', () => {
    for (let t = 0; t < mesh.triangles.length / 3; t++) {
      const [a, b, c] = [corner(mesh, t, 0), corner(mesh, t, 1), corner(mesh, t, 2)];
      const e = [0, 1, 2].map((d) => b[d]! - a[d]!);
      const f = [0, 1, 2].map((d) => c[d]! - a[d]!);
      const n = [e[1]! * f[2]! - e[2]! * f[1]!, e[2]! * f[0]! - e[0]! * f[2]!, e[0]! * f[1]! - e[1]! * f[0]!];
      expect(Math.hypot(...n)).toBeGreaterThan(1e-9);
      const normal = mesh.normals.subarray(3 * mesh.triangles[3 * t]!, 3 * mesh.triangles[3 * t]! + 3);
      expect(n[0]! * normal[0]! + n[1]! * normal[1]! + n[2]! * normal[2]!).toBeGreaterThan(0);
    }
  });

  test('vertices carry their patch’s parameters', () => {
    const patches = shapePatches(shape);
    const evaluator = new PatchEvaluator();
    const p = new Float64Array(3);
    for (let v = 0; v < mesh.patch.length; v += 7) {
      evaluator.evaluate(p, patches[mesh.patch[v]!]!, mesh.parameters[2 * v]!, mesh.parameters[2 * v + 1]!, 0);
      expect([...p]).toEqual([...mesh.positions.subarray(3 * v, 3 * v + 3)]);
    }
  });
});

test('a chord 16 times shorter brings the sphere’s volume 16 times nearer', () => {
  const error = (chord: number) =>
    Math.abs(volume(tessellate(shapePatches(shapes.sphere!), { chord, maxCells: 400 })) - (4 / 3) * Math.PI * 0.125);
  const rate = Math.log2(error(4e-3) / error(2.5e-4)) / 4;
  // Cells come in whole numbers, which moves the rate a little.
  expect(rate).toBeGreaterThan(0.8);
  expect(rate).toBeLessThan(1.25);
});

describe('meshes for the screen', () => {
  test.each([500, 3000, 20000])('stay within a budget of %i vertices and use most of it', (budget) => {
    const patches = shapePatches(shapes.torus!);
    const mesh = tessellateForDisplay(patches, boundsOf(patches[0]!.points).diagonal, budget);
    expect(mesh.patch.length).toBeLessThanOrEqual(budget);
    if (budget < 20000) expect(mesh.patch.length).toBeGreaterThan(budget / 4);
  });

  test('give flat faces cells to bend with', () => {
    const patches = shapePatches({ kind: 'box', min: [0, 0, 0], max: [10, 1, 1], gap: 0 });
    const mesh = tessellateForDisplay(patches, 10.1, 20000);
    expect(new Set(mesh.positions.filter((_, k) => k % 3 === 0)).size).toBeGreaterThan(40);
  });

  test.each(['sphere', 'cylinder', 'box', 'torus'])(
    'a %s has no pinholes: joined vertices share their place bit for bit',
    (kind) => {
      const patches = shapePatches(shapes[kind]!);
      const mesh = tessellateForDisplay(patches, 4, 8000);
      // Every side of a triangle, by the places of its ends, is met exactly once the other way round.
      const place = (v: number) => mesh.positions.subarray(3 * v, 3 * v + 3).join(' ');
      const sides = new Map<string, number>();
      for (let t = 0; t < mesh.triangles.length; t += 3) {
        for (let k = 0; k < 3; k++) {
          const from = place(mesh.triangles[t + k]!);
          const to = place(mesh.triangles[t + ((k + 1) % 3)]!);
          sides.set(`${from}>${to}`, (sides.get(`${from}>${to}`) ?? 0) + 1);
        }
      }
      const open = [...sides.keys()].filter((key) => !sides.has(key.split('>').reverse().join('>')));
      expect(open).toEqual([]);
    },
  );

  test('are the same whenever they are made', () => {
    const patches = [randomPatch(seededRandom(3), 3, 3, 6, 6), randomPatch(seededRandom(4), 2, 3, 5, 7)];
    const [a, b] = [tessellateForDisplay(patches, 10, 2000), tessellateForDisplay(patches, 10, 2000)];
    expect(a).toEqual(b);
  });
});
