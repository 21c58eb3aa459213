import { z } from 'zod';
import { operation } from './operation';

export const readHealth = operation({
  name: 'read-health',
  method: 'GET',
  path: '/api/health',
  summary: '200 only when the database and the file store answer.',
  changes: false,
  response: z.object({ database: z.enum(['answers', 'silent']), store: z.enum(['answers', 'silent']) }),
  status: 200,
});
