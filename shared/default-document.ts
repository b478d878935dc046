import { GRAVITY } from './words';
import type { MaterialPreset } from './wire/materials';
import type { Model } from './wire/models';
import type { SceneDocument } from './scene-document';
import type { Vec3 } from '../solver/scene';

/** The preset a first scene starts with when the production has it. */
const FIRST_CHOICE = /gelatin 9\.1/i;

/**
 * The first revision of a scene: the whole body of one soft material, held at its base, under gravity, with a gauge
 * at the top and a second of motion at 24 frames a second.
 */
export function defaultDocument(model: Model, name: string, presets: readonly MaterialPreset[]): SceneDocument {
  const scale = (p: readonly number[]): Vec3 => [p[0]! * model.unit, p[1]! * model.unit, p[2]! * model.unit];
  const min = scale(model.bounds.min);
  const max = scale(model.bounds.max);
  const middle: Vec3 = [(min[0] + max[0]) / 2, (min[1] + max[1]) / 2, (min[2] + max[2]) / 2];
  const diagonal = Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2]);
  const preset = presets.find((p) => FIRST_CHOICE.test(p.name)) ?? presets[0];
  return {
    format: 'lollop-scene',
    version: 1,
    name,
    geometry: { kind: 'model', modelId: model.id },
    unit: model.unit,
    up: 'z',
    parts: { count: 24, order: 'quadratic' },
    bondDistance: round(diagonal * 0.01),
    materials: [
      preset
        ? {
            id: 'M1',
            name: preset.name,
            law: preset.law,
            youngsModulus: preset.youngsModulus,
            poissonsRatio: Math.min(0.49, preset.poissonsRatio),
            density: preset.density,
            preset: { id: preset.id, version: preset.version },
          }
        : {
            id: 'M1',
            name: 'Soft rubber',
            law: 'stable-neo-hookean',
            youngsModulus: 1e5,
            poissonsRatio: 0.45,
            density: 1000,
          },
    ],
    supports: [
      {
        id: 'S1',
        name: 'Base',
        region: {
          kind: 'box',
          min: [round(min[0] - 0.01 * diagonal), round(min[1] - 0.01 * diagonal), round(min[2] - 0.01 * diagonal)],
          max: [
            round(max[0] + 0.01 * diagonal),
            round(max[1] + 0.01 * diagonal),
            round(min[2] + 0.06 * (max[2] - min[2])),
          ],
        },
        axes: ['x', 'y', 'z'],
        keys: [],
      },
    ],
    loads: [{ id: 'L1', name: 'Gravity', kind: 'gravity', acceleration: [0, 0, -GRAVITY] }],
    obstacles: [],
    gauges: [{ id: 'G1', name: 'Top', point: [round(middle[0]), round(middle[1]), round(max[2])] }],
    time: { kind: 'motion', framesPerSecond: 24, frames: 48, substeps: 2, method: 'backward-euler' },
  };
}

const round = (x: number): number => Number(x.toPrecision(6));
