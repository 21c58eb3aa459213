import { readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { GET } from '@/app/api/openapi.json/route';
import type { Handler } from '@/services/http/route';
import { allOperations } from '@/services/openapi/all-operations';
import { call } from './inspection-setting';

const root = path.resolve(import.meta.dirname, '../..');

async function routedNames(): Promise<string[]> {
  const files = readdirSync(path.join(root, 'app/api'), { recursive: true, encoding: 'utf8' });
  const names: string[] = [];
  for (const file of files.filter((one) => path.basename(one) === 'route.ts')) {
    const handlers = (await import(path.join(root, 'app/api', file))) as Record<string, Handler | undefined>;
    for (const handler of Object.values(handlers)) if (handler?.declared) names.push(handler.declared.contract.name);
  }
  return names.sort();
}

const document = z.object({
  openapi: z.literal('3.1.0'),
  paths: z.record(
    z.string(),
    z.record(
      z.string(),
      z.object({
        operationId: z.string(),
        summary: z.string().min(5),
        parameters: z.array(z.object({ name: z.string(), in: z.enum(['path', 'query', 'header']), required: z.boolean() })),
        requestBody: z
          .object({ content: z.record(z.string(), z.object({ schema: z.record(z.string(), z.unknown()) })) })
          .optional(),
        responses: z.record(z.string(), z.unknown()),
      }),
    ),
  ),
  components: z.object({ schemas: z.record(z.string(), z.unknown()) }),
});

describe('the OpenAPI document', () => {
  it('is there for anyone', async () => {
    const answer = await call(GET, {});
    expect([answer.status, answer.headers.get('content-type')]).toEqual([200, 'application/json']);
    document.parse(answer.json);
  });

  it('holds every call that is routed, and no other', async () => {
    const { paths } = document.parse((await call(GET, {})).json);
    const told = Object.values(paths).flatMap((one) => Object.values(one).map(({ operationId }) => operationId));
    expect(told.sort()).toEqual(await routedNames());
  });

  it('names each call once', () => {
    const names = allOperations.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    const places = allOperations.map(({ method, path: address }) => `${method} ${address}`);
    expect(new Set(places).size).toBe(places.length);
  });

  it('names every parameter of each path', async () => {
    const { paths } = document.parse((await call(GET, {})).json);
    for (const [address, calls] of Object.entries(paths)) {
      const inPath = [...address.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
      for (const { operationId, parameters } of Object.values(calls)) {
        const named = parameters.filter((one) => one.in === 'path').map(({ name }) => name);
        expect([operationId, named.sort()]).toEqual([operationId, inPath.sort()]);
      }
    }
  });

  it('describes a body as it is checked: what is needed, what is unknown, a decimal as text', async () => {
    const { paths } = document.parse((await call(GET, {})).json);
    const body = paths['/api/people']?.post?.requestBody?.content['application/json']?.schema;
    expect(body).toMatchObject({
      type: 'object',
      additionalProperties: false,
      required: ['email', 'name', 'role', 'initialPassword'],
    });
    const evidence = paths['/api/evidence']?.post?.requestBody?.content;
    expect(Object.keys(evidence ?? {})).toEqual(['application/octet-stream']);
  });
});
