import { createHash, randomUUID } from 'node:crypto';
import { Readable, Transform } from 'node:stream';
import type { TransformCallback } from 'node:stream';
import {
  CopyObjectCommand,
  CreateBucketCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { environment } from '../environment';
import { asStoreFault, isAbsent, StoreUnavailable, UploadRefused } from './store-faults';

/** An object as stored: its key is made from its digest, so it never changes. */
export interface StoredObject {
  readonly key: string;
  readonly sha256: string;
  readonly bytes: number;
  /** These bytes were already there. */
  readonly duplicate: boolean;
}

export interface PutOptions {
  /** Most bytes taken. */
  readonly limitBytes: number;
  /** Content-Length as announced; a body of another length is refused as incomplete. */
  readonly announcedBytes?: number | null;
  readonly mediaType?: string;
  readonly signal?: AbortSignal;
}

export interface StoreSettings {
  readonly endpoint: string;
  readonly region: string;
  readonly bucket: string;
  readonly accessKey: string;
  readonly secretKey: string;
}

const partBytes = 8 * 1024 * 1024;

/** Counts and hashes what flows through; stops a body that is longer than allowed. */
class Meter extends Transform {
  readonly hash = createHash('sha256');
  bytes = 0;
  constructor(private readonly limitBytes: number) {
    super();
  }
  override _transform(chunk: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    this.bytes += chunk.length;
    this.hash.update(chunk);
    if (this.bytes > this.limitBytes)
      done(new UploadRefused('too-large', `The file is larger than ${String(this.limitBytes)} bytes.`));
    else done(null, chunk);
  }
}

/**
 * Files by digest. A body goes to a staging key first; its length is asked for, its bytes are read back and hashed again, and only then
 * are they copied to `evidence/<sha256>`. All methods throw StoreUnavailable when the store does not answer.
 */
export class ObjectStore {
  private readonly client: S3Client;
  constructor(private readonly settings: StoreSettings) {
    this.client = new S3Client({
      endpoint: settings.endpoint,
      region: settings.region,
      credentials: { accessKeyId: settings.accessKey, secretAccessKey: settings.secretKey },
      forcePathStyle: true,
      // The newer default wraps bodies in checksummed chunks, which simple stores keep as part of the object.
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
      maxAttempts: 2,
      requestHandler: { connectionTimeout: 3000, requestTimeout: 30_000 },
    });
  }

  /** Makes the bucket when it is missing. */
  async prepare(): Promise<void> {
    await this.ask(async () => {
      const Bucket = this.settings.bucket;
      try {
        await this.client.send(new HeadBucketCommand({ Bucket }));
      } catch (error) {
        if (!isAbsent(error)) throw error;
        await this.client.send(new CreateBucketCommand({ Bucket }));
      }
    });
  }

  /** Streams a body in. Throws UploadRefused ('too-large', 'incomplete', 'altered'); nothing is admitted then. */
  async putStream(body: Readable, options: PutOptions): Promise<StoredObject> {
    const staging = `staging/${randomUUID()}`;
    try {
      const { sha256, bytes } = await this.stage(body, staging, options);
      const key = `evidence/${sha256}`;
      const present = await this.head(key);
      if (present?.bytes === bytes && (await this.digestOf(key)) === sha256) return { key, sha256, bytes, duplicate: true };
      await this.ask(() =>
        this.client.send(new CopyObjectCommand({ ...this.at(key), CopySource: `${this.settings.bucket}/${staging}` })),
      );
      if ((await this.head(key))?.bytes !== bytes)
        throw new UploadRefused('altered', 'The store kept another number of bytes than it was sent.');
      return { key, sha256, bytes, duplicate: false };
    } finally {
      body.destroy();
      await this.remove(staging).catch(() => undefined);
    }
  }

  private async stage(body: Readable, key: string, options: PutOptions): Promise<{ sha256: string; bytes: number }> {
    const meter = new Meter(options.limitBytes);
    const upload = new Upload({
      client: this.client,
      params: { ...this.at(key), Body: meter, ContentType: options.mediaType ?? 'application/octet-stream' },
      partSize: partBytes,
      queueSize: 2,
    });
    let broken: Error | undefined;
    const stop = (error: Error) => {
      broken ??= error;
      meter.destroy(error);
      void upload.abort();
    };
    body.once('error', (error) => stop(new UploadRefused('incomplete', `The upload stopped: ${error.message}`)));
    body.once('close', () => {
      if (!body.readableEnded) stop(new UploadRefused('incomplete', 'The upload stopped before its end.'));
    });
    meter.once('error', (error) => (broken ??= error));
    options.signal?.addEventListener('abort', () => stop(new UploadRefused('incomplete', 'The upload was cancelled.')), {
      once: true,
    });
    body.pipe(meter);
    try {
      await upload.done();
    } catch (error) {
      throw broken ?? asStoreFault(error);
    }
    // A fault of ours may arrive while the store has already said yes.
    if (broken) throw broken as Error;
    const announced = options.announcedBytes ?? null;
    if (announced !== null && announced !== meter.bytes) {
      throw new UploadRefused('incomplete', `${String(announced)} bytes were announced, ${String(meter.bytes)} arrived.`);
    }
    const sha256 = meter.hash.digest('hex');
    const kept = await this.head(key);
    if (kept?.bytes !== meter.bytes || (await this.digestOf(key)) !== sha256) {
      throw new UploadRefused('altered', 'The store did not keep the bytes it was sent.');
    }
    return { sha256, bytes: meter.bytes };
  }

  /** Stores derived bytes (a preview, packed pixels) under a key made by the server, checked by reading back. */
  async putDerived(key: string, bytes: Uint8Array, mediaType: string): Promise<void> {
    const wanted = createHash('sha256').update(bytes).digest('hex');
    await this.ask(() =>
      this.client.send(
        new PutObjectCommand({ ...this.at(key), Body: bytes, ContentLength: bytes.length, ContentType: mediaType }),
      ),
    );
    if ((await this.digestOf(key)) !== wanted)
      throw new UploadRefused('altered', 'The store did not keep the bytes it was sent.');
  }

  /** The bytes of an object as a stream. Throws ObjectMissing for a key that is not there. */
  async getStream(key: string): Promise<Readable> {
    const answer = await this.ask(() => this.client.send(new GetObjectCommand(this.at(key))));
    if (!(answer.Body instanceof Readable)) throw new StoreUnavailable('The store answered without a body.');
    return answer.Body;
  }

  /** Length of an object in bytes, or null when it is not there. */
  async head(key: string): Promise<{ readonly bytes: number } | null> {
    try {
      const answer = await this.client.send(new HeadObjectCommand(this.at(key)));
      return { bytes: answer.ContentLength ?? 0 };
    } catch (error) {
      if (isAbsent(error)) return null;
      throw asStoreFault(error);
    }
  }

  /** SHA-256 of the bytes as they are stored now, hexadecimal. */
  async digestOf(key: string): Promise<string> {
    const hash = createHash('sha256');
    const stream = await this.getStream(key);
    try {
      for await (const chunk of stream) hash.update(chunk as Buffer);
    } catch (error) {
      throw asStoreFault(error);
    }
    return hash.digest('hex');
  }

  /** Removes a staging object; keys of evidence are refused, since stored evidence is never deleted here. */
  async remove(key: string): Promise<void> {
    if (!key.startsWith('staging/')) throw new RangeError('Only staging objects are removed.');
    await this.ask(() => this.client.send(new DeleteObjectCommand(this.at(key))));
  }

  /** Keys under a prefix, for the sweep of what uploads left behind. */
  async list(
    prefix: string,
  ): Promise<readonly { readonly key: string; readonly bytes: number; readonly changedAt: Date | null }[]> {
    const found = [];
    let ContinuationToken: string | undefined;
    do {
      const query = new ListObjectsV2Command({ Bucket: this.settings.bucket, Prefix: prefix, ContinuationToken });
      const answer = await this.ask(() => this.client.send(query));
      for (const { Key, Size, LastModified } of answer.Contents ?? []) {
        if (Key !== undefined) found.push({ key: Key, bytes: Size ?? 0, changedAt: LastModified ?? null });
      }
      ContinuationToken = answer.NextContinuationToken;
    } while (ContinuationToken);
    return found;
  }

  close(): void {
    this.client.destroy();
  }

  private at(key: string): { Bucket: string; Key: string } {
    return { Bucket: this.settings.bucket, Key: key };
  }

  private async ask<Answer>(call: () => Promise<Answer>): Promise<Answer> {
    try {
      return await call();
    } catch (error) {
      throw asStoreFault(error);
    }
  }
}

let shared: ObjectStore | undefined;

/** The store of this process, from the environment. */
export function objectStore(): ObjectStore {
  const settings = environment();
  shared ??= new ObjectStore({
    endpoint: settings.RINGTRUE_STORE_ENDPOINT,
    region: settings.RINGTRUE_STORE_REGION,
    bucket: settings.RINGTRUE_STORE_BUCKET,
    accessKey: settings.RINGTRUE_STORE_ACCESS_KEY,
    secretKey: settings.RINGTRUE_STORE_SECRET_KEY,
  });
  return shared;
}
