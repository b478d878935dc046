import type { Prepared } from '../quadrature/prepared';
import { samplesInRegion } from '../quadrature/regions';
import type { Scene, SceneLoad } from '../scene';
import { applyForm } from '../kernels/plain-blocks';
import { gustShare } from './gusts';
import { evaluateRow, scatterRow } from './rows';

/** A load that found its samples, ready to be added to the force vector. */
interface Placed {
  load: Scene['loads'][number];
  samples: Int32Array;
  area: number;
}

/** The scene's loads on one prepared body. Forces in N. Throws RangeError when a region touches nothing. */
export class Loads {
  private readonly placed: Placed[];
  private readonly gravity: Float64Array;
  private readonly scratch: Float64Array[] = [new Float64Array(3), new Float64Array(3), new Float64Array(3)];

  constructor(
    private readonly prepared: Prepared,
    scene: Scene,
  ) {
    const { samples, report } = prepared;
    this.placed = scene.loads
      .filter((load) => load.kind !== 'gravity')
      .map((load) => {
        const region = 'region' in load ? load.region : ({ kind: 'all' } as const);
        // Skin buried in another piece is no outside: pressure and wind do not reach it.
        const chosen = samplesInRegion(samples, region, report.diagonal).filter((s) => samples.exposed[s] === 1);
        if (chosen.length === 0)
          throw new RangeError(`Load ${load.id} (${load.name}) touches no surface. Move its region onto the body.`);
        return { load, samples: chosen, area: chosen.reduce((sum, s) => sum + samples.areas[s]!, 0) };
      });
    this.gravity = gravityForce(prepared, scene);
  }

  /** The wind's and pressure's push changes with the pose and must be renewed within a step. */
  get followsSurface(): boolean {
    return this.placed.some(({ load }) => load.kind === 'pressure');
  }

  /** Whether some load depends on the pose and is taken at a given one: wind and twists. */
  get lags(): boolean {
    return this.placed.some(({ load }) => load.kind === 'wind' || load.kind === 'twist');
  }

  /** out = loads that do not depend on the pose (gravity, traction, pushes) at `time`, scaled by `share`. */
  dead(out: Float64Array, time: number, share: number): void {
    for (let u = 0; u < out.length; u++) out[u] = share * this.gravity[u]!;
    const { samples } = this.prepared;
    for (const { load, samples: chosen, area } of this.placed) {
      if (load.kind === 'traction') {
        for (const s of chosen) {
          const a = share * samples.areas[s]!;
          scatterRow(out, samples.rows, s, a * load.traction[0], a * load.traction[1], a * load.traction[2]);
        }
      } else if (load.kind === 'push' && time >= load.from && (load.until === null || time < load.until)) {
        for (const s of chosen) {
          const a = (share * samples.areas[s]!) / area;
          scatterRow(out, samples.rows, s, a * load.force[0], a * load.force[1], a * load.force[2]);
        }
      }
    }
  }

  /**
   * out += the loads that are renewed once a step from its start: wind on the windward side at pose c moving with
   * velocity v, ½ ρ C (relative normal speed)², and twists. `time` null: at rest, the mean wind and every twist.
   */
  followers(out: Float64Array, c: Float64Array, v: Float64Array, time: number | null, share: number): void {
    for (const { load, samples: chosen } of this.placed) {
      if (load.kind === 'wind') this.wind(out, load, chosen, c, v, time, share);
      else if (
        load.kind === 'twist' &&
        (time === null || (time >= load.from && (load.until === null || time < load.until)))
      )
        this.twist(out, load, chosen, c, share);
    }
  }

  private wind(
    out: Float64Array,
    load: Extract<SceneLoad, { kind: 'wind' }>,
    chosen: Int32Array,
    c: Float64Array,
    v: Float64Array,
    time: number | null,
    share: number,
  ): void {
    const { samples } = this.prepared;
    const [normal, speed] = this.scratch as [Float64Array, Float64Array, Float64Array];
    const swell = load.gusts && time !== null ? gustShare(load.gusts, time) : 1;
    for (const s of chosen) {
      this.areaVector(normal, s, c);
      evaluateRow(speed, samples.rows, s, v);
      const area = Math.sqrt(normal[0]! * normal[0]! + normal[1]! * normal[1]! + normal[2]! * normal[2]!);
      if (!(area > 0)) continue;
      let into = 0;
      for (let d = 0; d < 3; d++) into += ((swell * load.velocity[d]! - speed[d]!) * normal[d]!) / area;
      if (into >= 0) continue;
      const p = -0.5 * share * load.airDensity * load.dragCoefficient * into * into;
      scatterRow(out, samples.rows, s, p * normal[0]!, p * normal[1]!, p * normal[2]!);
    }
  }

