import {
  bestKernels,
  prepare,
  scalePatch,
  shapePatches,
  Simulation,
  type Prepared,
  type Scene,
} from '../../solver/index';

export { affineCoefficients } from '../../solver/cases/affine-patch/affine';

/** Prepares a scene of built-in shapes. */
export function prepareScene(scene: Scene): Prepared {
  if (scene.geometry.kind !== 'shapes') throw new Error('This helper takes built-in shapes.');
  const patches = scene.geometry.shapes.flatMap(shapePatches).map((patch) => scalePatch(patch, scene.unit));
  return prepare(scene, patches);
}

export const simulate = (scene: Scene): Simulation => new Simulation(prepareScene(scene), scene, bestKernels());

/** A cube of edge 1 m without supports or loads, of one material. */
export function cube(change: Partial<Scene> = {}, material: Partial<Scene['materials'][number]> = {}): Scene {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Cube',
    geometry: { kind: 'shapes', shapes: [{ kind: 'box', min: [0, 0, 0], max: [1, 1, 1], gap: 0 }] },
    unit: 1,
    up: 'z',
    parts: { count: 4, order: 'quadratic' },
    bondDistance: 0,
    materials: [
      {
        id: 'M1',
        name: 'Rubber',
        law: 'stable-neo-hookean',
        youngsModulus: 1e6,
        poissonsRatio: 0.3,
        density: 1000,
        ...material,
      },
    ],
    supports: [],
    loads: [],
    obstacles: [],
    gauges: [],
    time: { kind: 'motion', framesPerSecond: 24, frames: 12, substeps: 1, method: 'backward-euler' },
    ...change,
  };
}
