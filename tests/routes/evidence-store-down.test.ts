import { createServer } from 'node:net';
import sharp from 'sharp';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { POST as admit } from '@/app/api/evidence/route';
import { closeDatabase } from '@/db/connection';
import { reading, select } from '@/db/work';
import { call, person, type Person } from './inspection-setting';

// A port that was free a moment ago: nobody answers there. Set before the store is first asked, in this file's own process.
let inspector: Person;
let endpoint: string | undefined;

async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  const address = server.address();
  await new Promise((done) => server.close(done));
  return typeof address === 'object' && address !== null ? address.port : 9;
}

beforeAll(async () => {
  endpoint = process.env.RINGTRUE_STORE_ENDPOINT;
  process.env.RINGTRUE_STORE_ENDPOINT = `http://127.0.0.1:${String(await freePort())}`;
  inspector = await person('inspector');
});
afterAll(async () => {
  process.env.RINGTRUE_STORE_ENDPOINT = endpoint;
  await closeDatabase();
});

test('the store down: 503 that says so, and no row', async () => {
  const bytes = new Uint8Array(
    await sharp({ create: { width: 9, height: 9, channels: 3, background: { r: 1, g: 2, b: 3 } } })
      .png()
      .toBuffer(),
  );
  const before = (await select(reading(), 'SELECT id FROM evidence')).length;
  const answer = await call(admit, { method: 'POST', as: inspector, query: '?kind=photograph&name=a.png', body: bytes });
  expect([answer.status, answer.problem]).toEqual([503, 'store-unavailable']);
  expect(answer.detail).toContain('Nothing was changed');
  expect(await select(reading(), 'SELECT id FROM evidence')).toHaveLength(before);
});
