import type { Kernels } from '../../kernels/kernels';
import type { Scene } from '../../scene';
import type { Simulation } from '../../time/simulation';
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

export const ELASTICA_SOURCE = 'K. E. Bisshopp and D. C. Drucker, Q. Appl. Math. 3 (1945) 272';
/** PL²/EI; tip deflection w/L; tip shortening u/L, from the elliptic integrals of the source. */
export const ELASTICA: readonly (readonly [number, number, number])[] = [
  [0.5, 0.162144, 0.015919],
  [1, 0.301721, 0.056433],
  [2, 0.493457, 0.160642],
  [3, 0.603253, 0.25442],
  [4, 0.669964, 0.328941],
  [5, 0.713792, 0.387628],
  [6, 0.744571, 0.434589],
  [8, 0.784982, 0.504828],
  [10, 0.810609, 0.554996],
];
const WIDTH = 0.1;
const HEIGHT = 0.02;
const YOUNG = 1e7;
const EI = (YOUNG * WIDTH * HEIGHT ** 3) / 12;

function elasticaScene(load: number, parts: number): Scene {
  return caseScene({
    parts,
    material: { youngsModulus: YOUNG, poissonsRatio: 0 },
    geometry: box([0, 0, 0], [1, WIDTH, HEIGHT]),
    supports: [WALL],
    loads: [
      {
        id: 'L1',
        name: 'Tip load',
        kind: 'traction',
        region: plane('x', 1),
        traction: [0, 0, (-load * EI) / (WIDTH * HEIGHT)],
      },
    ],
    gauges: sectionGauges(1, WIDTH, HEIGHT),
  });
}

/** The bar on its way up the table: every load from the pose of the one before. */
export class ElasticaBar {
  readonly simulation: Simulation;

  constructor(
    private readonly parts: number,
    kernels: Kernels,
  ) {
    this.simulation = simulateCase(elasticaScene(0, parts), kernels);
  }

  /** Tip deflection and shortening over the length under PL²/EI = load. */
  bend(load: number): { w: number; u: number } {
    this.simulation.update(elasticaScene(load, this.parts));
    this.simulation.solveStatic(1);
    const [x, , z] = meanGauge(this.simulation);
    return { w: -z, u: -x };
  }
}

function rows(kernels: Kernels): CaseRow[] {
  return [12, 24].flatMap((parts) => {
    const bar = new ElasticaBar(parts, kernels);
    return ELASTICA.flatMap(([load, deflection, shortening]) => {
      const { w, u } = bar.bend(load);
      if (![1, 5, 10].includes(load)) return [];
      const common = { source: ELASTICA_SOURCE, unit: 'of the length', parts };
      return [
        compare({ ...common, what: `tip deflection at PL²/EI = ${load}`, expected: deflection, ours: w, bar: 0.003 }),
        compare({ ...common, what: `tip shortening at PL²/EI = ${load}`, expected: shortening, ours: u, bar: 0.005 }),
      ];
    });
  });
}

export const elastica: PublishedCase = { id: 'elastica', converges: true, rows };
