import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoModels } from '../../../assets/models/build/demo-models';
import { readModelFile } from '../../../solver/exchange/read-model-file';
import { analyseEdges } from '../../../solver/geometry/edges';
import { boundsOf, tessellate } from '../../../solver/geometry/tessellate';

const FOLDER = join(__dirname, '../../../assets/models');
const read = (file: string) => readModelFile(readFileSync(join(FOLDER, file)), file);
const size = (file: string, group?: string) => {
  const patches = read(file).patches.filter((p) => group === undefined || p.group === group);
  const { min, diagonal } = boundsOf(Float64Array.from(patches.flatMap((p) => [...p.points])));
  const box = boundsOf(tessellate(patches, { chord: diagonal * 1e-3 }).positions);
  return { extent: min.map((_, d) => box.max[d]! - box.min[d]!), ...box };
};

test.each(demoModels().map(({ file, text }) => [file, text] as const))(
  '%s is what the generator writes',
  (file, text) => {
    expect(readFileSync(join(FOLDER, file), 'utf8')).toBe(text);
    const { report, patches } = read(file);
    expect(report).toMatchObject({ declared: patches.length, imported: patches.length, skipped: [], remarks: [] });
  },
);

test('the pudding is 150 mm wide and 104 mm high, closed, and floats half a millimetre above its plate', () => {
  const pudding = size('steamed-pudding.step', 'pudding');
  expect(pudding.extent[0]).toBeGreaterThan(147);
  expect(pudding.extent[0]).toBeLessThan(153);
  expect(pudding.extent[2]).toBeGreaterThan(102);
  expect(pudding.extent[2]).toBeLessThan(106);
  expect(analyseEdges(read('steamed-pudding.step').patches)).toMatchObject({ gapped: 0, open: 0 });
});

test('the fender is 600 mm thick and has groups barrel, rod and strap, all closed', () => {
  const { patches } = read('quay-fender.step');
  expect([...new Set(patches.map((p) => p.group))].sort()).toEqual(['barrel', 'rod', 'strap']);
  expect(size('quay-fender.step', 'barrel').extent[1]).toBeCloseTo(600, -1);
  expect(analyseEdges(patches)).toMatchObject({ gapped: 0, open: 0 });
});

test('the gull has three gaps in its tail, an open beak and feet that touch nothing', () => {
  const { patches } = read('parade-gull.step');
  const report = analyseEdges(patches);
  expect(report.largestGap).toBeCloseTo(2.4, 3);
  const found = (state: string) => [
    ...new Set(report.edges.filter((e) => e.state === state).map((e) => patches[e.patch]!.group)),
  ];
  expect(report.gapped).toBe(6);
  expect(found('gapped')).toEqual(['tail']);
  expect(found('open')).toEqual(['beak']);
  expect(size('parade-gull.step', 'legs').min[2] - size('parade-gull.step', 'feet').max[2]).toBeCloseTo(8, 0);
});

test('the beam is six loose faces of a bar of 1000 × 100 × 100', () => {
  const { patches } = read('gauge-beam.step');
  expect(patches).toHaveLength(6);
  expect(analyseEdges(patches)).toMatchObject({ joined: 0 });
  expect(size('gauge-beam.step').extent).toEqual([1000, 100, 100]);
});

test('the buoy’s collar is a sheet: its rims are free', () => {
  const { patches } = read('bell-buoy.bpt');
  const report = analyseEdges(patches);
  expect(report.open + report.gapped).toBe(8);
});
