import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildSmallHouse, type SmallHouse } from './small-house';

let house: SmallHouse;
let found: string[];

const files: Record<string, string> = {
  'services/engine/judge.ts': 'export const judge = 1;\n',
  'services/engine/reaches-out.ts': "export { lots } from '../lots/list-lots';\n",
  'services/lots/list-lots.ts': "export { rows as lots } from '@/db/rows';\n",
  'services/lots/draws.ts': "export { Ring } from '@/components/ring';\n",
  'services/lots/queries.ts': "import { Sequelize } from 'sequelize';\nexport const opened = Sequelize;\n",
  'services/lots/to.ts': "import { from } from './from';\nexport const to = (): unknown => from;\n",
  'services/lots/from.ts': "import { to } from './to';\nexport const from = (): unknown => to;\n",
  'services/lots/nowhere.ts': "export { gone } from './gone';\n",
  'services/lots/tested.ts': "export { it } from 'vitest';\n",
  'services/contracts/heavy.ts': "export { lots } from '../lots/list-lots';\n",
  'services/contracts/light.ts':
    "import { z } from 'zod';\nimport { judge } from '../engine/judge';\nexport const light = z.literal(judge);\n",
  'components/ring.tsx': "export { judge as Ring } from '@/services/engine/judge';\n",
  'components/asks-database.ts': "export const rows = (): Promise<unknown> => import('@/db/rows');\n",
  'components/asks-service.ts': "export { lots } from '@/services/lots/list-lots';\n",
  'db/rows.ts': "export { judge as rows } from '@/services/engine/judge';\n",
  'db/climbs.ts': "export { lots } from '@/services/lots/list-lots';\n",
  'app/api/lots/route.ts': "export const GET = (): Promise<unknown> => import('@/db/rows');\n",
};

beforeAll(() => {
  house = buildSmallHouse();
  for (const [file, text] of Object.entries(files)) house.put(file, text);
  const { output } = house.run('docker/graph.mjs', []);
  found = [...output.matchAll(/error ([a-z-]+): (\S+)/g)].map(([, rule, file]) => `${String(rule)}: ${String(file)}`);
});
afterAll(() => house.remove());

describe('the import graph', () => {
  it.each([
    ['engine-alone', 'services/engine/reaches-out.ts'],
    ['contracts-light', 'services/contracts/heavy.ts'],
    ['components-not-db', 'components/asks-database.ts'],
    ['components-not-services', 'components/asks-service.ts'],
    ['services-not-pages', 'services/lots/draws.ts'],
    ['db-below-services', 'db/climbs.ts'],
    ['app-not-db', 'app/api/lots/route.ts'],
    ['orm-in-db', 'services/lots/queries.ts'],
    ['resolvable', 'services/lots/nowhere.ts'],
    ['no-development-packages', 'services/lots/tested.ts'],
  ])('%s fires on %s', (rule, file) => {
    expect(found).toContain(`${rule}: ${file}`);
  });

  it('finds a circle', () => {
    expect(found.filter((line) => line.startsWith('no-cycles'))).toHaveLength(1);
  });

  it('lets pass what goes the right way', () => {
    const right = [
      'services/engine/judge.ts',
      'services/contracts/light.ts',
      'components/ring.tsx',
      'db/rows.ts',
      'services/lots/list-lots.ts',
    ];
    expect(found.filter((line) => right.some((file) => line.endsWith(`: ${file}`)))).toEqual([]);
  });
});
