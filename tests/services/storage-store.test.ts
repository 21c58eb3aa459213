import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import S3rver from 's3rver';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ObjectStore } from '@/services/storage/object-store';

const folder = mkdtempSync(join(tmpdir(), 'store-'));
const server = new S3rver({ address: '127.0.0.1', port: 0, silent: true, directory: folder });
const settings = { region: 'us-east-1', bucket: 'evidence-test', accessKey: 'S3RVER', secretKey: 'S3RVER' };
let store: ObjectStore;

beforeAll(async () => {
  const address = (await server.run()) as AddressInfo;
  store = new ObjectStore({ ...settings, endpoint: `http://127.0.0.1:${String(address.port)}` });
  await store.prepare();
});
afterAll(async () => {
  store.close();
  await server.close();
  rmSync(folder, { recursive: true });
});

const limitBytes = 64 * 1024 * 1024;
const missing = async (bytes: Buffer) => store.head(`evidence/${createHash('sha256').update(bytes).digest('hex')}`);

describe('the file store on a real server', () => {
  it('keeps the bytes under their digest, and the same bytes once', async () => {
    const bytes = Buffer.alloc(20 * 1024 * 1024, 'casting');
    const first = await store.putStream(Readable.from([bytes.subarray(0, 9e6), bytes.subarray(9e6)]), {
      limitBytes,
      announcedBytes: bytes.length,
    });
    const second = await store.putStream(Readable.from([bytes]), { limitBytes });
    expect(first).toMatchObject({
      bytes: bytes.length,
      sha256: createHash('sha256').update(bytes).digest('hex'),
      duplicate: false,
    });
    expect(second).toEqual({ ...first, duplicate: true });
    expect(await store.digestOf(first.key)).toBe(first.sha256);
  });

  it('admits nothing of an upload that breaks off', async () => {
    const bytes = Buffer.from('half of a file');
    async function* broken() {
      yield bytes;
      await Promise.resolve();
      throw new Error('connection reset');
    }
    await expect(store.putStream(Readable.from(broken()), { limitBytes })).rejects.toMatchObject({ code: 'incomplete' });
    expect(await missing(bytes)).toBeNull();
  });

  it('refuses what is shorter than announced or larger than allowed', async () => {
    const bytes = Buffer.from('twelve bytes');
    await expect(store.putStream(Readable.from([bytes]), { limitBytes, announcedBytes: 13 })).rejects.toMatchObject({
      code: 'incomplete',
    });
    await expect(store.putStream(Readable.from([bytes]), { limitBytes: 11 })).rejects.toMatchObject({ code: 'too-large' });
    expect(await missing(bytes)).toBeNull();
  });

  it('says by name that the store is down', async () => {
    const down = new ObjectStore({ ...settings, endpoint: 'http://127.0.0.1:9' });
    await expect(down.putStream(Readable.from([Buffer.from('x')]), { limitBytes })).rejects.toMatchObject({
      name: 'StoreUnavailable',
    });
    await expect(down.head('evidence/x')).rejects.toMatchObject({ name: 'StoreUnavailable' });
    down.close();
  });
});
