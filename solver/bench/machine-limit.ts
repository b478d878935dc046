import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { milliseconds } from './statistics';

const CHAINS = 12;
const ROUNDS = 2_000_000;

/** Independent chains of multiply and add in registers: as many as hide the latency and still fit. */
const source = (type: 'f32x4' | 'f64x2') => `
export function run(rounds: i32): f64 {
  const m = ${type}.splat(0.999);
  const a = ${type}.splat(0.001);
  ${Array.from({ length: CHAINS }, (_, k) => `let s${k} = ${type}.splat(${k});`).join('\n  ')}
  for (let i = 0; i < rounds; i++) {
    ${Array.from({ length: CHAINS }, (_, k) => `s${k} = ${type}.add(${type}.mul(s${k}, m), a);`).join('\n    ')}
  }
  let sum = s0;
  ${Array.from({ length: CHAINS - 1 }, (_, k) => `sum = ${type}.add(sum, s${k + 1});`).join('\n  ')}
  return <f64>${type}.extract_lane(sum, 0);
}`;

function gigaflops(type: 'f32x4' | 'f64x2', lanes: number): number {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-limit-'));
  try {
    writeFileSync(path.join(folder, 'limit.ts'), source(type));
    const compiler = path.resolve('node_modules/assemblyscript/bin/asc.js');
    const options = ['-O3', '--runtime', 'stub', '--enable', 'simd', '-o', 'limit.wasm'];
    execFileSync(process.execPath, [compiler, 'limit.ts', ...options], { cwd: folder, stdio: 'ignore' });
    const module = new WebAssembly.Module(readFileSync(path.join(folder, 'limit.wasm')));
    const run = new WebAssembly.Instance(module).exports.run as (rounds: number) => number;
    return (ROUNDS * CHAINS * lanes * 2) / (milliseconds(() => void run(ROUNDS), 5) * 1e6);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** What WebAssembly's SIMD does on this machine at most, 1e9 operations a second. */
export function machineLimit(): { single: number; double: number } {
  return { single: gigaflops('f32x4', 4), double: gigaflops('f64x2', 2) };
}
