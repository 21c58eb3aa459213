import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';

const root = path.resolve(import.meta.dirname, '..', '..');
const configuration = [
  'package.json',
  'tsconfig.json',
  'services/engine/tsconfig.json',
  'eslint.config.js',
  '.dependency-cruiser.cjs',
  'knip.json',
  '.prettierrc.json',
  '.prettierignore',
  'next.config.js',
];

/** The environment of a tool whose words are read: coloured nowhere, not even where a builder's `CI` asks for it. */
function plainText(): NodeJS.ProcessEnv {
  const { CI: _ci, FORCE_COLOR: _colour, ...rest } = process.env;
  return { ...rest, NO_COLOR: '1' };
}

/** An empty house with the real configuration of every tool, into which a test puts files that break a rule. */
export interface SmallHouse {
  readonly folder: string;
  /** Writes a file; the path is relative to the house. */
  put(file: string, text: string): void;
  /** Runs a program of node_modules/.bin (or a script of the house) in the small house. */
  run(program: string, args: readonly string[]): { code: number | null; output: string };
  remove(): void;
}

/** Builds a small house in the temporary folder. */
export function buildSmallHouse(): SmallHouse {
  const folder = mkdtempSync(path.join(tmpdir(), 'small-house-'));
  for (const name of ['app', 'components', 'db', 'services/engine', 'tests', 'docker'])
    mkdirSync(path.join(folder, name), { recursive: true });
  for (const file of configuration) cpSync(path.join(root, file), path.join(folder, file));
  symlinkSync(path.join(root, 'node_modules'), path.join(folder, 'node_modules'));
  return {
    folder,
    put: (file, text) => {
      mkdirSync(path.dirname(path.join(folder, file)), { recursive: true });
      writeFileSync(path.join(folder, file), text);
    },
    run: (program, args) => {
      const script = program.endsWith('.mjs') ? [path.join(root, program)] : [path.join(root, 'node_modules', '.bin', program)];
      const ended = spawnSync(process.execPath, [...script, ...args], { cwd: folder, encoding: 'utf8', env: plainText() });
      return { code: ended.status, output: `${ended.stdout}${ended.stderr}` };
    },
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}
