import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { readModelFile } from '../exchange/read-model-file';
import type { Patch } from '../geometry/patch';
import { scalePatch } from '../geometry/transform';
import type { Scene, TimeMethod } from '../scene';

/** What is measured: files of the samples folder where it is there, else our own. */
const SAMPLES = path.resolve(process.env.LOLLOP_SAMPLES ?? '../shared/samples');
const POT = path.join(SAMPLES, 'teapot_32patches.bpt');
const HULL = path.join(SAMPLES, 'aircraft_100patches.stp');
const OWN = path.resolve('assets/models');

export interface Body {
  name: string;
  patches: Patch[];
  /** m, along which the base is held */
  baseHeight: number;
  readSeconds: number;
}

function read(file: string, unit: number, baseHeight: number): Body {
  const begin = performance.now();
  const { patches } = readModelFile(readFileSync(file), path.basename(file));
  const readSeconds = (performance.now() - begin) / 1000;
  return {
    name: path.basename(file),
    patches: patches.map((patch) => scalePatch(patch, unit)),
    baseHeight,
    readSeconds,
  };
}

/** A compact body of about a hand's size. */
export const compactBody = (): Body =>
  existsSync(POT) ? read(POT, 0.03, 0.004) : read(path.join(OWN, 'steamed-pudding.step'), 0.001, 0.012);

export const compactFile = (): string => (existsSync(POT) ? POT : path.join(OWN, 'steamed-pudding.step'));

/** A body of about a hundred patches; null when the samples are not there. */
export const manyPatches = (): Body | null => (existsSync(HULL) ? read(HULL, 0.001, 0) : null);

/** Soft gelatin on a base that is shaken to and fro, a violent second of motion. */
export function shaken(body: Body, parts: number, method: TimeMethod, substeps: number): Scene {
  return {
    format: 'lollop-scene',
    version: 1,
    name: 'Bench',
    geometry: { kind: 'file', path: '' },
    unit: 1,
    up: 'z',
    parts: { count: parts, order: 'quadratic' },
    bondDistance: 0.002,
    materials: [
      {
        id: 'M1',
        name: 'Gelatin',
        law: 'stable-neo-hookean',
        youngsModulus: 15_200,
        poissonsRatio: 0.45,
        density: 1025,
      },
    ],
    supports: [
      {
        id: 'S1',
        name: 'Base',
        region: { kind: 'box', min: [-1e3, -1e3, -1e3], max: [1e3, 1e3, body.baseHeight] },
        axes: ['x', 'y', 'z'],
        keys: [0, 0.02, -0.02, 0].map((x, k) => ({
          time: [0, 0.25, 0.6, 0.85][k]!,
          translation: [x, 0, 0],
          rotationDegrees: [0, 0, 0],
        })),
      },
    ],
    loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -9.80665] }],
    obstacles: [],
    gauges: [],
    time: { kind: 'motion', framesPerSecond: 24, frames: 24, substeps, method },
  };
}
