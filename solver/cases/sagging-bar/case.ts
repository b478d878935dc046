import type { Kernels } from '../../kernels/kernels';
import type { Scene } from '../../scene';
import { box, caseScene, compare, meanGauge, sectionGauges, simulateCase, WALL, type CaseRow, type PublishedCase } from '../published-case'; // prettier-ignore

const SOURCE = 'quadratic hexahedra 16 × 2 × 2, law A';

function tip(parts: number, kernels: Kernels): readonly number[] {
  const scene = (gravity: number): Scene =>
    caseScene({
      parts,
      material: { law: 'neo-hookean-a' },
      geometry: box([0, 0, 0], [1, 0.1, 0.1]),
      supports: [WALL],
      loads: [{ id: 'L1', name: 'Weight', kind: 'gravity', acceleration: [0, 0, -gravity] }],
      gauges: sectionGauges(1, 0.1, 0.1),
    });
  const simulation = simulateCase(scene(0), kernels);
  for (const share of [1, 2, 3, 4, 5, 6]) {
    simulation.update(scene((9.81 * share) / 6));
    simulation.solveStatic(1);
  }
  return meanGauge(simulation);
}

const rows = (kernels: Kernels): CaseRow[] =>
  [10, 24].flatMap((parts) => {
    const [x, , z] = tip(parts, kernels);
    const common = { source: SOURCE, unit: 'm', parts, bar: parts < 24 ? 0.05 : 0.015 };
    return [
      compare({ ...common, what: 'sag of a soft bar under full weight', expected: -0.748924, ours: z! }),
      compare({ ...common, what: 'shortening of a soft bar under full weight', expected: -0.39741, ours: x! }),
    ];
  });

export const saggingBar: PublishedCase = { id: 'sagging-bar', converges: true, rows };
