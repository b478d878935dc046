import { defaultDocument } from '../../shared/default-document';
import { sceneDocumentSchema } from '../../shared/scene-document';
import type { Model } from '../../shared/wire/models';
import { timeCode } from '../../shared/time-code';
import { figures, lengthText, stressText } from '../../shared/units';

const model = {
  id: '7b0e6b9e-5b0e-4c7e-9a39-0d5c1f5d1a11',
  unit: 0.001,
  bounds: { min: [-80, -80, 0], max: [80, 80, 104] },
} as unknown as Model;

it('the first revision of a scene is a valid document that holds the base and traces the top', () => {
  const document = defaultDocument(model, 'First look', []);
  expect(sceneDocumentSchema.parse(document)).toEqual(document);
  expect(document.gauges[0]!.point[2]).toBeCloseTo(0.104);
  expect(document.supports[0]!.region.kind).toBe('box');
});

it.each([
  [{ youngsModulus: -1 }, "Young's modulus must be greater than 0."],
  [{ youngsModulus: 0 }, "Young's modulus must be greater than 0."],
  [{ poissonsRatio: 0.5 }, 'At 0.5 nothing can change volume. Use 0.49 or less.'],
  [{ density: Number.NaN }, 'Give a number.'],
])('a material with %j is refused with a sentence', (change, sentence) => {
  const document = defaultDocument(model, 'First look', []);
  const broken = { ...document, materials: [{ ...document.materials[0]!, ...change }] };
  expect(sceneDocumentSchema.safeParse(broken).error?.issues[0]?.message).toBe(sentence);
});

it('a load with nothing that holds the body is refused for statics', () => {
  const document = {
    ...defaultDocument(model, 'First look', []),
    supports: [],
    time: { kind: 'static' as const, loadSteps: 1 },
  };
  expect(sceneDocumentSchema.safeParse(document).error?.issues[0]?.message).toMatch(/Nothing holds the body/);
});

it('numbers are written with their units and a true minus', () => {
  expect(figures(-0.32812)).toBe('−0.328');
  expect(lengthText(0.1045, 'mm')).toBe('105 mm');
  expect(stressText(15_200)).toBe('15.2 kPa');
  expect(timeCode(101, 24)).toBe('00:00:04:05');
});
