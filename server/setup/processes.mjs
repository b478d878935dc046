import { spawn, spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import path from 'node:path';
import { SetupFault } from './say.mjs';

export const root = path.resolve(import.meta.dirname, '../..');

/** Runs a program to its end and shows what it prints; throws a SetupFault with `fault` when it fails. */
export function runShown(command, args, fault, options = {}) {
  const { status, error } = spawnSync(command, args, {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    ...options,
  });
  if (error || status !== 0) throw new SetupFault(fault);
}

/** First of the folders of PATH and `more` that holds `program`; null when none does. */
export function findProgram(program, more = []) {
  const folders = [...more, ...(process.env.PATH ?? '').split(path.delimiter)];
  const folder = folders.find((entry) => entry && existsSync(path.join(entry, program)));
  return folder ? path.join(folder, program) : null;
}

export const isRoot = () => process.getuid?.() === 0;

/** Debian packages: installed when this user may, else the exact command is said. */
export function installDebian(packages, what) {
  const command = `apt-get update && apt-get install -y --no-install-recommends ${packages}`;
  if (!isRoot() || !findProgram('apt-get')) {
    throw new SetupFault(`${what} is missing. Install it with:\n  sudo sh -c "${command}"\nand start again.`);
  }
  runShown('sh', ['-c', command], `${what} could not be installed. Run this and read what it says:\n  ${command}`, {
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
}

/** A child that lives until it is stopped; its output is shown. */
export function startShown(command, args, env) {
  return spawn(command, args, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'], env: { ...process.env, ...env } });
}
