import fc from 'fast-check';
import { expect, test } from 'vitest';
import { derive, DERIVED_QUANTITIES } from '@/services/engine/methods/derive';
import type { DerivedQuantity, InputForm } from '@/services/engine/methods/derived-quantity';
import type { EnteredInput } from '@/services/engine/methods/read-inputs';
import { decimalText, isDecimalText, rationalOf } from '@/services/engine/quantity/decimal';
import { convertValue, unitOf } from '@/services/engine/quantity/units';
import { renderSentence } from '@/services/engine/sentences/sentence';

/** Entries that fit the forms of a quantity, most of them in sound ranges. */
function entriesFor(quantity: DerivedQuantity): fc.Arbitrary<EnteredInput[]> {
  const decimal = fc
    .tuple(fc.integer({ min: -200, max: 4000 }), fc.integer({ min: 0, max: 4 }))
    .map(([n, places]) => decimalText({ n: BigInt(n), d: 10n ** BigInt(places) }, 6));
  const one = (form: InputForm): fc.Arbitrary<EnteredInput> => {
    switch (form.kind) {
      case 'value':
        return decimal.map((value) => ({ name: form.name, value, unit: form.unit }));
      case 'values':
        return fc.array(decimal, { minLength: 3, maxLength: 6 }).map((value) => ({ name: form.name, value, unit: form.unit }));
      case 'count':
        return fc.nat(200).map((value) => ({ name: form.name, value: String(value) }));
      case 'choice':
        return fc.constantFrom(...form.options).map((value) => ({ name: form.name, value }));
      case 'mark':
        return fc.constantFrom('W10', '12-2T', 'H5', 'E747 8', 'nothing').map((value) => ({ name: form.name, value }));
    }
  };
  return fc.tuple(...quantity.inputs.map(one));
}
const anyEntries = fc
  .constantFrom(...DERIVED_QUANTITIES)
  .chain((quantity) => fc.tuple(fc.constant(quantity), entriesFor(quantity)));
const OTHER_UNITS: Readonly<Record<string, readonly string[]>> = {
  mm: ['in', 'µm', 'm'],
  µs: ['ns', 'ms'],
  'mm/µs': ['m/s', 'in/µs'],
  K: ['°C'],
  kPa: ['bar', 'Pa'],
  g: ['kg', 'mg'],
  'g/s': ['kg/s'],
  'g/cm³': ['kg/m³'],
  'mm²': ['cm²'],
  min: ['s'],
};

test('every quantity answers anything that its forms take: a decimal with its unit, or faults that can be read', () => {
  fc.assert(
    fc.property(anyEntries, ([quantity, entries]) => {
      const found = derive(quantity.name, entries);
      if (found.ok) {
        expect(isDecimalText(found.value)).toBe(true);
        expect(found.unit).toBe(quantity.unit);
        for (const step of found.steps) expect(isDecimalText(step.value)).toBe(true);
      } else {
        for (const { code, parameters } of found.faults)
          for (const language of ['en', 'fr'] as const) expect(renderSentence(code, parameters, language)).toMatch(/^[^{}]+\.$/u);
      }
    }),
    { numRuns: 4000 },
  );
});

test('the unit of entry and the order of inputs change no digit', () => {
  fc.assert(
    fc.property(anyEntries, fc.nat(3), ([quantity, entries], pick) => {
      const elsewhere = entries.map((entry): EnteredInput => {
        const others = OTHER_UNITS[entry.unit ?? ''] ?? [];
        const unit = others[pick % Math.max(others.length, 1)];
        const [from, to] = [unitOf(entry.unit ?? ''), unitOf(unit ?? '')];
        if (!unit || !from || !to) return entry;
        const inUnit = (text: string) => {
          const value = convertValue(rationalOf(text), from, to);
          const written = decimalText(value, 16);
          // Only where the other unit can say it exactly.
          return rationalOf(written).n * value.d === value.n * rationalOf(written).d ? written : null;
        };
        const value = typeof entry.value === 'string' ? inUnit(entry.value) : entry.value.map(inUnit);
        if (value === null) return entry;
        if (typeof value === 'string') return { name: entry.name, value, unit };
        const whole = value.filter((text): text is string => text !== null);
        return whole.length === value.length ? { name: entry.name, value: whole, unit } : entry;
      });
      const there = derive(quantity.name, entries);
      const back = derive(quantity.name, [...elsewhere].reverse());
      expect(back.ok).toBe(there.ok);
      if (there.ok) expect(back).toEqual(there);
    }),
    { numRuns: 3000 },
  );
});
