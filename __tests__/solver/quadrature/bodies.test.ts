import { prepare } from '../../../solver/quadrature/prepare';
import { restCoefficients } from '../../../solver/quadrature/rest';
import { evaluateRows } from '../../../solver/quadrature/rows';
import type { SceneMaterial } from '../../../solver/scene';
import { box, furthest, patchesOf, plainScene, rubber, vectorAt } from './test-scenes';

const steel: SceneMaterial = { ...rubber, id: 'steel', name: 'Steel', youngsModulus: 2e11 };
const foam: SceneMaterial = { ...rubber, id: 'foam', name: 'Foam', youngsModulus: 5e5 };
const sixFrom = (first: number) => [0, 1, 2, 3, 4, 5].map((k) => first + k);

describe('pieces', () => {
  const plate = box([-1, -1, -0.1], [1, 1, 0]);
  const block = (gap: number) => box([-0.5, -0.5, gap], [0.5, 0.5, 0.6]);

  test.each([0.3, 0.0005])('two boxes %f m apart are two bodies with their own parts', (gap) => {
    const { bodies, parts, samples, ties } = prepare(plainScene(12), patchesOf(plate, block(gap)));
    expect(bodies.map((b) => Array.from(b.patches))).toEqual([sixFrom(0), sixFrom(6)]);
    expect(bodies[0]!.partCount + bodies[1]!.partCount).toBe(12);
    expect(Array.from(parts.body)).toEqual([
      ...Array<number>(bodies[0]!.partCount).fill(0),
      ...Array<number>(bodies[1]!.partCount).fill(1),
    ]);
    expect(Math.abs(bodies[1]!.volume - (0.6 - gap))).toBeLessThan(0.003);
    expect(Array.from(samples.body)).toEqual(Array.from(samples.patch, (k) => (k < 6 ? 0 : 1)));
    expect(ties.count).toBe(0);
  });

  test('boxes that run into each other are one body', () => {
    expect(prepare(plainScene(12), patchesOf(plate, block(-0.05))).bodies).toHaveLength(1);
  });

  test('loose-faced boxes side by side stay two bodies', () => {
    const { bodies } = prepare(
      plainScene(8),
      patchesOf(box([0, 0, 0], [1, 1, 1], 0.02), box([1.5, 0, 0], [2.5, 1, 1], 0.02)),
    );
    expect(bodies).toHaveLength(2);
  });

  test('a bond ties pieces closer than its distance, over the area that is near', () => {
    const patches = patchesOf(plate, block(0.004));
    expect(prepare(plainScene(12, { bondDistance: 0.003 }), patches).ties.count).toBe(0);
    const prepared = prepare(plainScene(12, { bondDistance: 0.005 }), patches);
    const { ties } = prepared;
    expect(ties.count).toBeGreaterThan(40);
    const area = ties.areas.reduce((a, b) => a + b, 0);
    expect(Math.abs(area - 1)).toBeLessThan(0.1);
    const rest = restCoefficients(prepared);
    const a = evaluateRows(new Float64Array(3 * ties.count), ties.a, rest);
    const b = evaluateRows(new Float64Array(3 * ties.count), ties.b, rest);
    expect(furthest(a, b)).toBeLessThan(1e-13);
  });
});

