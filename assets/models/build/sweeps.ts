import { add, cross, normalise, scale, subtract } from '../../../solver/math/vec3';
import type { Patch } from '../../../solver/geometry/patch';
import type { Vec3 } from '../../../solver/scene';
import { fitSurface, type FitOptions } from './surface-fit';

export interface Sweep {
  name: string;
  group: string;
  /** Centre line over s in [0, 1]. */
  spine: (s: number) => Vec3;
  /**
   * Point of the section across the centre line, for the angle `phi` and the place (s along the spine, t along the
   * surface: t differs from s where an end is rounded). x runs along `side`, y across it and the spine.
   */
  section: (phi: number, s: number, t: number) => [number, number];
  /** Rough direction of the section's y. */
  up: Vec3;
  /** Angles, in turns, where patches meet round the section; the last is the first plus one. */
  sectors: readonly number[];
  /** Places, t in [0, 1], where patches meet along the spine. */
  bands: readonly number[];
  /** Place on the spine, s, for the place on the surface, t: slow where an end closes, so that it comes out round. */
  place: (t: number) => number;
  fit: FitOptions;
}

/** Equal shares of a turn, starting at `from`. */
export const equalSectors = (count: number, from = 0): number[] => Array.from({ length: count + 1 }, (_, i) => from + i / count);

export const straight = (t: number) => t;
export const roundBoth = (t: number) => (1 - Math.cos(Math.PI * t)) / 2;
export const roundEnd = (t: number) => Math.sin((Math.PI * t) / 2);

/** Share of t that each dome of a domed bar takes: patches should meet there. */
export const DOME = 0.2;

/** A straight bar with half-round ends: where t is on the spine and the radius there, for a dome `share` of the length long. */
export function domed(share: number): { place: (t: number) => number; radius: (t: number) => number } {
  const quarter = Math.PI / 2;
  return {
    place: (t) => {
      if (t < DOME) return share * (1 - Math.cos((quarter * t) / DOME));
      if (t > 1 - DOME) return 1 - share * (1 - Math.cos((quarter * (1 - t)) / DOME));
      return share + ((1 - 2 * share) * (t - DOME)) / (1 - 2 * DOME);
    },
    radius: (t) => Math.sin(quarter * Math.min(1, Math.min(t, 1 - t) / DOME)),
  };
}

/** Patches of a section carried along a spine, facing outward. */
export function sweepPatches(sweep: Sweep): Patch[] {
  const { spine, section, up, sectors, bands, place } = sweep;
  const patches: Patch[] = [];
  const pointAt = (turn: number, t: number): Vec3 => {
    const s = place(t);
    const step = 1e-4;
    const along = normalise(subtract(spine(Math.min(1, s + step)), spine(Math.max(0, s - step))));
    const side = normalise(cross(up, along));
    const across = cross(along, side);
    const [x, y] = section(2 * Math.PI * turn, s, t);
    return add(spine(s), add(scale(side, x), scale(across, y)));
  };
  for (let b = 0; b + 1 < bands.length; b++) {
    for (let k = 0; k + 1 < sectors.length; k++) {
      const whole = bands.length === 2 && sectors.length === 2;
      const name = whole ? sweep.name : `${sweep.name} ${patches.length + 1}`;
      const [u0, u1, v0, v1] = [sectors[k]!, sectors[k + 1]!, bands[b]!, bands[b + 1]!];
      patches.push(fitSurface(name, sweep.group, (u, v) => pointAt(u0 + (u1 - u0) * u, v0 + (v1 - v0) * v), sweep.fit));
    }
  }
  return patches;
}

/**
 * Closes an open end of one sector of a tube: its rim drawn straight in to the middle. `atEnd` false closes the start.
 */
export function capPatch(sweep: Sweep, atEnd: boolean): Patch {
  const bands = atEnd ? sweep.bands.slice(-2) : sweep.bands.slice(0, 2);
  const wall = sweepPatches({ ...sweep, bands })[0]!;
  const { countU, countV, points } = wall;
  const middle = sweep.spine(atEnd ? 1 : 0);
  const grid: Vec3[] = [];
  for (let i = 0; i < countU; i++) {
    const at = 3 * (i * countV + (atEnd ? countV - 1 : 0));
    const rim: Vec3 = [points[at]!, points[at + 1]!, points[at + 2]!];
    grid.push(...(atEnd ? [rim, middle] : [middle, rim]));
  }
  return {
    ...wall,
    name: `${sweep.name}${atEnd ? ' b' : ' a'}`,
    degreeV: 1,
    countV: 2,
    knotsV: Float64Array.of(0, 0, 1, 1),
    points: Float64Array.from(grid.flat()),
    weights: new Float64Array(2 * countU).fill(1),
  };
}
