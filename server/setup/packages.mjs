import { existsSync, statSync } from 'node:fs';
import path from 'node:path';
import { root, runShown } from './processes.mjs';
import { say, SetupFault } from './say.mjs';

const LEAST_NODE = [20, 19];

export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major < LEAST_NODE[0] || (major === LEAST_NODE[0] && minor < LEAST_NODE[1])) {
    throw new SetupFault(`Lollop needs Node.js ${LEAST_NODE.join('.')} or newer; this is ${process.versions.node}.`);
  }
}

/** npm packages as package-lock.json says, when they are missing or older than it. */
export function ensurePackages() {
  const installed = path.join(root, 'node_modules/.package-lock.json');
  const lock = path.join(root, 'package-lock.json');
  if (existsSync(installed) && statSync(installed).mtimeMs >= statSync(lock).mtimeMs) return;
  say('Installing the npm packages …');
  runShown(
    'npm',
    ['ci', '--no-audit', '--no-fund'],
    'The npm packages could not be installed. Check the connection to the registry and start again.',
  );
}
