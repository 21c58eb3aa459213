import { expect, test } from 'vitest';
import { certificateRecord } from '@/services/pdf/certificate-record';
import type { CertificateRecord } from '@/services/pdf/certificate-record';
import { exampleRecord } from './certificate-pdf-example';

/** Where a record is faulty, as dotted paths. */
function faults(record: unknown): string[] {
  const parsed = certificateRecord.safeParse(record);
  return parsed.success ? [] : parsed.error.issues.map((issue) => issue.path.join('.'));
}

function firstSerial(record: CertificateRecord): CertificateRecord['serials'][number] {
  const [first] = record.serials;
  if (first === undefined) throw new Error('the example has a serial');
  return first;
}

test('a record holds nothing whose canonical form depends on a number formatter', () => {
  const record = exampleRecord({ serials: 1 });
  expect(faults({ ...record, quantity: 0.5 })).toContain('quantity');
  expect(faults({ ...record, quantity: 2 ** 53 })).toContain('quantity');
});

test('a complete record is accepted', () => {
  expect(faults(exampleRecord({ serials: 3 }))).toEqual([]);
});

test('quantity is the number of serials, and no serial stands twice', () => {
  const record = exampleRecord({ serials: 3 });
  expect(faults({ ...record, quantity: 2 })).toEqual(['quantity']);
  expect(faults({ ...record, serials: [...record.serials.slice(0, 2), firstSerial(record)] })).toEqual(['serials.2.serial']);
});

test('a certificate is called EN 10204 type 3.1 only with a result of specific inspection for each serial', () => {
  const record = exampleRecord({ serials: 1 });
  const part = firstSerial(record);
  const withOnly = (change: Partial<(typeof part.inspections)[number]>) => ({
    ...record,
    serials: [{ ...part, inspections: part.inspections.slice(0, 1).map((made) => ({ ...made, ...change })) }],
  });
  expect(faults(withOnly({}))).toEqual([]);
  for (const change of [{ result: 'met-by-sample' }, { method: 'process' }, { inspectionNumber: null }] as const) {
    expect(faults(withOnly(change))).toEqual(['serials.0.inspections']);
    expect(faults({ ...withOnly(change), type31: false })).toEqual([]);
  }
  expect(faults({ ...record, serials: [{ ...part, inspections: [] }] })).toEqual(['serials.0.inspections']);
});

test('a rejected or open requirement cannot be written; one met by concession names it', () => {
  const record = exampleRecord({ serials: 3 });
  const part = firstSerial(record);
  for (const result of ['reject', 'indeterminate', 'open']) {
    const serials = [{ ...part, inspections: part.inspections.map((made) => ({ ...made, result })) }];
    expect(faults({ ...record, quantity: 1, serials })).toContain('serials.0.inspections.0.result');
  }
  const silent = record.serials.map((each) => ({ ...each, concessions: [] }));
  expect(faults({ ...record, serials: silent })).toEqual(['serials.2.concessions']);
});

test('text that does not print as it reads is refused: bidirectional, zero-width, control, decomposed', () => {
  const record = exampleRecord({ serials: 1 });
  for (const title of ['Blade \u202egnivas', 'Bla\u200bde', 'Blade\nvane', 'Aube Societe\u0301', ' Blade']) {
    expect(faults({ ...record, part: { ...record.part, title } })).toEqual(['part.title']);
  }
});

test('unknown members, binary fractions and fields left out are refused', () => {
  const record = exampleRecord({ serials: 1 });
  expect(faults({ ...record, extra: true })).toEqual(['']);
  expect(faults({ ...record, quantity: 1.5 })).toContain('quantity');
  expect(faults({ ...record, caution: undefined })).toEqual(['caution']);
  const part = firstSerial(record);
  const values = (part.values ?? []).map((value) => ({ ...value, value: '1e9' }));
  expect(faults({ ...record, serials: [{ ...part, values }] })).toContain('serials.0.values.0.value');
});
