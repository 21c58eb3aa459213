import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildSmallHouse, type SmallHouse } from './small-house';

let house: SmallHouse;
beforeAll(() => {
  house = buildSmallHouse();
});
afterAll(() => house.remove());

describe('the format check', () => {
  it('names the file that is not formatted, changes nothing, and passes the one that is', () => {
    house.put('services/lots/crooked.ts', 'export const wall = "1.20"\n');
    house.put('services/lots/straight.ts', "export const wall = '1.20';\n");
    const { code, output } = house.run('prettier', ['--check', 'services/lots']);
    expect(code).toBe(1);
    expect(output).toContain('services/lots/crooked.ts');
    expect(output).not.toContain('straight.ts');
    expect(house.run('prettier', ['--check', 'services/lots/straight.ts']).code).toBe(0);
  });
});
