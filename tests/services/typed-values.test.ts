import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { dayFrom } from '../../components/forms/day-text';
import { decimalFrom } from '../../components/forms/decimal-text';
import { csvOf } from '../../components/grids/grid-columns';
import type { GridColumn } from '../../components/grids/grid-columns';
import { KeysetSource, pageUrl } from '../../components/grids/keyset-source';
import { bandScale } from '../../components/ui/band-scale';
import { plantTime } from '../../components/ui/plant-time';

describe('a typed decimal', () => {
  it.each([
    ['1,50', '1.50'],
    ['1.50', '1.50'],
    [' 0.10 ', '0.10'],
    [',5', '0.5'],
    ['-0,2', '-0.2'],
    ['\u22120.2', '-0.2'],
    ['+3', '3'],
  ])('%s is %s', (typed, expected) => {
    expect(decimalFrom(typed)).toBe(expected);
  });

  it.each(['', ' ', '1,2,3', '1,234.5', '1 2', '1e9', 'NaN', 'Infinity', '0x10', '5.', '-', '１'])(
    '%j is not guessed at',
    (typed) => {
      expect(decimalFrom(typed)).toBeUndefined();
    },
  );

  it('keeps every digit, comma or point', () => {
    fc.assert(
      fc.property(fc.stringMatching(/^\d{1,20}$/), fc.stringMatching(/^\d{1,20}$/), (whole, fraction) => {
        expect(decimalFrom(`${whole},${fraction}`)).toBe(`${whole}.${fraction}`);
        expect(decimalFrom(`${whole}.${fraction}`)).toBe(`${whole}.${fraction}`);
      }),
    );
  });
});

describe('a typed day', () => {
  it.each(['2026-03-09', '2026/3/9', '20260309', '2026 03 09'])('%s is the ninth of March', (typed) => {
    expect(dayFrom(typed)).toBe('2026-03-09');
  });

  it.each(['09/03/2026', '2026-02-30', '2026-13-01', '202639', '', 'today'])('%j is not guessed at', (typed) => {
    expect(dayFrom(typed)).toBeUndefined();
  });
});

describe('the plant clock', () => {
  // Summer time in Europe begins on the last Sunday of March at 01:00 UTC (Directive 2000/84/EC).
  it.each([
    ['2026-03-09T13:05:00Z', 'Europe/Paris', '2026-03-09 14:05 CET'],
    ['2026-03-29T00:59:00Z', 'Europe/Paris', '2026-03-29 01:59 CET'],
    ['2026-03-29T01:00:00Z', 'Europe/Paris', '2026-03-29 03:00 CEST'],
    ['2026-12-31T23:30:00Z', 'Europe/Paris', '2027-01-01 00:30 CET'],
    ['2026-03-09T13:05:00Z', 'UTC', '2026-03-09 13:05 UTC'],
  ])('%s in %s is %s', (at, zone, expected) => {
    const shown = plantTime(at, zone);
    expect(`${shown.date} ${shown.time} ${shown.zone}`).toBe(expected);
  });

  it('refuses what is no instant', () => {
    expect(() => plantTime('yesterday', 'UTC')).toThrow('not an instant');
  });
});

describe('a reading on its gauge line', () => {
  it('places limits, guard and value in order', () => {
    const scale = bandScale({ lower: '0.75', upper: '1.05', guardBand: '0.03', value: '0.90', uncertainty: '0.03' });
    expect(scale.value).toBeCloseTo(0.5);
    expect(scale.guardLower).toBeGreaterThan(scale.lower ?? 1);
    expect(scale.guardUpper).toBeLessThan(scale.upper ?? 0);
    expect(scale.whisker?.[0]).toBeLessThan(scale.value ?? 0);
    expect(scale.beyond).toBeUndefined();
  });

  it('says on which side a value lies that cannot be drawn', () => {
    expect(bandScale({ lower: '0.75', upper: '1.05', value: '9' }).beyond).toBe('above');
    expect(bandScale({ lower: '0.75', upper: '1.05', value: '-9' }).beyond).toBe('below');
  });

  it('draws a one-sided band with room for the value', () => {
    const scale = bandScale({ lower: '0.75', value: '5' });
    expect(scale.upper).toBeUndefined();
    expect(scale.value).toBeLessThan(1);
  });
});

describe('a list that only knows what comes after', () => {
  const all = Array.from({ length: 23 }, (_, index) => index);
  const list = () => {
    let asked = 0;
    const source = new KeysetSource<number>((limit, after) => {
      asked += 1;
      const from = after === null ? 0 : Number(after);
      const items = all.slice(from, from + limit);
      return Promise.resolve({ items, next: from + limit < all.length ? String(from + limit) : null });
    }, 5);
    return { source, asked: () => asked };
  };

  it('gives pages in order, and the number of rows with the last', async () => {
    const { source } = list();
    expect(await source.page(0)).toEqual({ rows: [0, 1, 2, 3, 4], lastRow: undefined });
    expect(await source.page(5)).toEqual({ rows: [5, 6, 7, 8, 9], lastRow: undefined });
    expect(await source.page(20)).toEqual({ rows: [20, 21, 22], lastRow: 23 });
  });

  it('comes back with one request, and walks where it has not been', async () => {
    const { source, asked } = list();
    await source.page(15);
    expect(asked()).toBe(4);
    await source.page(5);
    expect(asked()).toBe(5);
    expect(await source.page(100)).toEqual({ rows: [], lastRow: 23 });
  });

  it('keeps the filters of the address', () => {
    expect(pageUrl('/api/parts?state=held', 50, 'AM 1', '-serial')).toBe(
      '/api/parts?state=held&limit=50&after=AM+1&sort=-serial',
    );
  });
});

describe('a table taken away as CSV', () => {
  const columns: GridColumn<{ text: string }>[] = [{ key: 'text', title: 'Text', kind: 'text', value: ({ text }) => text }];

  // RFC 4180, 2: CRLF, fields with comma, quote or line break in quotes, quotes doubled.
  it.each([
    ['plain', 'plain'],
    ['a,b', '"a,b"'],
    ['say "so"', '"say ""so"""'],
    ['-0.10', '-0.10'],
    ['=1+1', "'=1+1"],
    ['-cmd', "'-cmd"],
  ])('%s becomes %s', (text, expected) => {
    expect(csvOf(columns, [{ text }])).toBe(`Text\r\n${expected}\r\n`);
  });
});
