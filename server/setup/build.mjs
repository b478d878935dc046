import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root, runShown } from './processes.mjs';
import { say } from './say.mjs';

/** What the web application is made from. */
const WEB_SOURCES = [
  'app', 'components', 'solver', 'shared', 'assets', 'public',
  'app.json', 'babel.config.js', 'metro.config.js', 'package-lock.json', 'tsconfig.json',
]; // prettier-ignore

function addToHash(hash, file) {
  if (!existsSync(file)) return;
  if (statSync(file).isDirectory()) {
    for (const entry of readdirSync(file).sort()) addToHash(hash, path.join(file, entry));
    return;
  }
  hash.update(path.relative(root, file)).update('\0').update(readFileSync(file)).update('\0');
}

/** Exports the web application into dist/ when its sources changed since the last export. */
export function buildWeb() {
  const hash = createHash('sha256');
  for (const source of WEB_SOURCES) addToHash(hash, path.join(root, source));
  const digest = hash.digest('hex');
  const stamp = path.join(root, 'dist/.sources');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === digest) return;
  say('Building the web application (the first time takes about a minute) …');
  runShown(
    'npx',
    ['expo', 'export', '-p', 'web', '--output-dir', 'dist'],
    'The web application could not be built; the lines above say why.',
    {
      env: { ...process.env, CI: '1', EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1', NODE_ENV: 'production' },
    },
  );
  mkdirSync(path.dirname(stamp), { recursive: true });
  writeFileSync(stamp, digest);
}

/** Bundles the server, its model-reading child and the demo loader into dist-server/. */
export async function buildServer() {
  const { build } = await import('esbuild');
  await build({
    absWorkingDir: root,
    entryPoints: ['server/main.ts', 'server/models/read-model.child.ts', 'server/setup/seed-demo.ts'],
    bundle: true,
    platform: 'node',
    packages: 'external',
    format: 'cjs',
    entryNames: '[name]',
    outdir: 'dist-server',
    sourcemap: true,
    logLevel: 'error',
  });
}
