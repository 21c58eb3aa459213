import { readdirSync } from 'node:fs';
import path from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { role, type Role } from '@/services/contracts/common';
import { may } from '@/services/accounts/permissions';
import type { Handler } from '@/services/http/route';
import { person, type Person } from './inspection-setting';

const root = path.resolve(import.meta.dirname, '../..');
const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;

/** The only calls a stranger may make. Adding one here is a decision about what the world may know. */
const openToStrangers = [
  'sign-in',
  'badge-in',
  'read-health',
  'read-openapi',
  'verify-certificate',
  'verify-file',
  'verify-digest',
];

interface Routed {
  readonly file: string;
  readonly method: string;
  readonly handler: Handler;
}

async function everyHandler(): Promise<Routed[]> {
  const names = readdirSync(path.join(root, 'app/api'), { recursive: true, encoding: 'utf8' });
  const files = names
    .filter((name) => path.basename(name) === 'route.ts')
    .map((name) => path.join('app/api', name))
    .sort();
  const found: Routed[] = [];
  for (const file of files) {
    const exported = (await import(path.join(root, file))) as Record<string, Handler | undefined>;
    for (const method of methods) {
      const handler = exported[method];
      if (handler) found.push({ file, method, handler });
    }
  }
  return found;
}

const handlers = await everyHandler();
const people = new Map<Role, Person>();

beforeAll(async () => {
  for (const one of role.options) people.set(one, await person(one));
});

function ask({ handler, method }: Routed, cookie: string | null): Promise<Response> {
  const { contract } = handler.declared;
  const names = [...contract.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name ?? '');
  const params = Object.fromEntries(
    names.map((name) => [name, name === 'id' ? '01900000-0000-7000-8000-000000000000' : 'X-2026-00000']),
  );
  const request = new Request(`http://127.0.0.1:3200${contract.path}`, {
    method,
    headers: { 'content-type': 'application/json', ...(cookie ? { cookie } : {}) },
    ...(method === 'GET' ? {} : { body: '{}' }),
  });
  return handler(request, { params: Promise.resolve(params) });
}

describe('every route', () => {
  it('is found: this test would otherwise hold nothing', () => {
    expect(handlers.length).toBeGreaterThan(35);
  });

  it.each(handlers)('$method $file stands where its contract says', ({ file, method, handler }) => {
    const { contract } = handler.declared;
    const address = `/${path
      .dirname(file)
      .replace(/^app\//, '')
      .replaceAll(/\[(\w+)\]/g, '{$1}')}`;
    expect([contract.method, contract.path]).toEqual([method, address]);
  });

  it.each(handlers)('$method $file refuses a stranger', async (routed) => {
    const { contract, who } = routed.handler.declared;
    if (who === 'anyone') {
      expect(openToStrangers).toContain(contract.name);
      return;
    }
    const answer = await ask(routed, null);
    expect(answer.status).toBe(401);
    expect(answer.headers.get('content-type')).toBe('application/problem+json');
    expect(await answer.json()).toMatchObject({ type: '/problems/not-signed-in' });
  });

  it.each(handlers)('$method $file refuses every role that its permission does not name', async (routed) => {
    const { who } = routed.handler.declared;
    if (who === 'anyone') return expect(openToStrangers).toContain(routed.handler.declared.contract.name);
    for (const one of role.options) {
      if (may({ role: one, releaseAuthority: false }, who)) continue;
      const answer = await ask(routed, people.get(one)?.cookie ?? '');
      expect([one, answer.status]).toEqual([one, 403]);
      expect(await answer.json()).toMatchObject({ type: '/problems/not-permitted' });
    }
  });
});
