import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { openApiDocument, openApiText } from '../../server/openapi/document';
import { OPERATIONS } from '../../server/openapi/operations';
import { type Desk, openDesk } from './support/desk';
import { routesOf } from './support/routes';

let desk: Desk;
afterAll(() => desk?.close());

test('the committed document is the one the schemas give: node -r @swc-node/register server/openapi/generate.ts', () => {
  const committed = readFileSync(join(__dirname, '../../server/openapi/openapi.json'), 'utf8');
  expect(JSON.parse(committed)).toEqual(JSON.parse(openApiText()));
});

test('it describes every route and no other', async () => {
  desk = await openDesk();
  const described = OPERATIONS.map(({ method, path }) => `${method.toUpperCase()} ${path}`).sort();
  expect(described).toEqual(routesOf(desk.app));
});

test('every reference in it leads somewhere', () => {
  const document = openApiDocument();
  const references = [...JSON.stringify(document).matchAll(/"\$ref":"#\/([^"]+)"/g)].map(([, path]) => path!);
  expect(references.length).toBeGreaterThan(50);
  for (const path of new Set(references)) {
    const target = path
      .split('/')
      .reduce<unknown>((at, key) => (at as Record<string, unknown> | undefined)?.[key], document);
    expect([path, typeof target]).toEqual([path, 'object']);
  }
});
