// `npm run graph`: checks the directions of imports (.dependency-cruiser.cjs). Other folders can be named after it.
import { createRequire } from 'node:module';
import path from 'node:path';

const packageFolder = path.join(import.meta.dirname, '..', 'node_modules', 'dependency-cruiser');

// This version of the tool was written before TypeScript 6 and then reads no .ts file at all, silently and with success.
// It needs only transpileModule and the syntax tree, which are unchanged, so its version range is widened.
const meta = createRequire(import.meta.url)(path.join(packageFolder, 'src', 'meta.cjs'));
meta.supportedTranspilers.typescript = '>=2.0.0 <7.0.0';

const given = process.argv.slice(2);
if (given.length === 0) process.argv.push('--config', '.dependency-cruiser.cjs', 'app', 'components', 'services', 'db');
await import(path.join(packageFolder, 'bin', 'dependency-cruise.mjs'));
