import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { demoModels } from './build/demo-models';

// Writes the demo models beside this file: node -r @swc-node/register assets/models/generate.ts
for (const { file, text } of demoModels()) writeFileSync(join(__dirname, file), text);