  /** Forces a (axis × arm) M / Σ a |axis × arm|², arms from the area's middle: their moment about the axis is M. */
  private twist(
    out: Float64Array,
    { axis, moment }: Extract<SceneLoad, { kind: 'twist' }>,
    chosen: Int32Array,
    c: Float64Array,
    share: number,
  ): void {
    const { samples } = this.prepared;
    const length = Math.sqrt(axis[0] * axis[0] + axis[1] * axis[1] + axis[2] * axis[2]);
    const [ax, ay, az] = [axis[0] / length, axis[1] / length, axis[2] / length];
    const place = this.scratch[0]!;
    const middle = [0, 0, 0];
    let area = 0;
    for (const s of chosen) {
      evaluateRow(place, samples.rows, s, c);
      for (let d = 0; d < 3; d++) middle[d]! += samples.areas[s]! * place[d]!;
      area += samples.areas[s]!;
    }
    for (let d = 0; d < 3; d++) middle[d]! /= area;
    const around = (s: number): [number, number, number] => {
      evaluateRow(place, samples.rows, s, c);
      const [x, y, z] = [place[0]! - middle[0]!, place[1]! - middle[1]!, place[2]! - middle[2]!];
      return [ay * z - az * y, az * x - ax * z, ax * y - ay * x];
    };
    let inertia = 0;
    for (const s of chosen) {
      const [x, y, z] = around(s);
      inertia += samples.areas[s]! * (x * x + y * y + z * z);
    }
    if (!(inertia > 0)) return;
    for (const s of chosen) {
      const [x, y, z] = around(s);
      const f = (share * moment * samples.areas[s]!) / inertia;
      scatterRow(out, samples.rows, s, f * x, f * y, f * z);
    }
  }

  /** out += pressure along the current inward normals at pose c. */
  pressure(out: Float64Array, c: Float64Array, share: number): void {
    const normal = this.scratch[0]!;
    for (const { load, samples: chosen } of this.placed) {
      if (load.kind !== 'pressure') continue;
      for (const s of chosen) {
        this.areaVector(normal, s, c);
        const p = -share * load.pressure;
        scatterRow(out, this.prepared.samples.rows, s, p * normal[0]!, p * normal[1]!, p * normal[2]!);
      }
    }
  }

  /** Current outward area vector of a sample, m²: the cross product of its deformed tangents. */
  private areaVector(out: Float64Array, s: number, c: Float64Array): void {
    const { tangent1, tangent2 } = this.prepared.samples;
    const [, a, b] = this.scratch as [Float64Array, Float64Array, Float64Array];
    const t1 = a === out ? this.scratch[0]! : a;
    evaluateRow(t1, tangent1, s, c);
    const x = t1[0]!, y = t1[1]!, z = t1[2]!; // prettier-ignore
    evaluateRow(b, tangent2, s, c);
    out[0] = y * b[2]! - z * b[1]!;
    out[1] = z * b[0]! - x * b[2]!;
    out[2] = x * b[1]! - y * b[0]!;
  }
}

/** ∫ ρ g N dV for all gravity loads of the scene, N. */
function gravityForce(prepared: Prepared, scene: Scene): Float64Array {
  const { parts, bodies, matrices } = prepared;
  const { basis } = parts;
  const force = new Float64Array(parts.count * 3 * basis);
  const total = [0, 0, 0];
  for (const load of scene.loads) {
    if (load.kind === 'gravity') for (let d = 0; d < 3; d++) total[d]! += load.acceleration[d]!;
  }
  const uniform = new Float64Array(force.length);
  for (let part = 0; part < parts.count; part++) {
    for (let d = 0; d < 3; d++) uniform[(part * 3 + d) * basis] = total[d]!;
  }
  bodies.forEach((body, b) =>
    applyForm(force, matrices[b]!.mass, basis, uniform, scene.materials[body.material]!.density),
  );
  return force;
}
