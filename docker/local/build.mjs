import { createHash } from 'node:crypto';
import { cpSync, existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Fault, step } from './progress.mjs';
import { root } from './profiles.mjs';
import { run } from './run-script.mjs';
import { takeTurn } from './single-start.mjs';

const sourceFolders = ['app', 'components', 'db', 'services', 'fonts', 'public'];
const sourceFiles = [
  'next.config.js',
  'package-lock.json',
  'postcss.config.mjs',
  'proxy.ts',
  'tailwind.config.js',
  'tsconfig.json',
];
const stampFile = path.join(root, '.local', 'build.json');

function sourceDigest() {
  const digest = createHash('sha256');
  const read = (place) => {
    const file = path.join(root, place);
    if (existsSync(file)) digest.update(`${place}\0`).update(readFileSync(file)).update('\0');
  };
  for (const folder of sourceFolders.filter((name) => existsSync(path.join(root, name)))) {
    const found = readdirSync(path.join(root, folder), { recursive: true, withFileTypes: true });
    const files = found
      .filter((entry) => entry.isFile())
      .map((entry) => path.relative(root, path.join(entry.parentPath, entry.name)));
    files.sort().forEach(read);
  }
  sourceFiles.forEach(read);
  return digest.digest('hex');
}

function buildId() {
  const file = path.join(root, '.next', 'BUILD_ID');
  return existsSync(file) && existsSync(path.join(root, '.next', 'standalone', 'server.js'))
    ? readFileSync(file, 'utf8')
    : undefined;
}

const stampOf = (digest) => JSON.stringify({ digest, buildId: buildId() });

const isBuilt = (digest) =>
  buildId() !== undefined && existsSync(stampFile) && readFileSync(stampFile, 'utf8') === stampOf(digest);

/** The standalone server serves these only when they lie beside it. */
export function completeStandalone() {
  const standalone = path.join(root, '.next', 'standalone');
  if (existsSync(path.join(root, 'public')))
    cpSync(path.join(root, 'public'), path.join(standalone, 'public'), { recursive: true });
  cpSync(path.join(root, '.next', 'static'), path.join(standalone, '.next', 'static'), { recursive: true });
}

/** Each profile serves its own copy, so that a build for one never pulls files from under the other. */
function copySite(profile) {
  const site = path.join(profile.folder, 'site');
  const mark = path.join(profile.folder, 'site.json');
  const stamp = readFileSync(stampFile, 'utf8');
  if (existsSync(mark) && readFileSync(mark, 'utf8') === stamp) return site;
  rmSync(mark, { force: true });
  rmSync(site, { recursive: true, force: true });
  cpSync(path.join(root, '.next', 'standalone'), site, { recursive: true, verbatimSymlinks: true });
  writeFileSync(mark, stamp);
  return site;
}

/** Builds when sources changed since the last build. Answers the folder to serve. Throws a Fault with the build's output. */
export async function buildSite(profile) {
  const release = await takeTurn(`ringtrue-build-${createHash('sha256').update(root).digest('hex').slice(0, 10)}`);
  try {
    const digest = sourceDigest();
    if (!isBuilt(digest)) {
      const built = () =>
        run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], {
          environment: { NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
        });
      const { code, output } = await step('build', built);
      if (code !== 0) throw new Fault(`The build failed:\n${output.slice(-6000)}`);
      completeStandalone();
      mkdirSync(path.dirname(stampFile), { recursive: true });
      writeFileSync(stampFile, stampOf(digest));
    }
    return copySite(profile);
  } finally {
    release();
  }
}
