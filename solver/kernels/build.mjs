import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import asc from 'assemblyscript/asc';

/** Compiles the AssemblyScript kernels and writes them as a TypeScript module with the bytes in base64. */
const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-kernels-'));
const binary = path.join(folder, 'kernels.wasm');
const { error, stderr } = await asc.main([
  'solver/kernels/assembly/index.ts', '--outFile', binary, '-O3', '--runtime', 'stub', '--importMemory',
  '--enable', 'simd', '--enable', 'bulk-memory', '--noAssert', '--initialMemory', '1',
]); // prettier-ignore
if (error) {
  process.stderr.write(stderr.toString());
  process.exit(1);
}
const base64 = readFileSync(binary).toString('base64');
rmSync(folder, { recursive: true });
writeFileSync(
  process.argv[2] ?? 'solver/kernels/kernels-wasm.ts',
  `/** WebAssembly made from solver/kernels/assembly by \`npm run build:kernels\`. Do not edit. */\nexport const KERNELS_WASM_BASE64 =\n  '${base64}';\n`,
);
