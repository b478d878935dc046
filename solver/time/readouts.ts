import { constraintReaction } from '../energy/constraints';
import type { PotentialEnergy } from '../energy/potential';
import { evaluateRow } from '../energy/rows';
import type { Prepared } from '../quadrature/prepared';
import type { Scene, Vec3 } from '../scene';

export interface Readouts {
  /** J */
  kinetic: number;
  elastic: number;
  gravity: number;
  /** current over rest volume − 1 */
  volumeChange: number;
  /** smallest J over the quadrature points */
  worstCompression: number;
  gauges: { id: string; name: string; position: Vec3; displacement: Vec3 }[];
  /** Force (N) and moment (N m, about the support's pivot) that each support puts on the body. */
  supports: { id: string; name: string; force: Vec3; moment: Vec3 }[];
}

/** Vertices of the drawn surface nearest to each gauge of the scene. */
export function gaugeRows(scene: Scene, prepared: Prepared): number[] {
  return scene.gauges.map((gauge) => nearest(prepared.surface.positions, gauge.point));
}

/** What a pose c with velocity v says; `rest` are the coefficients at rest, `rows` the gauges' vertices. */
export function readoutsOf(
  {
    prepared,
    potential,
    scene,
    rest,
    rows,
  }: {
    prepared: Prepared;
    potential: PotentialEnergy;
    scene: Scene;
    rest: Float64Array;
    rows: readonly number[];
  },
  c: Float64Array,
  v: Float64Array,
): Readouts {
  const elastic = potential.elastic.gradient(c, null);
  const momentum = new Float64Array(c.length);
  potential.applyMass(momentum, v);
  let kinetic = 0;
  for (let u = 0; u < c.length; u++) kinetic += 0.5 * momentum[u]! * v[u]!;
  const weight = new Float64Array(c.length);
  potential.loads.dead(weight, -1, 1);
  let gravity = 0;
  for (let u = 0; u < c.length; u++) gravity -= weight[u]! * (c[u]! - rest[u]!);
  let volume = 0;
  for (const each of prepared.points.volumes) volume += each;
  const place = new Float64Array(3);
  return {
    kinetic,
    elastic,
    gravity,
    volumeChange: potential.elastic.volume() / volume - 1,
    worstCompression: potential.elastic.worstJ(),
    gauges: scene.gauges.map((gauge, k) => {
      evaluateRow(place, prepared.surface.rows, rows[k]!, c);
      const position: Vec3 = [place[0]!, place[1]!, place[2]!];
      evaluateRow(place, prepared.surface.rows, rows[k]!, rest);
      return {
        id: gauge.id,
        name: gauge.name,
        position,
        displacement: [position[0] - place[0]!, position[1] - place[1]!, position[2] - place[2]!],
      };
    }),
    supports: potential.supports.map(({ support, constraint, pivot }) => ({
      id: support.id,
      name: support.name,
      ...constraintReaction(constraint, c, pivot),
    })),
  };
}

function nearest(positions: ArrayLike<number>, point: Vec3): number {
  let best = 0;
  let least = Infinity;
  for (let s = 0; 3 * s < positions.length; s++) {
    const d =
      (positions[3 * s]! - point[0]) ** 2 +
      (positions[3 * s + 1]! - point[1]) ** 2 +
      (positions[3 * s + 2]! - point[2]) ** 2;
    if (d < least) {
      least = d;
      best = s;
    }
  }
  return best;
}
