import type { Scene, SceneLoad } from '../../scene';

export interface CantileverOptions {
  poissonsRatio: number;
  parts: number;
  load: 'end' | 'weight';
  /** the six faces drawn in by this much, m, so that nothing joins */
  gap?: number;
}

/** End load small enough for linear theory, N. */
export const END_LOAD = 0.1;
/** A thousandth of 9.81 m/s², so that the answer is linear. */
export const SMALL_GRAVITY = 0.00981;

/** The prism of the card: 1 × 0.1 × 0.1 m, E = 1 MPa, 1000 kg/m³, held on x = 0. */
export function cantilever({ poissonsRatio, parts, load, gap = 0 }: CantileverOptions): Scene {
  const loads: Record<CantileverOptions['load'], SceneLoad> = {
    end: {
      id: 'L1',
      name: 'End load',
      kind: 'traction',
      region: { kind: 'plane', point: [1, 0, 0], normal: [1, 0, 0], tolerance: 1e-6 },
      traction: [0, 0, -END_LOAD / 0.01],
    },
    weight: { id: 'L1', name: 'Weight', kind: 'gravity', acceleration: [0, 0, -SMALL_GRAVITY] },
  };
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Cantilever',
    geometry: { kind: 'shapes', shapes: [{ kind: 'box', min: [0, 0, 0], max: [1, 0.1, 0.1], gap }] },
    unit: 1,
    up: 'z',
    parts: { count: parts, order: 'quadratic' },
    bondDistance: 0,
    materials: [
      { id: 'M1', name: 'Rubber', law: 'stable-neo-hookean', youngsModulus: 1e6, poissonsRatio, density: 1000 },
    ],
    supports: [
      {
        id: 'S1',
        name: 'Wall',
        region: { kind: 'plane', point: [0, 0, 0], normal: [1, 0, 0], tolerance: 1e-6 },
        axes: ['x', 'y', 'z'],
        keys: [],
      },
    ],
    loads: [loads[load]],
    obstacles: [],
    gauges: [
      { id: 'G1', name: 'Tip, lower corner', point: [1, 0, 0] },
      { id: 'G2', name: 'Tip, upper corner', point: [1, 0.1, 0.1] },
    ],
    time: { kind: 'static', loadSteps: 1 },
  };
}
