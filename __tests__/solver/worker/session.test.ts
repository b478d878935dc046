import { bestKernels, shapePatches, type Response, type Scene } from '../../../solver/index';
import { SolverSession } from '../../../solver/worker/session';
import { cube } from '../../support/solve-scene';

const gravity = {
  id: 'L1',
  name: 'Gravity',
  kind: 'gravity' as const,
  acceleration: [0, 0, -9.81] as [number, number, number],
};
const soft: Scene = cube(
  {
    loads: [gravity],
    supports: [
      {
        id: 'S1',
        name: 'Base',
        region: { kind: 'plane', point: [0, 0, 0], normal: [0, 0, 1], tolerance: 1e-6 },
        axes: ['x', 'y', 'z'],
        keys: [],
      },
    ],
    gauges: [{ id: 'G1', name: 'Top', point: [0, 0, 1] }],
    time: { kind: 'motion', framesPerSecond: 24, frames: 30, substeps: 1, method: 'backward-euler' },
  },
  { youngsModulus: 5e4 },
);

function open(scene = soft) {
  const responses: Response[] = [];
  let now = 0;
  const session = new SolverSession(
    bestKernels(),
    (response) => responses.push(response),
    () => (now += 40),
  );
  if (scene.geometry.kind !== 'shapes') throw new Error('shapes only');
  session.handle({ type: 'open', body: 'beam', scene, patches: scene.geometry.shapes.flatMap(shapePatches) });
  const of = <T extends Response['type']>(type: T) =>
    responses.filter((r): r is Extract<Response, { type: T }> => r.type === type);
  const run = () => {
    while (session.busy) session.tick();
  };
  return { session, responses, of, run };
}

const top = (frame: { readouts: { gauges: { displacement: number[] }[] } }) =>
  frame.readouts.gauges[0]!.displacement[2]!;

it('opens a scene, steps it, and takes a softer material without starting again', () => {
  const { session, of } = open();
  expect(of('ready')).toHaveLength(1);
  expect(of('ready')[0]!.ready.mass).toBeCloseTo(1000, -1);
  session.handle({ type: 'play', speed: 'flat-out' });
  for (let k = 0; k < 5; k++) session.tick();
  session.handle({ type: 'pause' });
  const before = of('frame').at(-1)!.frame;
  expect(top(before)).toBeLessThan(-1e-3);
  session.handle({ type: 'scene', scene: { ...soft, materials: [{ ...soft.materials[0]!, youngsModulus: 2e4 }] } });
  const after = of('frame').at(-1)!.frame;
  expect(after.time).toBe(before.time);
  expect(after.coefficients).toEqual(before.coefficients);
  session.handle({ type: 'step' });
  expect(of('frame').at(-1)!.frame.time).toBeGreaterThan(before.time);
  expect(of('error')).toHaveLength(0);
});

it('keeps the pose when the part count changes', () => {
  const { session, of } = open();
  for (let k = 0; k < 4; k++) session.handle({ type: 'step' });
  const before = of('frame').at(-1)!.frame;
  session.handle({ type: 'scene', scene: { ...soft, parts: { count: 7, order: 'quadratic' } } });
  expect(of('ready')).toHaveLength(2);
  const { frame, ready } = of('ready')[1]!;
  expect(ready.partCount).toBe(7);
  expect(frame.time).toBe(before.time);
  // A corner of the body, where four large parts and seven small ones differ most.
  expect(Math.abs(top(frame) / top(before) - 1)).toBeLessThan(0.1);
});

it('answers a scene that does not fit with a sentence and goes on with the one before', () => {
  const { session, of } = open();
  const lost: Scene = {
    ...soft,
    supports: [{ ...soft.supports[0]!, region: { kind: 'sphere', centre: [9, 9, 9], radius: 0.1 } }],
  };
  session.handle({ type: 'scene', scene: lost });
  expect(of('error').at(-1)!.message).toBe('Support S1 (Base) touches no surface. Move its region onto the body.');
  session.handle({ type: 'step' });
  expect(of('frame').at(-1)!.frame.time).toBeGreaterThan(0);
});

it('bakes the same bytes twice, and the same bytes again when it goes on from a kept state', () => {
  const bake = (from: { pose: number; state: Float64Array } | null) => {
    const { session, of, run } = open();
    session.handle({ type: 'bake', from });
    run();
    expect(of('baked')).toHaveLength(1);
    return of('chunk');
  };
  const first = bake(null);
  expect(first.map((chunk) => chunk.index)).toEqual([0, 1]);
  expect(first.flatMap((chunk) => chunk.traces)).toHaveLength(31);
  const again = bake(null);
  expect(again.map((chunk) => chunk.bytes)).toEqual(first.map((chunk) => chunk.bytes));
  const rest = bake({ pose: first[0]!.pose, state: first[0]!.state });
  expect(rest.map((chunk) => chunk.index)).toEqual([1]);
  expect(rest[0]!.bytes).toEqual(first[1]!.bytes);
});

it('takes over a body that was set up ahead, and sets another one up anew', () => {
  if (soft.geometry.kind !== 'shapes') throw new Error('shapes only');
  const patches = soft.geometry.shapes.flatMap(shapePatches);
  const opened = (body: string, scene: Scene) => {
    const responses: Response[] = [];
    const session = new SolverSession(
      bestKernels(),
      (response) => responses.push(response),
      () => 0,
    );
    session.handle({ type: 'prepare-ahead', body: 'beam', scene: soft, patches });
    expect(responses).toEqual([]);
    session.handle({ type: 'open', body, scene, patches });
    return responses.map(({ type }) => type);
  };
  const stiff = { ...soft, materials: [{ ...soft.materials[0]!, youngsModulus: 9e4 }] };
  expect(opened('beam', stiff)).toEqual(['ready']);
  expect(opened('gull', soft)).toContain('progress');
  expect(opened('beam', { ...soft, parts: { ...soft.parts, count: soft.parts.count + 2 } })).toContain('progress');
});

it('says at the opening, not before, what is wrong with a body set up ahead', () => {
  const responses: Response[] = [];
  const session = new SolverSession(
    bestKernels(),
    (response) => responses.push(response),
    () => 0,
  );
  session.handle({ type: 'prepare-ahead', body: 'nothing', scene: soft, patches: [] });
  expect(responses).toEqual([]);
  session.handle({ type: 'open', body: 'nothing', scene: soft, patches: [] });
  expect(responses).toMatchObject([{ type: 'error', during: 'open', message: expect.stringContaining('no patches') }]);
});
