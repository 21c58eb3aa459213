// The local object store itself; ends with its keeper.
import { createRequire } from 'node:module';

const S3rver = createRequire(import.meta.url)('s3rver');
const [directory, port] = process.argv.slice(2);

process.once('disconnect', () => process.exit(0));

const store = new S3rver({
  address: '127.0.0.1',
  port: Number(port),
  directory,
  silent: true,
  allowMismatchedSignatures: false,
  vhostBuckets: false,
  configureBuckets: [{ name: 'ringtrue', configs: [] }],
});
await store.run();
