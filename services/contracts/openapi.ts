import { z } from 'zod';
import { operation } from './operation';

export const readOpenapi = operation({
  name: 'read-openapi',
  method: 'GET',
  path: '/api/openapi.json',
  summary: 'This contract as an OpenAPI 3.1 document.',
  changes: false,
  response: z.record(z.string(), z.unknown()),
  status: 200,
});
