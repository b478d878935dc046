import { whatDiffers } from '../../components/side-by-side/what-differs';
import { sceneDocumentSchema } from '../../shared/scene-document';
import { cube } from '../support/solve-scene';

it('tells the settings that differ in plain words, and only those', () => {
  const left = cube();
  const right = cube({ parts: { count: 10, order: 'quadratic' } }, { youngsModulus: 28_000 });
  const { differences, settings } = whatDiffers(left, right);
  expect(differences).toEqual([
    { name: 'Young’s modulus', left: '1 MPa', right: '28 kPa' },
    { name: 'Part count', left: '4', right: '10' },
  ]);
  expect(settings).toBeGreaterThan(8);
});

it('names places, pushes and what only one side has, in words and millimetres', () => {
  const support = {
    id: 'S1',
    name: 'Base',
    region: { kind: 'box' as const, min: [0, 0, 0] as const, max: [1, 1, 0.05] as const },
    axes: ['x' as const],
    keys: [],
  };
  const left = sceneDocumentSchema.parse({ ...cube(), supports: [support] });
  const right = sceneDocumentSchema.parse({
    ...cube(),
    supports: [{ ...support, region: { kind: 'patches', patches: [2, 3] } }],
    loads: [{ id: 'L1', name: 'Shove', kind: 'push', region: { kind: 'all' }, force: [0, 0, -2], until: 0.5 }],
  });
  const { differences, same, settings } = whatDiffers(left, right);
  expect(differences).toEqual([
    { name: 'Support S1, where', left: 'box 0 0 0 to 1000 1000 50 mm', right: 'patches 2 3' },
    { name: 'Shove L1', left: 'none', right: '0 0 −2 N' },
    { name: 'Shove L1, when', left: 'none', right: '0 s to 0.5 s' },
    { name: 'Shove L1, where', left: 'none', right: 'the whole surface' },
  ]);
  expect(same.map((row) => row.name)).toContain('Support S1, holds');
  expect(same.length + differences.length).toBe(settings);
});
