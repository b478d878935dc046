import { createHash } from 'node:crypto';
import { box, caseScene, plane, WALL } from '../../solver/cases/published-case';
import { bestKernels, shapePatches, type Request, type Response, type Scene } from '../../solver/index';
import { SolverSession } from '../../solver/worker/session';

/** Small scenes that between them use most of the solver: what they bake must be the same bytes everywhere. */
export const REPEATABLE: Record<string, Scene> = {
  'ring dropped on the ground, backward Euler': caseScene({
    parts: 10,
    material: { youngsModulus: 2e5, poissonsRatio: 0.45 },
    geometry: {
      kind: 'shapes',
      shapes: [{ kind: 'torus', centre: [0, 0, 0.4], axis: [1, 0.2, 0], majorRadius: 0.2, minorRadius: 0.07 }],
    },
    loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.81] }],
    obstacles: [{ id: 'O1', name: 'Ground', kind: 'ground', height: 0, friction: 0.4 }],
    time: { kind: 'motion', framesPerSecond: 24, frames: 14, substeps: 2, method: 'backward-euler' },
  }),
  'bar twisted by its end in the wind, Hilber–Hughes–Taylor': caseScene({
    parts: 8,
    material: { law: 'neo-hookean-a', youngsModulus: 1e5 },
    geometry: box([0, 0, 0], [1, 0.1, 0.1]),
    supports: [
      WALL,
      {
        id: 'S2',
        name: 'End',
        region: plane('x', 1),
        axes: ['x', 'y', 'z'],
        keys: [
          { time: 0, translation: [0, 0, 0], rotationDegrees: [0, 0, 0] },
          { time: 0.5, translation: [-0.1, 0, 0.05], rotationDegrees: [90, 0, 10] },
        ],
      },
    ],
    loads: [{ id: 'L1', name: 'Wind', kind: 'wind', velocity: [0, 12, 0], dragCoefficient: 1.2, airDensity: 1.2 }],
    gauges: [{ id: 'G1', name: 'Middle', point: [0.5, 0, 0] }],
    time: { kind: 'motion', framesPerSecond: 24, frames: 12, substeps: 1, method: 'hht' },
  }),
  'lossy ball let fall, TR-BDF2': caseScene({
    parts: 6,
    material: { youngsModulus: 1e5, poissonsRatio: 0.4, loss: 0.2 },
    geometry: { kind: 'shapes', shapes: [{ kind: 'sphere', centre: [0, 0, 0.3], radius: 0.2 }] },
    loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.81] }],
    obstacles: [{ id: 'O1', name: 'Ground', kind: 'ground', height: 0, friction: 0.2 }],
    time: { kind: 'motion', framesPerSecond: 24, frames: 10, substeps: 2, method: 'tr-bdf2' },
  }),
};

/** The requests that open and bake a scene of built-in shapes. */
export function bakeRequests(scene: Scene): Request[] {
  const patches = scene.geometry.kind === 'shapes' ? scene.geometry.shapes.flatMap(shapePatches) : [];
  return [
    { type: 'open', body: 'repeatable', scene, patches },
    { type: 'bake', from: null },
  ];
}

/** SHA-256, hex, over the recipe, every chunk and the solver's state after it: all that a bake keeps. */
export function bakeHash(scene: Scene): string {
  const hash = createHash('sha256');
  const session = new SolverSession(
    bestKernels(),
    (response: Response) => {
      if (response.type === 'error') throw new Error(response.message);
      if (response.type === 'ready') hash.update(response.ready.recipe);
      if (response.type !== 'chunk') return;
      hash.update(response.bytes);
      hash.update(new Uint8Array(response.state.buffer, response.state.byteOffset, response.state.byteLength));
    },
    () => 0,
  );
  for (const request of bakeRequests(scene)) session.handle(request);
  while (session.busy) session.tick();
  return hash.digest('hex');
}
