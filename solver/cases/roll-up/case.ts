import type { Kernels } from '../../kernels/kernels';
import type { Scene } from '../../scene';
import {
  box,
  caseScene,
  compare,
  meanGauge,
  plane,
  sectionGauges,
  simulateCase,
  WALL,
  type CaseRow,
  type PublishedCase,
} from '../published-case';

const SOURCE = 'Euler; J. C. Simo and L. Vu-Quoc, CMAME 58 (1986) 79';
const WIDTH = 0.05;
const HEIGHT = 0.02;
const EI = (1e6 * WIDTH * HEIGHT ** 3) / 12;
const STEPS = 16;

/** Place of the point at arc length s on a circle that turns by `angle` over the length 1, less its rest place. */
const onCircle = (s: number, angle: number) => ({
  u: Math.sin(s * angle) / angle - s,
  w: (1 - Math.cos(s * angle)) / angle,
});

function scene(angle: number, parts: number): Scene {
  const { u, w } = onCircle(1, angle);
  return caseScene({
    parts,
    material: { poissonsRatio: 0 },
    geometry: box([0, 0, 0], [1, WIDTH, HEIGHT]),
    supports: [
      WALL,
      {
        id: 'S2',
        name: 'End',
        region: plane('x', 1),
        axes: ['x', 'y', 'z'],
        keys: [{ time: 0, translation: [u, 0, w], rotationDegrees: [0, (-angle * 180) / Math.PI, 0] }],
      },
    ],
    gauges: sectionGauges(0.5, WIDTH, HEIGHT),
  });
}

function rows(kernels: Kernels): CaseRow[] {
  const parts = 24;
  const simulation = simulateCase(scene(1e-6, parts), kernels);
  const found: CaseRow[] = [];
  for (let step = 1; step <= STEPS; step++) {
    const turn = step / STEPS;
    const angle = 2 * Math.PI * turn;
    simulation.update(scene(angle, parts));
    simulation.solveStatic(1);
    if (![0.25, 0.5, 0.75, 1].includes(turn)) continue;
    const common = { source: SOURCE, parts };
    const moment = -simulation.readouts().supports[1]!.moment[1];
    const { u, w } = onCircle(0.5, angle);
    const [x, , z] = meanGauge(simulation);
    found.push(
      compare({
        ...common,
        what: `end moment that rolls a bar up by ${turn} turn`,
        unit: 'N m',
        expected: angle * EI,
        ours: moment,
        bar: 0.01,
      }),
      compare({
        ...common,
        what: `distance of mid-bar from its rest place, ${turn} turn`,
        unit: 'of the length',
        expected: Math.hypot(u, w),
        ours: Math.hypot(x, z),
        bar: 0.003,
      }),
    );
  }
  return found;
}

export const rollUp: PublishedCase = { id: 'roll-up', converges: false, rows };
