import { z } from 'zod';
import type { Operation } from '@/services/contracts/operation';
import { problemCodes } from '@/services/http/problem-codes';
import { allOperations } from './all-operations';

type Json = Record<string, unknown>;

/** JSON Schema (2020-12, as OpenAPI 3.1 takes it) of what is sent or answered; a transform is described by the side that travels. */
function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const described: Json = { ...z.toJSONSchema(schema, { io, unrepresentable: 'any' }) };
  delete described.$schema;
  return described;
}

function parameters(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as { properties?: Json; required?: string[] };
  return Object.entries(properties).map(([name, one]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: one,
  }));
}

const header = (name: string, description: string) => ({
  name,
  in: 'header',
  required: false,
  schema: { type: 'string' },
  description,
});

function headers({ changes }: Operation): Json[] {
  if (!changes) return [];
  return [
    header('Idempotency-Key', '1 to 100 visible ASCII characters; the same key with the same request is one change.'),
    header('If-Match', 'The ETag that was read, where the record is a draft or carries a version.'),
  ];
}

function bodyOf({ body, bodyKind }: Operation): Json {
  if (bodyKind === 'stream') {
    const content = { 'application/octet-stream': { schema: { type: 'string', format: 'binary' } } };
    return { requestBody: { required: true, content } };
  }
  return body ? { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(body, 'input') } } } } : {};
}

function describe(operation: Operation): Json {
  const { name, summary, params, query, response, status } = operation;
  const content = response ? { content: { 'application/json': { schema: schemaOf(response, 'output') } } } : {};
  return {
    operationId: name,
    summary,
    parameters: [...parameters(params, 'path'), ...parameters(query, 'query'), ...headers(operation)],
    ...bodyOf(operation),
    responses: {
      [String(status)]: { description: status === 204 ? 'Done; no body.' : 'Done.', ...content },
      default: { $ref: '#/components/responses/Problem' },
    },
  };
}

const problem = {
  type: 'object',
  required: ['type', 'title', 'status', 'detail'],
  properties: {
    type: { type: 'string', enum: Object.keys(problemCodes).map((code) => `/problems/${code}`) },
    title: { type: 'string' },
    status: { type: 'integer' },
    detail: { type: 'string' },
    cure: { type: 'string' },
    errors: {
      type: 'array',
      items: {
        type: 'object',
        required: ['path', 'message'],
        properties: { path: { type: 'string' }, message: { type: 'string' } },
      },
    },
  },
};

/** The HTTP contract as an OpenAPI 3.1 document, made from the contracts themselves. */
export function openapiDocument(): Json {
  const paths: Record<string, Json> = {};
  for (const operation of allOperations) {
    (paths[operation.path] ??= {})[operation.method.toLowerCase()] = describe(operation);
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Ringtrue', version: '1.0.0', description: 'Errors are RFC 9457 problem details.' },
    security: [{ session: [] }, { machineToken: [] }],
    paths,
    components: {
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'ringtrue-session' },
        machineToken: { type: 'http', scheme: 'bearer' },
      },
      schemas: { Problem: problem },
      responses: {
        Problem: {
          description: 'A problem of the closed list.',
          content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
        },
      },
    },
  };
}
