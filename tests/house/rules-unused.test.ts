import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildSmallHouse, type SmallHouse } from './small-house';

let house: SmallHouse;
beforeAll(() => {
  house = buildSmallHouse();
});
afterAll(() => house.remove());

describe('the check for unused code', () => {
  it('names a file nobody imports and an export nobody uses, and not what a page uses', () => {
    house.put('services/lots/used.ts', "export const used = 'used';\nexport const exportedForNobody = 'unused';\n");
    house.put('services/lots/imported-by-nobody.ts', "export const alone = 'alone';\n");
    house.put(
      'app/page.tsx',
      "import { used } from '@/services/lots/used';\nexport default function Page() {\n  return used;\n}\n",
    );
    const { code, output } = house.run('knip', ['--include', 'files,exports', '--reporter', 'compact']);
    expect(code).not.toBe(0);
    expect(output).toContain('services/lots/imported-by-nobody.ts');
    expect(output).toMatch(/services\/lots\/used\.ts: exportedForNobody\n/);
    expect(output).not.toContain('app/page.tsx');
  });
});
