import type { SceneDocument } from '../../shared/scene-document';
import { GRAVITY } from '../../shared/words';

export interface DemoScene {
  file: string;
  model: string;
  name: string;
  /** what differs from the scene every model starts with */
  document: Partial<SceneDocument>;
}

const range = (from: number, to: number): number[] => Array.from({ length: to - from + 1 }, (_, k) => from + k);
const law = 'stable-neo-hookean' as const;
const gravity = {
  id: 'L1',
  name: 'Gravity',
  kind: 'gravity' as const,
  acceleration: [0, 0, -GRAVITY] as [number, number, number],
};
const motion = (frames: number, substeps: number): SceneDocument['time'] => ({
  kind: 'motion',
  framesPerSecond: 24,
  frames,
  substeps,
  method: 'backward-euler',
});

/** One scene a demo model, each with something to see when it is played. Lengths in metres. */
export const DEMO_SCENES: readonly DemoScene[] = [
  {
    file: 'steamed-pudding.step',
    model: 'Steamed pudding',
    name: 'Pudding wobble',
    document: {
      materials: [
        {
          id: 'M1',
          name: 'Gelatin, firm',
          law,
          youngsModulus: 15_200,
          poissonsRatio: 0.45,
          density: 1025,
          patches: range(0, 23),
        },
        {
          id: 'M2',
          name: 'Plate, stiff',
          law,
          youngsModulus: 2e6,
          poissonsRatio: 0.3,
          density: 1800,
          patches: range(24, 35),
        },
      ],
      bondDistance: 0.002,
      supports: [
        {
          id: 'S1',
          name: 'Plate, carried',
          region: { kind: 'patches', patches: range(24, 35) },
          axes: ['x', 'y', 'z'],
          keys: [0, 0.03, -0.03, 0].map((x, k) => ({
            time: [0, 0.25, 0.6, 0.85][k]!,
            translation: [x, 0, 0],
            rotationDegrees: [0, 0, 0],
          })),
        },
      ],
      loads: [gravity],
      gauges: [{ id: 'G1', name: 'Crown', point: [0, 0, 0.1] }],
      time: motion(72, 4),
    },
  },
  {
    file: 'quay-fender.step',
    model: 'Quay fender',
    name: 'Fender, hung and pushed',
    document: {
      materials: [
        {
          id: 'M1',
          name: 'Barrel rubber',
          law,
          youngsModulus: 6e5,
          poissonsRatio: 0.45,
          density: 1100,
          patches: range(0, 15),
        },
        {
          id: 'M2',
          name: 'Rod, stiff',
          law,
          youngsModulus: 5e7,
          poissonsRatio: 0.3,
          density: 2500,
          patches: range(16, 35),
        },
        { id: 'M3', name: 'Strap', law, youngsModulus: 3e6, poissonsRatio: 0.4, density: 1150, patches: range(36, 83) },
      ],
      parts: { count: 20, order: 'quadratic' },
      bondDistance: 0.002,
      supports: [
        {
          id: 'S1',
          name: 'Left loop',
          region: { kind: 'box', min: [-0.7, -0.1, -0.2], max: [-0.62, 0.1, 0.2] },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
        {
          id: 'S2',
          name: 'Right loop',
          region: { kind: 'box', min: [0.62, -0.1, -0.2], max: [0.7, 0.1, 0.2] },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
      ],
      loads: [
        gravity,
        {
          id: 'L2',
          name: 'Push',
          kind: 'push',
          region: { kind: 'sphere', centre: [0, -0.3, 0], radius: 0.15 },
          force: [0, 4000, 0],
          from: 0.25,
          until: 1,
        },
      ],
      gauges: [{ id: 'G1', name: 'Belly', point: [0, -0.3, 0] }],
      time: motion(48, 2),
    },
  },
  {
    file: 'parade-gull.step',
    model: 'Parade gull',
    name: 'Gull in a breeze',
    document: {
      materials: [
        { id: 'M1', name: 'Inflated body, as firm foam', law, youngsModulus: 2e6, poissonsRatio: 0.3, density: 25 },
      ],
      bondDistance: 0.012,
      supports: [
        {
          id: 'S1',
          name: 'Feet',
          region: { kind: 'box', min: [-0.1, -0.3, -0.01], max: [0.3, 0.3, 0.05] },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
      ],
      loads: [
        gravity,
        { id: 'L2', name: 'Wind', kind: 'wind', velocity: [-3.5, 1.5, 0], dragCoefficient: 1.2, airDensity: 1.225 },
      ],
      gauges: [{ id: 'G1', name: 'Beak', point: [0.98, 0, 1.25] }],
      time: motion(72, 2),
    },
  },
  {
    file: 'bell-buoy.bpt',
    model: 'Bell buoy',
    name: 'Buoy, dropped',
    document: {
      materials: [{ id: 'M1', name: 'Soft foam', law, youngsModulus: 400_000, poissonsRatio: 0.3, density: 90 }],
      bondDistance: 0.01,
      supports: [],
      loads: [gravity],
      obstacles: [{ id: 'O1', name: 'Ground', kind: 'ground', height: -0.5, friction: 0.5 }],
      gauges: [{ id: 'G1', name: 'Top', point: [0, 0, 1.72] }],
      time: motion(48, 4),
    },
  },
  {
    file: 'gauge-beam.step',
    model: 'Gauge beam',
    name: 'Beam, held at one end',
    document: {
      materials: [{ id: 'M1', name: 'Rubber of 1 MPa', law, youngsModulus: 1e6, poissonsRatio: 0.3, density: 1000 }],
      bondDistance: 0,
      supports: [
        {
          id: 'S1',
          name: 'Wall',
          region: { kind: 'plane', point: [0, 0, 0], normal: [1, 0, 0], tolerance: 0.002 },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
      ],
      loads: [
        {
          id: 'L1',
          name: 'Tip load',
          kind: 'push',
          region: { kind: 'plane', point: [1, 0, 0], normal: [1, 0, 0], tolerance: 0.002 },
          force: [0, 0, -1],
          from: 0,
          until: null,
        },
      ],
      gauges: [{ id: 'G1', name: 'Tip', point: [1, 0.045, -0.045] }],
      time: motion(48, 2),
    },
  },
];
