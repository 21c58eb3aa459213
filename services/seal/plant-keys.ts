import { createPrivateKey, randomBytes, X509Certificate } from 'node:crypto';
import type { KeyObject } from 'node:crypto';
import { mkdir, open, readdir, readFile, rename, rm } from 'node:fs/promises';
import path from 'node:path';
import { makeRoot, makeSealCertificate } from './make-plant-certificates';
import type { MadeKey } from './make-plant-certificates';

/** The keys folder cannot be used: wrong passphrase, damaged or foreign files. */
export class PlantKeysError extends Error {
  constructor(fault: string, options?: ErrorOptions) {
    super(fault, options);
    this.name = 'PlantKeysError';
  }
}

export interface PlantKeys {
  rootCertificatePem: string;
  rootCertificate: Buffer;
  sealCertificatePem: string;
  sealCertificate: Buffer;
  sealNotAfter: Date;
  sealPrivateKey: KeyObject;
}

export interface PlantKeysPlace {
  folder: string;
  passphrase: string;
  /** The issuer's name as it stands in the certificates; read only when keys are made. */
  plantName: string;
  /** The database server's time. */
  now: Date;
}

const dayMs = 86_400_000;
/** A new seal certificate is made this long before the old one ends, so that the two overlap. */
const overlapMs = 90 * dayMs;

/**
 * Opens the plant's keys, making them at the first start: `root/` (10 years) and `seal-0001/`, … (2 years each, renewed 90 days
 * before the end; old certificates stay for verification). Each is written to a folder of its own and renamed into place, so
 * two processes that start at once end with the same keys and a killed one leaves nothing half made.
 * Throws PlantKeysError.
 */
export async function openPlantKeys(place: PlantKeysPlace): Promise<PlantKeys> {
  await mkdir(place.folder, { recursive: true, mode: 0o700 });
  await putInPlace(place, 'root', () => makeRoot(place.plantName, place.now));
  const root = await load(place, 'root');
  let seal = await newestSeal(place);
  if (seal === undefined || endOf(seal.certificate).getTime() - overlapMs < place.now.getTime()) {
    const next = `seal-${String((seal?.ordinal ?? 0) + 1).padStart(4, '0')}`;
    await putInPlace(place, next, () => makeSealCertificate(place.plantName, place.now, root));
    seal = await newestSeal(place);
  }
  if (seal === undefined) throw new PlantKeysError('The keys folder holds no seal certificate');
  if (!seal.certificate.checkIssued(root.certificate) || !seal.certificate.verify(root.certificate.publicKey)) {
    throw new PlantKeysError('The seal certificate was not issued by the root in the keys folder');
  }
  return {
    rootCertificatePem: root.certificate.toString(),
    rootCertificate: root.certificate.raw,
    sealCertificatePem: seal.certificate.toString(),
    sealCertificate: seal.certificate.raw,
    sealNotAfter: endOf(seal.certificate),
    sealPrivateKey: seal.privateKey,
  };
}

interface LoadedKey {
  certificate: X509Certificate;
  privateKey: KeyObject;
}

async function newestSeal(place: PlantKeysPlace): Promise<(LoadedKey & { ordinal: number }) | undefined> {
  const names = (await readdir(place.folder)).filter((name) => /^seal-\d{4}$/.test(name)).sort();
  const newest = names.at(-1);
  if (newest === undefined) return undefined;
  return { ...(await load(place, newest)), ordinal: Number(newest.slice('seal-'.length)) };
}

async function load(place: PlantKeysPlace, name: string): Promise<LoadedKey> {
  const folder = path.join(place.folder, name);
  try {
    const certificate = new X509Certificate(await readFile(path.join(folder, 'certificate.pem')));
    const privateKey = createPrivateKey({ key: await readFile(path.join(folder, 'key.pem')), passphrase: place.passphrase });
    if (certificate.checkPrivateKey(privateKey)) return { certificate, privateKey };
  } catch (cause) {
    throw new PlantKeysError(`The ${name} key cannot be opened: wrong passphrase or damaged file`, { cause });
  }
  throw new PlantKeysError(`The ${name} key does not belong to its certificate`);
}

async function putInPlace(place: PlantKeysPlace, name: string, make: () => Promise<MadeKey>): Promise<void> {
  const existing = await readdir(place.folder);
  if (existing.includes(name)) return;
  const made = await make();
  const draft = path.join(place.folder, `.draft-${randomBytes(8).toString('hex')}`);
  await mkdir(draft, { mode: 0o700 });
  try {
    // aes-256-cbc under PBES2 is the strongest that Node writes; its PBKDF2 rounds are few, so the passphrase must be random.
    const key = made.privateKey.export({ type: 'pkcs8', format: 'pem', cipher: 'aes-256-cbc', passphrase: place.passphrase });
    await writeDurably(path.join(draft, 'key.pem'), String(key), 0o600);
    await writeDurably(path.join(draft, 'certificate.pem'), made.certificatePem, 0o644);
    await rename(draft, path.join(place.folder, name));
  } catch (fault) {
    await rm(draft, { recursive: true, force: true });
    // Another process was first: its keys count.
    if (!isTaken(fault)) throw fault;
  }
}

async function writeDurably(file: string, text: string, mode: number): Promise<void> {
  const handle = await open(file, 'wx', mode);
  try {
    await handle.writeFile(text);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

function isTaken(fault: unknown): boolean {
  return fault instanceof Error && 'code' in fault && (fault.code === 'ENOTEMPTY' || fault.code === 'EEXIST');
}

function endOf(certificate: X509Certificate): Date {
  return new Date(certificate.validTo);
}
