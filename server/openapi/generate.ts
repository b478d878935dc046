import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { openApiText } from './document';

/** node -r @swc-node/register server/openapi/generate.ts */
writeFileSync(join(__dirname, 'openapi.json'), openApiText());
