import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';

const root = path.resolve(__dirname, '../../..');

test('the committed WebAssembly is what its source compiles to', () => {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-rebuild-'));
  try {
    const file = path.join(folder, 'kernels-wasm.ts');
    execFileSync(process.execPath, ['solver/kernels/build.mjs', file], { cwd: root });
    expect(readFileSync(file, 'utf8')).toBe(readFileSync(path.join(root, 'solver/kernels/kernels-wasm.ts'), 'utf8'));
  } finally {
    rmSync(folder, { recursive: true });
  }
});
