import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { decodeChunk } from '../../solver/index';

const ROOT = path.resolve(__dirname, '../..');
const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-solve-'));

function solve(...args: string[]) {
  return spawnSync(process.execPath, ['-r', '@swc-node/register', 'server/commands/solve.ts', ...args], {
    cwd: ROOT,
    encoding: 'utf8',
  });
}

function broken(change: (scene: Record<string, unknown>) => void): string {
  const scene = JSON.parse(readFileSync(path.join(ROOT, 'assets/scenes/dropped-box.json'), 'utf8')) as Record<
    string,
    unknown
  >;
  change(scene);
  const file = path.join(folder, 'broken.json');
  writeFileSync(file, JSON.stringify(scene));
  return file;
}

it('solves the gauge beam and prints one JSON object', () => {
  const { stdout, stderr, status } = solve('assets/scenes/gauge-beam.json', '--parts', '6');
  expect(stderr).toBe('');
  expect(status).toBe(0);
  const result = JSON.parse(stdout) as Record<string, never>;
  expect(Object.keys(result)).toEqual(
    expect.arrayContaining([
      'setupSeconds', 'parts', 'unknowns', 'points', 'volume', 'secondMoments', 'newtonSteps', 'secondsPerStep',
      'gauges', 'supports', 'energies', 'worstJ', 'caution',
    ]), // prettier-ignore
  );
  const { parts, unknowns, gauges, supports, volume } = result as unknown as {
    parts: number;
    unknowns: number;
    volume: number;
    gauges: { displacement: number[] }[];
    supports: { force: number[] }[];
  };
  expect(parts).toBe(6);
  expect(unknowns).toBe(180);
  // Euler–Bernoulli qL⁴/8EI = 0.075 m at this load (Timoshenko 1955, ch. 5); large rotation takes a little off.
  expect(Math.abs(-gauges[0]!.displacement[2]! / 0.075 - 1)).toBeLessThan(0.04);
  expect(Math.abs(supports[0]!.force[2]! / (0.5 * 1000 * volume) - 1)).toBeLessThan(1e-3);
});

it('writes poses, recipe and traces of a motion', () => {
  const out = path.join(folder, 'out');
  const { status, stdout } = solve('assets/scenes/dropped-box.json', '--out', out);
  expect(status).toBe(0);
  expect((JSON.parse(stdout) as { steps: number }).steps).toBe(24);
  expect(readdirSync(out).sort()).toEqual(['chunk-0000.bin', 'surface-recipe.bin', 'traces.csv']);
  expect(decodeChunk(readFileSync(path.join(out, 'chunk-0000.bin'))).poses).toHaveLength(13);
  expect(readFileSync(path.join(out, 'traces.csv'), 'utf8').split('\n')).toHaveLength(16);
});

it.each<[string, (scene: Record<string, unknown>) => void, RegExp]>([
  ['NaN', (s) => (s.unit = null), /\/unit: Give a number/],
  [
    'a stiffness of 0',
    (s) => ((s.materials as { youngsModulus: number }[])[0]!.youngsModulus = 0),
    /\/materials\/0\/youngsModulus: Young's modulus must be greater than 0/,
  ],
  [
    'a negative stiffness',
    (s) => ((s.materials as { youngsModulus: number }[])[0]!.youngsModulus = -1e5),
    /\/materials\/0\/youngsModulus: Young's modulus must be greater than 0/,
  ],
  [
    'nu = 0.5',
    (s) => ((s.materials as { poissonsRatio: number }[])[0]!.poissonsRatio = 0.5),
    /\/materials\/0\/poissonsRatio: At 0.5 nothing can change volume/,
  ],
  ['no part', (s) => ((s.parts as { count: number }).count = 0), /\/parts\/count: A body needs at least one part/],
])('refuses %s with its place and a sentence', (_, change, words) => {
  const { status, stderr, stdout } = solve(broken(change));
  expect(status).toBe(2);
  expect(stdout).toBe('');
  expect(stderr).toMatch(words);
});
