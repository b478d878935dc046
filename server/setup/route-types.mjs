import { spawnSync } from 'node:child_process';
import { root } from './processes.mjs';

/** Expo writes the types of the routes only when asked to customise the TypeScript configuration. */
const { status, stderr } = spawnSync('npx', ['expo', 'customize', 'tsconfig.json'], {
  cwd: root,
  encoding: 'utf8',
  env: { ...process.env, CI: '1', EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1' },
});
if (status !== 0) {
  process.stderr.write(stderr);
  process.exit(1);
}