describe('materials', () => {
  const outer = box([0, 0, 0], [1, 1, 1]);
  const core = box([0.3, 0.3, 0.3], [0.7, 0.7, 0.7]);
  const prepared = prepare(
    plainScene(12, { materials: [rubber, { ...steel, patches: sixFrom(6) }] }),
    patchesOf(outer, core),
  );

  test('a core of a later material is cut out of the body round it', () => {
    const { bodies } = prepared;
    expect(bodies.map((b) => b.material)).toEqual([0, 1]);
    expect(Math.abs(bodies[0]!.volume / (1 - 0.064) - 1)).toBeLessThan(0.005);
    expect(Math.abs(bodies[1]!.volume / 0.064 - 1)).toBeLessThan(0.005);
    const core1 = { min: 0.3, max: 0.7 };
    const { points } = prepared;
    let within = 0;
    for (let k = 0; k < points.count; k++) {
      const p = vectorAt(points.positions, k);
      if (points.body[k] === 0 && p.every((x) => x > core1.min + 0.02 && x < core1.max - 0.02)) within++;
    }
    // A cell's points may reach a little past a concave edge, not into the middle.
    expect(within / points.count).toBeLessThan(0.02);
  });

  test('the stiff core gets one part and its surface is the interface', () => {
    const { bodies, ties, samples } = prepared;
    expect(bodies[1]!.partCount).toBe(1);
    expect(Math.abs(ties.areas.reduce((a, b) => a + b, 0) / (6 * 0.16) - 1)).toBeLessThan(0.01);
    expect(new Set(ties.bodyA)).toEqual(new Set([0]));
    expect(new Set(ties.bodyB)).toEqual(new Set([1]));
    expect(Array.from(samples.exposed)).toEqual(Array.from(samples.body, (b) => (b === 0 ? 1 : 0)));
  });

  test('a core is cut out of the body round it also when its material comes first', () => {
    const { bodies, ties } = prepare(
      plainScene(12, { materials: [{ ...steel, patches: sixFrom(6) }, rubber] }),
      patchesOf(outer, core),
    );
    expect(bodies.map((b) => Array.from(b.patches))).toEqual([sixFrom(6), sixFrom(0)]);
    expect(Math.abs(bodies[0]!.volume / 0.064 - 1)).toBeLessThan(0.005);
    expect(Math.abs(bodies[1]!.volume / (1 - 0.064) - 1)).toBeLessThan(0.005);
    expect(Math.abs(ties.areas.reduce((a, b) => a + b, 0) / (6 * 0.16) - 1)).toBeLessThan(0.01);
  });

  test('where neither swallows the other the later material takes the overlap', () => {
    const { bodies } = prepare(
      plainScene(12, { materials: [{ ...foam, patches: sixFrom(6) }, rubber] }),
      patchesOf(box([0, 0, 0], [1, 0.5, 0.5]), box([0.8, 0.1, 0.1], [1.8, 0.4, 0.4])),
    );
    expect(bodies.map((b) => b.material)).toEqual([0, 1]);
    expect(Math.abs(bodies[1]!.volume / 0.25 - 1)).toBeLessThan(0.005);
    expect(Math.abs(bodies[0]!.volume / (0.09 - 0.2 * 0.09) - 1)).toBeLessThan(0.005);
  });

  test('boxes of unlike material that share a face are tied over it', () => {
    const { bodies, ties } = prepare(
      plainScene(8, { materials: [rubber, { ...foam, patches: sixFrom(6) }] }),
      patchesOf(box([0, 0, 0], [1, 0.5, 0.5]), box([1, 0, 0], [2, 0.5, 0.5])),
    );
    expect(bodies).toHaveLength(2);
    expect(Math.abs(ties.areas.reduce((a, b) => a + b, 0) / 0.25 - 1)).toBeLessThan(0.15);
    expect(ties.areas.length).toBeGreaterThan(40);
  });

  test('patches nobody claims take the first material, with a remark', () => {
    const { bodies, report } = prepare(
      plainScene(4, {
        materials: [
          { ...foam, patches: [0] },
          { ...rubber, patches: [1] },
        ],
      }),
      patchesOf(outer),
    );
    expect(bodies.map((b) => b.material)).toContain(0);
    expect(report.remarks[0]).toBe('4 of 6 patches have no material; they take “Foam”.');
  });

  test('a patch that does not exist is refused with what to do', () => {
    expect(() => prepare(plainScene(4, { materials: [rubber, { ...steel, patches: [9] }] }), patchesOf(outer))).toThrow(
      'Material “Steel” names patch 9, but the model has patches 0 to 5. Correct its list of patches.',
    );
  });

  test('patches without area are left out, with a remark', () => {
    const patches = patchesOf(outer);
    const point = { ...patches[0]!, points: patches[0]!.points.map(() => 2) };
    const { bodies, report } = prepare(plainScene(4), [...patches, point]);
    expect(bodies.map((b) => Array.from(b.patches))).toEqual([sixFrom(0)]);
    expect(report.remarks).toEqual(['1 of 7 patches has no area and takes no part.']);
    expect(() => prepare(plainScene(4), [point])).toThrow(
      'The model has no size: all its points are one. Choose another file.',
    );
  });

  test('a model without patches is refused', () => {
    expect(() => prepare(plainScene(), [])).toThrow('The model has no patches. Choose a file with surfaces in it.');
  });
});

describe('sheets', () => {
  const plate = patchesOf(box([0, 0, 0], [1, 0.5, 0.2])).slice(5);

  test('a lone face becomes a sheet of 1 % of the diagonal and says so', () => {
    const { bodies, report, parts } = prepare(plainScene(6), plate);
    const thickness = 0.01 * Math.hypot(1, 0.5);
    expect(bodies).toHaveLength(1);
    expect(parts.count).toBe(6);
    expect(Math.abs(bodies[0]!.volume / (0.5 * thickness) - 1)).toBeLessThan(1e-12);
    expect(report.remarks).toEqual([
      "One piece encloses nothing and is treated as a sheet 1.12 cm thick, 1 % of the model's diagonal: patches 0.",
    ]);
  });

  test('its second moment through the thickness is that of the solid plate, V t²/12', () => {
    const { report, points } = prepare(plainScene(6), plate);
    const thickness = 0.01 * Math.hypot(1, 0.5);
    expect(Math.abs(report.secondMoments[2] / ((report.volume * thickness ** 2) / 12) - 1)).toBeLessThan(1e-9);
    expect(Math.abs(report.secondMoments[0] / (report.volume / 12) - 1)).toBeLessThan(1e-9);
    // The projected points keep it.
    let moment = 0;
    for (let k = 0; k < points.count; k++) moment += points.volumes[k]! * (points.positions[3 * k + 2]! - 0.2) ** 2;
    expect(Math.abs(moment / report.secondMoments[2] - 1)).toBeLessThan(1e-9);
  });

  test('stacked sheets do not join', () => {
    const stack = [0, 1, 2].flatMap((n) => patchesOf(box([0, 0, 0], [1, 1, 0.1 * (n + 1)])).slice(5));
    expect(prepare(plainScene(6), stack).bodies).toHaveLength(3);
  });
});
