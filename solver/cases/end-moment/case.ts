import type { Kernels } from '../../kernels/kernels';
import type { Scene } from '../../scene';
import {
  box,
  caseScene,
  compare,
  plane,
  sectionGauges,
  simulateCase,
  WALL,
  type CaseRow,
  type PublishedCase,
} from '../published-case';

const SOURCE = 'S. Timoshenko, Strength of Materials I, 3rd ed. (1955), ch. 5';
const SIDE = 0.1;
const EI = (1e6 * SIDE ** 4) / 12;
/** A thousandth of the card's 1 N m, so that the answer is linear. */
const MOMENT = 1e-3;

/** Where the slope is read, m: a side away from the end. */
const SLOPE_AT = 0.9;

function scene(parts: number): Scene {
  return caseScene({
    parts,
    geometry: box([0, 0, 0], [1, SIDE, SIDE]),
    supports: [WALL],
    loads: [
      {
        id: 'L1',
        name: 'Couple',
        kind: 'twist',
        region: plane('x', 1),
        axis: [0, 1, 0],
        moment: MOMENT,
        from: 0,
        until: null,
      },
    ],
    gauges: [
      ...sectionGauges(1, SIDE, SIDE),
      ...sectionGauges(SLOPE_AT, SIDE, SIDE).map((g) => ({ ...g, id: `S${g.id}` })),
    ],
  });
}

function rows(kernels: Kernels): CaseRow[] {
  return [10, 24, 40].flatMap((parts) => {
    const simulation = simulateCase(scene(parts), kernels);
    simulation.solveStatic(1);
    const { gauges } = simulation.readouts();
    const mean = (axis: 0 | 2, ids: string[]) =>
      gauges.filter((g) => ids.includes(g.id)).reduce((sum, g) => sum + g.displacement[axis], 0) / ids.length;
    return [
      compare({
        what: 'tip deflection under an end moment, per N m',
        source: SOURCE,
        unit: 'm',
        parts,
        expected: 1 / (2 * EI),
        ours: Math.abs(mean(2, ['G00', 'G10', 'G01', 'G11'])) / MOMENT,
        bar: parts < 24 ? 0.02 : 0.01,
      }),
      compare({
        what: 'slope at nine tenths of the length, per N m',
        source: SOURCE,
        unit: 'rad',
        parts,
        expected: SLOPE_AT / EI,
        ours: Math.abs(mean(0, ['SG01', 'SG11']) - mean(0, ['SG00', 'SG10'])) / SIDE / MOMENT,
        bar: parts < 24 ? 0.02 : 0.01,
      }),
    ];
  });
}

export const endMoment: PublishedCase = { id: 'end-moment', converges: true, rows };
