import { box, caseScene, plane, simulateCase, WALL } from '../../../solver/cases/published-case';
import { gustShare } from '../../../solver/energy/gusts';
import { bestKernels } from '../../../solver/kernels/best-kernels';

const gusts = { factor: 1.66, seconds: 3, seed: 4 };
const history = (of = gusts) => Array.from({ length: 6000 }, (_, k) => gustShare(of, k * 0.1));

test('gusts stay within the gust factor, come near it, keep the mean and never jump', () => {
  const shares = history();
  expect(Math.max(...shares)).toBeLessThanOrEqual(1.66);
  expect(Math.max(...shares)).toBeGreaterThan(1.6);
  expect(Math.min(...shares)).toBeGreaterThanOrEqual(0.34);
  expect(shares.reduce((sum, x) => sum + x, 0) / shares.length).toBeCloseTo(1, 1);
  // The steepest smoothstep is 1.5 a knot: 1.5 · 2 · 0.66 / 3 s over 0.1 s.
  for (let k = 1; k < shares.length; k++) expect(Math.abs(shares[k]! - shares[k - 1]!)).toBeLessThan(0.067);
  expect(shares[0]).toBe(1);
});

test('the same seed gives the same gusts, another one others; a factor of 1 is steady', () => {
  expect(history()).toEqual(history());
  expect(history({ ...gusts, seed: 5 })).not.toEqual(history());
  expect(new Set(history({ ...gusts, factor: 1 }))).toEqual(new Set([1]));
});

// Statics (common practice): what holds a body answers the moment that twists it, and nothing else.
test.each([2e-4, -1e-3])('a wall holds a bar against a twist of %d N m without a force', (moment) => {
  const simulation = simulateCase(
    caseScene({
      parts: 8,
      geometry: box([0, 0, 0], [1, 0.1, 0.1]),
      supports: [WALL],
      loads: [
        {
          id: 'L1',
          name: 'Twist',
          kind: 'twist',
          region: plane('x', 1),
          axis: [3, 0, 0],
          moment,
          from: 0,
          until: null,
        },
      ],
    }),
    bestKernels(),
  );
  simulation.solveStatic(1);
  const [wall] = simulation.readouts().supports;
  expect(wall!.moment[0] / -moment).toBeCloseTo(1, 4);
  for (const value of [...wall!.force, wall!.moment[1], wall!.moment[2]])
    expect(Math.abs(value)).toBeLessThan(1e-4 * Math.abs(moment));
});

test('a twist ends at its time, and a gusty wind pushes otherwise than a steady one', () => {
  const bar = (loads: Parameters<typeof caseScene>[0]['loads']) =>
    caseScene({
      parts: 6,
      geometry: box([0, 0, 0], [1, 0.1, 0.1]),
      supports: [WALL],
      loads: loads!,
      gauges: [{ id: 'G1', name: 'Corner', point: [1, 0, 0] }],
      time: { kind: 'motion', framesPerSecond: 24, frames: 48, substeps: 1, method: 'backward-euler' },
    });
  const reach = (loads: Parameters<typeof caseScene>[0]['loads']) => {
    const simulation = simulateCase(bar(loads), bestKernels());
    let most = 0;
    for (let k = 0; k < 24; k++) {
      simulation.step();
      most = Math.max(most, Math.hypot(...simulation.readouts().gauges[0]!.displacement));
    }
    return { most, last: Math.hypot(...simulation.readouts().gauges[0]!.displacement) };
  };
  const twist = { id: 'L1', name: 'Twist', kind: 'twist', region: plane('x', 1), axis: [1, 0, 0], moment: 0.01, from: 0 } as const; // prettier-ignore
  const brief = reach([{ ...twist, axis: [1, 0, 0], until: 0.25 }]);
  const lasting = reach([{ ...twist, axis: [1, 0, 0], until: null }]);
  expect(lasting.last).toBeGreaterThan(5 * brief.last);
  const wind = { id: 'L1', name: 'Wind', kind: 'wind', velocity: [0, 6, 0], dragCoefficient: 1.2, airDensity: 1.225 } as const; // prettier-ignore
  const steady = reach([{ ...wind, velocity: [0, 6, 0] }]);
  const gusty = reach([{ ...wind, velocity: [0, 6, 0], gusts: { factor: 2, seconds: 0.4, seed: 2 } }]);
  expect(Math.abs(gusty.last / steady.last - 1)).toBeGreaterThan(0.02);
});
