import type { Kernels } from '../../kernels/kernels';
import type { Region, Scene } from '../../scene';
import {
  box,
  caseScene,
  compare,
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

/** Where the slope is read, m: a side away from the end, where the couple's own pattern has died out. */
const SLOPE_AT = 0.9;

const half = (from: number, to: number): Region => ({
  kind: 'box',
  min: [1 - 1e-6, 0, from],
  max: [1 + 1e-6, SIDE, to],
});

function scene(parts: number): Scene {
  // A pull on the lower half of the end and a push on the upper one: M = p b h²/4.
  const p = (4 * MOMENT) / SIDE ** 3;
  return caseScene({
    parts,
    geometry: box([0, 0, 0], [1, SIDE, SIDE]),
    supports: [WALL],
    loads: [
      { id: 'L1', name: 'Pull', kind: 'traction', region: half(0, SIDE / 2), traction: [p, 0, 0] },
      { id: 'L2', name: 'Push', kind: 'traction', region: half(SIDE / 2, SIDE), traction: [-p, 0, 0] },
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
    const { gauges, supports } = simulation.readouts();
    // The couple as the wall feels it: samples of half a face have their own lever arm.
    const moment = Math.abs(supports[0]!.moment[1]);
    const mean = (axis: 0 | 2, ids: string[]) =>
      gauges.filter((g) => ids.includes(g.id)).reduce((sum, g) => sum + g.displacement[axis], 0) / ids.length;
    return [
      compare({
        what: 'tip deflection under an end moment, per N m',
        source: SOURCE,
        unit: 'm',
        parts,
        expected: 1 / (2 * EI),
        ours: Math.abs(mean(2, ['G00', 'G10', 'G01', 'G11'])) / moment,
        bar: parts < 24 ? 0.02 : 0.01,
      }),
      compare({
        what: 'slope at nine tenths of the length, per N m',
        source: SOURCE,
        unit: 'rad',
        parts,
        expected: SLOPE_AT / EI,
        ours: Math.abs(mean(0, ['SG01', 'SG11']) - mean(0, ['SG00', 'SG10'])) / SIDE / moment,
        bar: parts < 24 ? 0.02 : 0.01,
      }),
    ];
  });
}

export const endMoment: PublishedCase = { id: 'end-moment', converges: true, rows };
