import type { Kernels } from '../../kernels/kernels';
import type { Scene, Vec3 } from '../../scene';
import { box, caseScene, compare, simulateCase, WALL, type CaseRow, type PublishedCase } from '../published-case';

const SOURCE = 'S. P. Timoshenko and J. N. Goodier, Theory of Elasticity, 3rd ed. (1970), sec. 32';
/** rad/s, about z through the root */
const SPEED = 1;
const STEPS_PER_SECOND = 120;
const SECONDS = 3;
/** First bending period of the bar, s: the start stirs it, and the mean over it does not. */
const PERIOD = 1 / 0.50933;

function scene(poissonsRatio: number, parts: number): Scene {
  const key = (time: number) => ({
    time,
    translation: [0, 0, 0] as Vec3,
    rotationDegrees: [0, 0, (SPEED * time * 180) / Math.PI] as Vec3,
  });
  return caseScene({
    parts,
    material: { poissonsRatio },
    geometry: box([0, -0.05, -0.05], [1, 0.05, 0.05]),
    supports: [{ ...WALL, pivot: [0, 0, 0], keys: [key(0), key(SECONDS)] }],
    gauges: [-0.05, 0.05].flatMap((y) =>
      [-0.05, 0.05].map((z) => ({ id: `G${y}${z}`, name: 'Tip', point: [1, y, z] as Vec3 })),
    ),
    time: {
      kind: 'motion',
      framesPerSecond: STEPS_PER_SECOND,
      frames: SECONDS * STEPS_PER_SECOND,
      substeps: 1,
      method: 'backward-euler',
    },
  });
}

/** Mean over the last bending period of how much farther from the axis the tip is than at rest, m. */
function tipStretch(poissonsRatio: number, parts: number, kernels: Kernels): number {
  const simulation = simulateCase(scene(poissonsRatio, parts), kernels);
  const { count, basis } = simulation.prepared.parts;
  const rest = simulation.coefficients.slice();
  // It starts as a rigid body already turning: v = ω × X, which the rest coefficients hold exactly.
  const velocity = new Float64Array(rest.length);
  for (let part = 0; part < count; part++) {
    for (let a = 0; a < basis; a++) {
      const at = 3 * part * basis + a;
      velocity[at] = -SPEED * rest[at + basis]!;
      velocity[at + basis] = SPEED * rest[at]!;
    }
  }
  simulation.adopt(rest, velocity, 0);
  let sum = 0;
  let counted = 0;
  for (let step = 1; step <= SECONDS * STEPS_PER_SECOND; step++) {
    simulation.step({ exact: true });
    if (step <= (SECONDS - PERIOD) * STEPS_PER_SECOND) continue;
    const { gauges } = simulation.readouts();
    const tip = [0, 1].map((d) => gauges.reduce((s, g) => s + g.position[d]!, 0) / gauges.length);
    sum += Math.hypot(...tip) - 1;
    counted++;
  }
  return sum / counted;
}

const rows = (kernels: Kernels): CaseRow[] =>
  [0, 0.3].map((nu) =>
    compare({
      what: `tip of a bar turning at 1 rad/s, outward, ν = ${nu}`,
      source: SOURCE,
      unit: 'm',
      parts: 6,
      expected: 1e3 / 3e6,
      ours: tipStretch(nu, 6, kernels),
      bar: nu === 0 ? 0.003 : 0.01,
    }),
  );

export const rotatingBar: PublishedCase = { id: 'rotating-bar', converges: false, rows };
