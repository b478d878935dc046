import type { Kernels } from '../../kernels/kernels';
import { basisField } from '../../weights/basis-field';
import type { Simulation } from '../../time/simulation';
import {
  box,
  caseScene,
  compare,
  plane,
  simulateCase,
  WALL,
  type CaseRow,
  type PublishedCase,
} from '../published-case';

const SOURCE = 'G. R. Cowper, J. Appl. Mech. 33 (1966) 335';
const LENGTH = 0.4;
const SIDE = 0.1;
const FORCE = 0.1;
/** Five-point Gauss rule on [−1, 1] (value from memory). */
const GAUSS: readonly (readonly [number, number])[] = [
  [-0.9061798459386640, 0.2369268850561891],
  [-0.5384693101056831, 0.4786286704993665],
  [0, 0.5688888888888889],
  [0.5384693101056831, 0.4786286704993665],
  [0.9061798459386640, 0.2369268850561891],
]; // prettier-ignore

/** Cowper's section means of a bar along x at one x: deflection W = ∫u_z dA/A and rotation φ = ∫z u_x dA/I. */
function section(simulation: Simulation, x: number): { deflection: number; rotation: number } {
  const { parts, bodies } = simulation.prepared;
  const field = basisField(parts, bodies);
  const c = simulation.coefficients;
  let deflection = 0;
  let rotation = 0;
  for (const [a, wa] of GAUSS) {
    for (const [b, wb] of GAUSS) {
      const y = (SIDE / 2) * (1 + a);
      const z = (SIDE / 2) * (1 + b);
      const active = field.evaluate(x, y, z, 0, false);
      let ux = -x;
      let uz = -z;
      for (let m = 0; m < active; m++) {
        for (let k = 0; k < parts.basis; k++) {
          const n = field.values[m * parts.basis + k]!;
          const at = field.sample.parts[m]! * 3 * parts.basis + k;
          ux += n * c[at]!;
          uz += n * c[at + 2 * parts.basis]!;
        }
      }
      deflection += (wa * wb * uz) / 4;
      rotation += (wa * wb * (z - SIDE / 2) * ux * 12) / (4 * SIDE ** 2);
    }
  }
  return { deflection, rotation };
}

/** κ = P / (G A γ) with γ = W′ + φ, averaged over a stretch of the side's length in mid-bar. */
function coefficient(poissonsRatio: number, parts: number, kernels: Kernels): number {
  const scene = caseScene({
    parts,
    material: { poissonsRatio },
    geometry: box([0, 0, 0], [LENGTH, SIDE, SIDE]),
    supports: [WALL],
    loads: [
      {
        id: 'L1',
        name: 'End load',
        kind: 'traction',
        region: plane('x', LENGTH),
        traction: [0, 0, -FORCE / SIDE ** 2],
      },
    ],
  });
  const simulation = simulateCase(scene, kernels);
  simulation.solveStatic(1);
  const from = (LENGTH - SIDE) / 2;
  const rise = section(simulation, from + SIDE).deflection - section(simulation, from).deflection;
  const turned = GAUSS.reduce(
    (sum, [a, w]) => sum + (w / 2) * section(simulation, from + (SIDE / 2) * (1 + a)).rotation,
    0,
  );
  const shear = 1e6 / (2 * (1 + poissonsRatio));
  return FORCE / (shear * SIDE ** 2 * Math.abs(rise / SIDE + turned));
}

function rows(kernels: Kernels): CaseRow[] {
  return [0, 0.3, 0.45].flatMap((nu) =>
    [10, 24].map((parts) =>
      compare({
        what: `shear coefficient of a square section, ν = ${nu}`,
        source: SOURCE,
        unit: '',
        parts,
        expected: (10 * (1 + nu)) / (12 + 11 * nu),
        ours: coefficient(nu, parts, kernels),
        bar: parts < 24 ? 0.03 : 0.01,
      }),
    ),
  );
}

export const shearCoefficient: PublishedCase = { id: 'shear-coefficient', converges: true, rows };
