import type { BlockPattern } from '../linear/block-pattern';
import type { SurfaceSamples } from '../quadrature/prepared';
import type { SceneObstacle } from '../scene';
import { addRowTensor } from './constraints';
import { type Depth, depthIn } from './obstacle-shapes';
import { evaluateRow, scatterRow } from './rows';

/** Sliding slower than this is treated as sticking that creeps, m/s. */
const CREEP_SPEED = 5e-3;

/**
 * Contact of the surface samples with one obstacle: energy A κ d³ / (3 δ) for a depth d > 0, and Coulomb friction with
 * the normal force and direction of the step's start, smoothed below a creep speed (after the lagged form of M. Li et
 * al., "Incremental Potential Contact", ACM Trans. Graph. 39(4), 2020, eq. 13–17).
 */
export class ObstacleContact {
  private readonly pressing: Float64Array;
  /** place and normal of each sample at the step's start, 3 each */
  private readonly before: Float64Array;
  private readonly normals: Float64Array;
  private readonly place = new Float64Array(3);
  private readonly at: Depth = { depth: 0, normal: [0, 0, 0] };
  private readonly slide: [number, number, number] = [0, 0, 0];
  private creep = 0;

  /**
   * @param up index of the upward axis
   * @param kappa per sample, Pa/m: pressure at depth δ over δ
   * @param delta m: the depth at which the layer pushes with κ δ
   */
  constructor(
    private readonly samples: SurfaceSamples,
    private readonly obstacle: SceneObstacle,
    private readonly up: number,
    private readonly kappa: Float64Array,
    private readonly delta: number,
  ) {
    this.pressing = new Float64Array(samples.count);
    this.before = new Float64Array(3 * samples.count);
    this.normals = new Float64Array(3 * samples.count);
  }

  /** Fixes the normal forces and places that friction refers to, from the pose at the start of a step of `dt` s. */
  lag(c: Float64Array, dt: number): void {
    const { samples, at, place } = this;
    this.creep = CREEP_SPEED * dt;
    for (let s = 0; s < samples.count; s++) {
      this.measure(s, c);
      this.pressing[s] = at.depth > 0 ? (samples.areas[s]! * this.kappa[s]! * at.depth * at.depth) / this.delta : 0;
      for (let d = 0; d < 3; d++) {
        this.before[3 * s + d] = place[d]!;
        this.normals[3 * s + d] = at.normal[d]!;
      }
    }
  }

  private measure(s: number, c: Float64Array): void {
    evaluateRow(this.place, this.samples.rows, s, c);
    depthIn(this.at, this.obstacle, this.up, this.place);
  }

  /** Sets `slide` to the way along the surface since the step's start; returns its length, m. */
  private slid(s: number): number {
    const { slide, place, before, normals } = this;
    const o = 3 * s;
    let along = 0;
    for (let d = 0; d < 3; d++) {
      slide[d] = place[d]! - before[o + d]!;
      along += slide[d]! * normals[o + d]!;
    }
    for (let d = 0; d < 3; d++) slide[d]! -= along * normals[o + d]!;
    return Math.sqrt(slide[0] * slide[0] + slide[1] * slide[1] + slide[2] * slide[2]);
  }

  /** Energy (friction's dissipation potential included), J; adds the gradient to r when given. */
  gradient(c: Float64Array, r: Float64Array | null): number {
    const { samples, kappa, delta, at, slide, creep } = this;
    let energy = 0;
    for (let s = 0; s < samples.count; s++) {
      this.measure(s, c);
      const pressing = this.pressing[s]! * this.obstacle.friction;
      if (at.depth <= 0 && pressing === 0) continue;
      let x = 0;
      let y = 0;
      let z = 0;
      if (at.depth > 0) {
        const stiffness = (samples.areas[s]! * kappa[s]!) / delta;
        energy += (stiffness * at.depth * at.depth * at.depth) / 3;
        const push = -stiffness * at.depth * at.depth;
        x = push * at.normal[0];
        y = push * at.normal[1];
        z = push * at.normal[2];
      }
      if (pressing > 0 && creep > 0) {
        const length = this.slid(s);
        const share = length / creep;
        // f0 of the cited paper, with its slope f1 = 2y − y² below the creep length
        energy += pressing * (share < 1 ? creep * (share * share - (share * share * share) / 3 + 1 / 3) : length);
        const over = pressing * (share < 1 ? (2 - share) / creep : 1 / length);
        x += over * slide[0];
        y += over * slide[1];
        z += over * slide[2];
      }
      if (r) scatterRow(r, samples.rows, s, x, y, z);
    }
    return energy;
  }

  /** K += factor · a positive semi-definite form of the second derivative at c. */
  hessian(K: Float64Array, pattern: BlockPattern, c: Float64Array, factor: number): void {
    const { samples, kappa, delta, at, normals, creep } = this;
    const tensor = new Float64Array(9);
    for (let s = 0; s < samples.count; s++) {
      this.measure(s, c);
      const pressing = this.pressing[s]! * this.obstacle.friction;
      if (at.depth <= 0 && pressing === 0) continue;
      tensor.fill(0);
      if (at.depth > 0) {
        // The surface's curvature would add a negative part; it is left out.
        const k = (factor * 2 * at.depth * samples.areas[s]! * kappa[s]!) / delta;
        for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) tensor[3 * i + j]! += k * at.normal[i]! * at.normal[j]!;
      }
      if (pressing > 0 && creep > 0) {
        const length = this.slid(s);
        const share = length / creep;
        const k = factor * pressing * (share < 1 ? (2 - share) / creep : 1 / length);
        const o = 3 * s;
        for (let i = 0; i < 3; i++) {
          for (let j = 0; j < 3; j++) tensor[3 * i + j]! += k * ((i === j ? 1 : 0) - normals[o + i]! * normals[o + j]!);
        }
      }
      addRowTensor(K, pattern, samples.rows, s, tensor);
    }
  }
}
