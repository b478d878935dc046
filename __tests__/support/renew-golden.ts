import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { SOLVER_VERSION } from '../../solver/index';
import { bakeHash, REPEATABLE } from './repeatable-bakes';

const bakes = Object.fromEntries(Object.entries(REPEATABLE).map(([name, scene]) => [name, bakeHash(scene)]));
const file = path.join(__dirname, '../fixtures/golden/bakes.json');
writeFileSync(file, `${JSON.stringify({ solverVersion: SOLVER_VERSION, bakes }, null, 2)}\n`);
