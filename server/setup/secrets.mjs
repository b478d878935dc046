import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

/** The key that signs access tokens on this machine; made once, readable by its owner only. */
export function tokenSecret(dataFolder) {
  const file = path.join(dataFolder, 'token-secret');
  if (!existsSync(file)) {
    mkdirSync(dataFolder, { recursive: true });
    writeFileSync(file, randomBytes(48).toString('hex'), { mode: 0o600 });
  }
  return readFileSync(file, 'utf8');
}
