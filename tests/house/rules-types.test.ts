import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildSmallHouse, type SmallHouse } from './small-house';

let house: SmallHouse;
beforeAll(() => {
  house = buildSmallHouse();
});
afterAll(() => house.remove());

/** `file: code` of every fault the compiler names. */
function faults(output: string): string[] {
  return [...output.matchAll(/^(\S+?)\(\d+,\d+\): error (TS\d+)/gm)]
    .map(([, file, code]) => `${String(file)}: ${String(code)}`)
    .sort();
}

describe('the types of the product', () => {
  it('refuse an index that may be missing, a null, and a type imported as a value', () => {
    house.put('services/lots/index-may-miss.ts', 'const heats: string[] = [];\nexport const first: string = heats[0];\n');
    house.put('services/lots/null-may-come.ts', 'export const length = (text: string | null): number => text.length;\n');
    house.put('services/lots/heat.ts', 'export interface Heat {\n  number: string;\n}\n');
    house.put('services/lots/value-import.ts', "import { Heat } from './heat';\nexport const heats: Heat[] = [];\n");
    house.put('services/lots/sound.ts', "import type { Heat } from './heat';\nexport const heats: Heat[] = [];\n");
    const { code, output } = house.run('tsc', ['--noEmit', '--incremental', 'false']);
    expect(faults(output)).toEqual([
      'services/lots/index-may-miss.ts: TS2322',
      'services/lots/null-may-come.ts: TS18047',
      'services/lots/value-import.ts: TS1484',
    ]);
    expect(code).not.toBe(0);
  });
});

describe('the types of the engine', () => {
  it('know neither page nor process nor clock of a machine, though the product does', () => {
    house.put('services/engine/pure.ts', 'export const twice = (countOfPores: number): number => countOfPores * 2;\n');
    house.put('services/engine/uses-document.ts', 'export const title = (): string => document.title;\n');
    house.put('services/engine/uses-process.ts', 'export const cwd = (): string => process.cwd();\n');
    house.put('services/engine/uses-node.ts', "import { readFileSync } from 'node:fs';\nexport const read = readFileSync;\n");
    house.put('services/engine/uses-fetch.ts', "export const ask = (): unknown => fetch('/');\n");
    const { code, output } = house.run('tsc', ['--noEmit', '-p', 'services/engine']);
    expect(faults(output)).toEqual([
      expect.stringMatching(/uses-document\.ts: TS(2584|2304)/),
      expect.stringMatching(/uses-fetch\.ts: TS2304/),
      expect.stringMatching(/uses-node\.ts: TS(2307|2591)/),
      expect.stringMatching(/uses-process\.ts: TS(2591|2580|2304)/),
    ]);
    expect(code).not.toBe(0);
  });
});
