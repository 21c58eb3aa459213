import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildSmallHouse, type SmallHouse } from './small-house';

interface Message {
  readonly ruleId: string | null;
  readonly message: string;
}

let house: SmallHouse;
const found = new Map<string, readonly Message[]>();

const lines = (count: number, line: (at: number) => string): string =>
  Array.from({ length: count }, (_, at) => line(at)).join('\n');

/** File, what it holds, the rule that must fire, and words its message must have. */
const violations: [file: string, text: string, rule: string, words: RegExp][] = [
  ['services/lots/clock-now.ts', 'export const now = Date.now();\n', 'no-restricted-syntax', /work\.now/],
  ['services/lots/clock-date.ts', 'export const now = new Date();\n', 'no-restricted-syntax', /databaseNow\(\)/],
  ['db/clock-in-db.ts', 'export const now = new Date();\n', 'no-restricted-syntax', /work\.now/],
  ['app/clock-in-app.tsx', 'export const now = Date.now();\n', 'no-restricted-syntax', /work\.now/],
  ['components/chance.ts', 'export const dice = Math.random();\n', 'no-restricted-syntax', /newId\(\)/],
  ['services/lots/default-export.ts', 'const heat = 1;\nexport default heat;\n', 'no-restricted-syntax', /named export/],
  [
    'app/page-clock/page.tsx',
    'const Page = () => new Date().toISOString();\nexport default Page;\n',
    'no-restricted-syntax',
    /work\.now/,
  ],
  ['services/lots/orm.ts', "export { Sequelize } from 'sequelize';\n", 'no-restricted-imports', /Only db\//],
  ['services/lots/connector.ts', "export { createPool } from 'mariadb';\n", 'no-restricted-imports', /Only db\//],
  [
    'services/lots/page.ts',
    "export { Ring } from '@/components/ring';\n",
    'no-restricted-imports',
    /nothing of pages|know nothing/,
  ],
  ['app/api/lots/route.ts', "export { rows } from '@/db/rows';\n", 'no-restricted-imports', /use-case/],
  ['components/rows.ts', "export { rows } from '../db/rows';\n", 'no-restricted-imports', /by props or from a route/],
  [
    'components/use-case.ts',
    "export { list } from '@/services/lots/list-lots';\n",
    'no-restricted-imports',
    /services\/engine and services\/contracts/,
  ],
  ['services/engine/library.ts', "export { z } from 'zod';\n", 'no-restricted-imports', /The engine imports the engine/],
  [
    'services/lots/any.ts',
    'export const parse = (row: any): string => String(row);\n',
    '@typescript-eslint/no-explicit-any',
    /any/,
  ],
  [
    'services/lots/ignore.ts',
    "// @ts-ignore\nexport const wall: number = '1.20';\n",
    '@typescript-eslint/ban-ts-comment',
    /ts-ignore/,
  ],
  [
    'services/lots/bang.ts',
    'export const first = (heats: string[]): string => heats[0]!;\n',
    '@typescript-eslint/no-non-null-assertion',
    /non-null/i,
  ],
  ['services/lots/unused.ts', 'const unused = 1;\nexport const used = 2;\n', '@typescript-eslint/no-unused-vars', /unused/],
  [
    'services/lots/floating.ts',
    'const save = async (): Promise<void> => {};\nexport const go = (): void => {\n  save();\n};\n',
    '@typescript-eslint/no-floating-promises',
    /Promises must be awaited/,
  ],
  ['services/lots/loose.ts', 'export const same = (a: string, b: number): boolean => a == (b as unknown);\n', 'eqeqeq', /===/],
  ['services/lots/later.ts', `// ${'TO'}${'DO'} later\nexport const later = 1;\n`, 'no-warning-comments', /todo/i],
  ['services/lots/long-file.ts', `${lines(301, (at) => `export const heat${at} = ${at};`)}\n`, 'max-lines', /300/],
  [
    'services/lots/long-function.ts',
    `export function long(): void {\n${lines(70, (at) => `  String(${at});`)}\n}\n`,
    'max-lines-per-function',
    /70/,
  ],
  ['tests/routes/mocked.test.ts', "import { vi } from 'vitest';\nvi.mock('@/db/work');\n", 'no-restricted-syntax', /as they are/],
  [
    'tests/routes/skipped.test.ts',
    `import { it } from 'vitest';\nit.${'skip'}('holds', () => {});\n`,
    'no-restricted-syntax',
    /proves nothing/,
  ],
];

const sound: [file: string, text: string][] = [
  ['db/clock.ts', 'export const machineNow = (): Date => new Date();\n'],
  ['services/lots/given-time.ts', 'export const day = (iso: string): Date => new Date(iso);\n'],
  ['db/rows.ts', "export { Sequelize } from 'sequelize';\n"],
  ['app/sound/page.tsx', 'export default function Page() {\n  return <p>sound</p>;\n}\n'],
  ['services/engine/orientation.ts', "export { orient2d } from 'robust-predicates';\n"],
];

beforeAll(() => {
  house = buildSmallHouse();
  for (const [file, text] of [...violations, ...sound]) house.put(file, text);
  const { output } = house.run('eslint', ['.', '--format', 'json']);
  const report = JSON.parse(output.slice(output.indexOf('[{'), output.lastIndexOf(']') + 1)) as {
    filePath: string;
    messages: Message[];
  }[];
  for (const { filePath, messages } of report)
    found.set(filePath.slice(filePath.indexOf('small-house-')).split('/').slice(1).join('/'), messages);
});
afterAll(() => house.remove());

describe('the linter', () => {
  it.each(violations)('fires on %s', (file, _text, rule, words) => {
    const messages = found.get(file) ?? [];
    expect(messages.map(({ ruleId }) => ruleId)).toContain(rule);
    expect(messages.find(({ ruleId }) => ruleId === rule)?.message).toMatch(words);
  });

  it.each(sound)('says nothing about %s', (file) => {
    expect(found.get(file)).toEqual([]);
  });
});
