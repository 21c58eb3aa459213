import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';

/**
 * The plant's root certificates as PEM, for verifying: no passphrase and no private key is touched, so the public page needs
 * nothing secret. Empty before the first start made them.
 */
export async function readPlantRoots(folder: string): Promise<string[]> {
  const names = await namesIn(folder);
  const roots = names.filter((name) => name === 'root' || /^root-\d{4}$/.test(name)).sort();
  return Promise.all(roots.map((name) => readFile(path.join(folder, name, 'certificate.pem'), 'utf8')));
}

async function namesIn(folder: string): Promise<string[]> {
  try {
    return await readdir(folder);
  } catch (fault) {
    if (fault instanceof Error && 'code' in fault && fault.code === 'ENOENT') return [];
    throw fault;
  }
}
