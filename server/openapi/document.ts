import { z } from 'zod';
import { modelUploadFieldsSchema } from '../../shared/wire/models';
import { OPERATIONS, type Operation } from './operations';
import { componentSchemas, refTo } from './schemas';

type Json = Record<string, unknown>;

const HASH = { 'X-Content-SHA256': { schema: { type: 'string', pattern: '^[0-9a-f]{64}$' } } };

const json = (schema: Json) => ({ 'application/json': { schema } });
const octets = { 'application/octet-stream': { schema: { type: 'string', format: 'binary' } } };

function requestBody({ body }: Operation): Json {
  if (body === undefined) return {};
  if (body === 'bytes') return { requestBody: { required: true, content: octets } };
  if (body !== 'model file') return { requestBody: { required: true, content: json(refTo(body)) } };
  const fields = z.toJSONSchema(modelUploadFieldsSchema, { io: 'input' });
  const properties = { file: { type: 'string', format: 'binary' }, ...fields.properties };
  const content = { 'multipart/form-data': { schema: { type: 'object', properties, required: ['file'] } } };
  return { requestBody: { required: true, content } };
}

function answer({ answer: { body } }: Operation): Json {
  if (body === 'nothing') return { description: 'Done' };
  if (body === 'bytes') return { description: 'The bytes', content: octets, headers: HASH };
  return { description: 'The answer', content: json(refTo(body)) };
}

function parameters({ path, paged, query = [], body }: Operation): Json[] {
  const inPath = [...path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: name === 'index' ? { type: 'integer', minimum: 0 } : { type: 'string', format: 'uuid' },
  }));
  const inQuery = query.map(({ name, type }) => ({ name, in: 'query', required: true, schema: { type, minimum: 0 } }));
  const paging = [
    { name: 'limit', in: 'query', schema: { type: 'integer', minimum: 1, maximum: 100, default: 50 } },
    { name: 'cursor', in: 'query', schema: { type: 'string', maxLength: 200 } },
  ];
  const hash = { name: 'X-Content-SHA256', in: 'header', required: true, ...HASH['X-Content-SHA256'] };
  return [...inPath, ...inQuery, ...(paged ? paging : []), ...(body === 'bytes' ? [hash] : [])];
}

function responses(operation: Operation): Json {
  const usual = operation.who === 'bearer' ? [401, 403, 404] : [];
  const statuses = [...new Set([...usual, ...(operation.problems ?? [])])].sort((a, b) => a - b);
  const problems = statuses.map((status) => [String(status), { $ref: '#/components/responses/Problem' }]);
  return { [operation.answer.status]: answer(operation), ...Object.fromEntries(problems) };
}

function security({ who }: Operation): Json[] {
  if (who === 'bearer') return [{ bearer: [] }];
  return who === 'cookie' ? [{ refreshCookie: [], ownClient: [] }] : [];
}

/** The API as OpenAPI 3.1, from the same zod schemas that the server checks with. */
export function openApiDocument(): Json {
  const paths: Record<string, Json> = {};
  for (const operation of OPERATIONS) {
    const path = operation.path.replace(/:(\w+)/g, '{$1}');
    paths[path] ??= {};
    paths[path][operation.method] = {
      summary: operation.summary,
      security: security(operation),
      parameters: parameters(operation),
      ...requestBody(operation),
      responses: responses(operation),
    };
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Lollop', version: '1', description: 'The HTTP interface of the soft-body preview desk.' },
    paths,
    components: {
      schemas: componentSchemas(),
      responses: {
        Problem: {
          description: 'RFC 9457 problem details',
          content: { 'application/problem+json': { schema: refTo('Problem') } },
        },
      },
      securitySchemes: {
        bearer: { type: 'http', scheme: 'bearer', bearerFormat: 'JWT' },
        refreshCookie: { type: 'apiKey', in: 'cookie', name: 'lollop-refresh' },
        ownClient: { type: 'apiKey', in: 'header', name: 'X-Lollop' },
      },
    },
  };
}

export const openApiText = () => `${JSON.stringify(openApiDocument(), null, 2)}\n`;
