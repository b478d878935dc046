import { readModelFile } from '../../../solver/exchange/read-model-file';
import { analyseEdges } from '../../../solver/geometry/edges';
import { sampleBytes, sampleText } from '../../support/samples';

/** B-spline surfaces in a STEP text, counted without the reader: one keyword each, plain or in external mapping. */
const countSplines = (text: string) =>
  text.match(/\b(B_SPLINE_SURFACE_WITH_KNOTS|BEZIER_SURFACE|QUASI_UNIFORM_SURFACE|UNIFORM_SURFACE)\s*\(/g)?.length ?? 0;
const countOthers = (text: string) =>
  text.match(/=\s*(PLANE|CYLINDRICAL_SURFACE|CONICAL_SURFACE|TOROIDAL_SURFACE|SPHERICAL_SURFACE)\s*\(/g)?.length ?? 0;

// Patches and units as recorded beside the samples, before and apart from this code.
test.each([
  ['aircraft_100patches.stp', 100, 'foot', 0.3048],
  ['planes_100patches.stp', 100, 'mm', 0.001],
  ['pipe.step', 6, 'mm', 0.001],
  ['pipe_deformed.step', 6, 'mm', 0.001],
  ['wigley_hull.step', 1, 'm', 1],
  ['axom_boxed_sphere.step', 42, 'cm', 0.01],
])('%s: all %i B-spline surfaces, unit %s', (name, patches, unit, metres) => {
  const text = sampleText(name);
  if (text === null) return;
  expect(countSplines(text)).toBe(patches);
  const result = readModelFile(sampleBytes(name)!, name);
  expect(result.patches).toHaveLength(patches);
  expect(result.report.imported).toBe(patches);
  expect(result.report.declared).toBe(patches + countOthers(text));
  expect(result.report.declaredUnit!.name).toBe(unit);
  expect(result.report.declaredUnit!.metres).toBeCloseTo(metres, 12);
});

test('pipe.step: four of the six surfaces are rational', () => {
  const bytes = sampleBytes('pipe.step');
  if (!bytes) return;
  const { patches } = readModelFile(bytes, 'pipe.step');
  expect(patches.filter((p) => p.weights.some((w) => w !== 1))).toHaveLength(4);
});

test('aircraft: 176 pinched edges', () => {
  const bytes = sampleBytes('aircraft_100patches.stp');
  if (!bytes) return;
  expect(analyseEdges(readModelFile(bytes, 'aircraft').patches).degenerate).toBe(176);
});

test('planes: a hundred separate faces, nothing joined, every face trimmed', () => {
  const bytes = sampleBytes('planes_100patches.stp');
  if (!bytes) return;
  const { patches, report } = readModelFile(bytes, 'planes');
  expect(analyseEdges(patches).joined).toBe(0);
  expect(report.remarks).toEqual(['100 faces are trimmed in the file and shown whole here.']);
});

test.each([
  ['shape_names.step', '6 × cylinder', '17 × plane'],
  ['occt_screw.step', '4 × plane', '3 × torus'],
  ['axom_sliced_cylinder.step', '2 × cylinder', '3 × plane'],
])('%s holds no B-spline surface and says what it holds', (name, ...kinds) => {
  const bytes = sampleBytes(name);
  if (!bytes) return;
  expect(() => readModelFile(bytes, name)).toThrow(expect.objectContaining({ name: 'UnreadableModelError' }));
  for (const kind of kinds) expect(() => readModelFile(bytes, name)).toThrow(kind);
});
