import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { TestContext } from 'vitest';

/** Leaves a test out, by name and reason, where a program of the judges is not on this machine. */
export function needPrograms(context: TestContext, ...names: string[]): void {
  const absent = names.filter((name) => spawnSync('sh', ['-c', `command -v ${name}`]).status !== 0);
  if (absent.length > 0) context.skip(`${absent.join(', ')} not installed`);
}

/** Runs a judge; answers its exit status, what it printed, and that with its complaints. */
export function judge(program: string, ...args: string[]): { status: number | null; printed: string; said: string } {
  const ran = spawnSync(program, args, { encoding: 'utf8', env: { ...process.env, TZ: 'UTC', LC_ALL: 'C.UTF-8' } });
  return { status: ran.status, printed: ran.stdout, said: `${ran.stdout}${ran.stderr}` };
}

/** A folder of its own under the system's temporary folder. */
export function freshFolder(): string {
  return mkdtempSync(path.join(tmpdir(), 'seal-'));
}

export function dropFolder(folder: string): void {
  rmSync(folder, { recursive: true, force: true });
}

/** Writes bytes to a named file in a folder; answers the path. */
export function putFile(folder: string, name: string, bytes: Uint8Array | string): string {
  const file = path.join(folder, name);
  writeFileSync(file, bytes);
  return file;
}

/** A trust store of Mozilla's NSS that knows one root. */
export function trustStore(folder: string, rootPem: string): string {
  const store = path.join(folder, 'nss');
  execFileSync('mkdir', ['-p', store]);
  execFileSync('certutil', ['-d', `sql:${store}`, '-N', '--empty-password']);
  execFileSync('certutil', [
    '-d',
    `sql:${store}`,
    '-A',
    '-n',
    'root',
    '-t',
    'C,C,C',
    '-i',
    putFile(folder, 'nss-root.pem', rootPem),
  ]);
  return store;
}

/** Where a sealed file's signature stands and its DER, read here independently of the product's own reader. */
export function signatureIn(file: Uint8Array): { holeAt: number; holeEnd: number; cms: Buffer; signed: Buffer } {
  const bytes = Buffer.from(file);
  const range = /\/ByteRange \[ 0 (\d+) (\d+) (\d+)/.exec(bytes.toString('latin1'));
  const [holeAt, holeEnd] = [Number(range?.[1]), Number(range?.[2])];
  const room = Buffer.from(bytes.toString('latin1', holeAt + 1, holeEnd - 1), 'hex');
  const signed = Buffer.concat([bytes.subarray(0, holeAt), bytes.subarray(holeEnd)]);
  return { holeAt, holeEnd, cms: room.subarray(0, 4 + room.readUInt16BE(2)), signed };
}
