import { existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';

/** Sample models that nobody on this project made; they are not part of it. */
const FOLDER = resolve(process.env.LOLLOP_SAMPLES ?? join(__dirname, '../../../shared/samples'));

/** Bytes of a sample, or null (said once) when the samples are not at hand: then the test is to be skipped. */
export function sampleBytes(name: string): Uint8Array | null {
  const path = join(FOLDER, name);
  if (existsSync(path)) return readFileSync(path);
  process.stdout.write(`Sample ${name} is not at hand (LOLLOP_SAMPLES says where); its test is skipped.\n`);
  return null;
}

export function sampleText(name: string): string | null {
  const bytes = sampleBytes(name);
  return bytes && new TextDecoder().decode(bytes);
}
