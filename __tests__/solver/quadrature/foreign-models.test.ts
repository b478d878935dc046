import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readModelFile } from '../../../solver/exchange/read-model-file';
import { prepare } from '../../../solver/quadrature/prepare';
import type { Prepared } from '../../../solver/quadrature/prepared';
import { restCoefficients } from '../../../solver/quadrature/rest';
import { deformationGradients, plainScene } from './test-scenes';

const folder = process.env.LOLLOP_SAMPLES ?? '../shared/samples';
const path = (file: string) => join(folder, file);
const missing = !existsSync(path('teapot_32patches.bpt'));
if (missing) console.log(`Sample models are not at ${folder}; these tests are skipped.`);

/** Largest difference of F from the identity at rest. */
function unrest(prepared: Prepared): number {
  const gradients = deformationGradients(prepared, restCoefficients(prepared));
  return gradients.reduce(
    (worst, f, n) => Math.max(worst, Math.abs(f - (n % 9 === 0 || n % 9 === 4 || n % 9 === 8 ? 1 : 0))),
    0,
  );
}

(missing ? describe.skip : describe)('models of other people', () => {
  const load = (file: string) => readModelFile(new Uint8Array(readFileSync(path(file))), file).patches;

  test('the teapot, not welded and inside out as it comes, is one solid body facing outward', () => {
    const prepared = prepare(plainScene(24), load('teapot_32patches.bpt'));
    expect(prepared.bodies).toHaveLength(1);
    expect(prepared.parts.count).toBe(24);
    expect(prepared.report.remarks.join(' ')).toMatch(/faced inward.*open edges/);
    expect(unrest(prepared)).toBeLessThan(1e-10);
    const { samples } = prepared;
    let flux = 0;
    for (let n = 0; n < 3 * samples.count; n++)
      flux += (samples.positions[n]! * samples.normals[n]! * samples.areas[Math.floor(n / 3)]!) / 3;
    // Handle and spout reach into the body without trimming, so the flux counts their ends twice.
    expect(Math.abs(flux / prepared.report.volume - 1)).toBeLessThan(0.1);
  });

  test('an aircraft of 26 components that run into each other is one body', () => {
    const prepared = prepare(plainScene(24), load('aircraft_100patches.stp'));
    expect(prepared.bodies).toHaveLength(1);
    expect(prepared.report.remarks[0]).toBe('20 of 100 patches have no area and take no part.');
    expect(unrest(prepared)).toBeLessThan(1e-10);
    expect(prepared.samples.exposed.reduce((a, b) => a + b, 0)).toBeLessThan(prepared.samples.count);
  });

  test('a hundred stacked faces are a hundred sheets', () => {
    const prepared = prepare(plainScene(24), load('planes_100patches.stp'));
    expect(prepared.bodies).toHaveLength(100);
    expect(prepared.parts.count).toBe(100);
    expect(unrest(prepared)).toBeLessThan(1e-10);
  });
});
