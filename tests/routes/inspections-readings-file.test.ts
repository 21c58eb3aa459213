import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST as parse } from '@/app/api/inspections/[id]/readings-file/route';
import { POST as open } from '@/app/api/inspections/route';
import { closeDatabase } from '@/db/connection';
import { inspection, readingsFile } from '@/services/contracts/inspections';
import { parseReadingsFile } from '@/services/contracts/readings-file';
import { call, partOf, person, setting, type Person } from './inspection-setting';

const stations = [
  { number: '12', title: 'Wall, section B-B, station 1', unit: 'mm' },
  { number: '13', title: 'Wall, section B-B, station 2', unit: 'mm' },
];

describe('a file of readings', () => {
  test('with headings and points', () => {
    const { readings, faults, separator } = parseReadingsFile('Station,Thickness (mm)\n12,0.812\n13,0.90\n', stations);
    expect([separator, faults]).toEqual([',', []]);
    expect(readings.map(({ characteristic, value, unit }) => [characteristic, value, unit])).toEqual([
      ['12', '0.812', 'mm'],
      ['13', '0.90', 'mm'],
    ]);
  });

  test('with semicolons and decimal commas, by title, with a byte order mark', () => {
    const { readings, decimalSign } = parseReadingsFile(
      '\ufeffRepère;Épaisseur [mm]\r\nstation 1;0,812\r\nstation 2;0,90\r\n',
      stations,
    );
    expect(decimalSign).toBe(',');
    expect(readings.map(({ value }) => value)).toEqual(['0.812', '0.90']);
  });

  test('without headings; trailing zeros and units stay as written', () => {
    const { readings } = parseReadingsFile('12\t0.10\tin\n13\t0.100\tin\n', stations);
    expect(readings.map(({ value, unit }) => [value, unit])).toEqual([
      ['0.10', 'in'],
      ['0.100', 'in'],
    ]);
  });

  test('each bad row is named by its line and the others are taken', () => {
    const { readings, faults } = parseReadingsFile('station;value\n12;0.8\n99;0.8\n13;1e9\n\n13;\n13;0.85\n', stations);
    expect(readings.map(({ characteristic, value }) => [characteristic, value])).toEqual([
      ['12', '0.8'],
      ['13', '0.85'],
    ]);
    expect(faults.map(({ line }) => line)).toEqual([3, 4, 6]);
    expect(faults[0]?.message).toContain('99 is not a station');
  });

  test('point and comma in one column is asked, not guessed; grouping is no decimal', () => {
    expect(parseReadingsFile('12;0.8\n13;0,9\n', stations).faults[0]?.message).toContain('decimal sign');
    expect(parseReadingsFile('12;1,234.5\n', stations, { separator: ';', decimalSign: '.' }).faults[0]?.message).toContain(
      '1,234.5',
    );
    expect(parseReadingsFile('', stations).faults[0]?.message).toContain('no rows');
  });
});

describe('sent to the server', () => {
  let inspector: Person;
  let id: string;
  beforeAll(async () => {
    inspector = await person('inspector');
    const part = await partOf(await setting(inspector), inspector);
    id = inspection.parse(
      (await call(open, { method: 'POST', as: inspector, body: { subject: { part }, requirement: 'wall' } })).json,
    ).id;
  });
  afterAll(closeDatabase);

  test('is read against the requirement; bytes that are no text are refused', async () => {
    const answer = readingsFile.response.parse(
      (
        await call(parse, {
          method: 'POST',
          as: inspector,
          params: { id },
          body: '12;0,81\n77;1\n',
          headers: { 'content-type': 'text/csv' },
        })
      ).json,
    );
    expect([answer.decimalSign, answer.readings.length, answer.faults.map(({ line }) => line)]).toEqual([',', 1, [2]]);
    const binary = await call(parse, {
      method: 'POST',
      as: inspector,
      params: { id },
      body: new Uint8Array([0xff, 0xfe, 0x00, 0x80]),
    });
    expect([binary.status, binary.problem]).toEqual([422, 'unreadable-file']);
  });

  test('no session 401, auditor 403, absent inspection 404', async () => {
    expect((await call(parse, { method: 'POST', params: { id }, body: '12;1' })).status).toBe(401);
    expect((await call(parse, { method: 'POST', as: await person('auditor'), params: { id }, body: '12;1' })).status).toBe(403);
    expect(
      (await call(parse, { method: 'POST', as: inspector, params: { id: '01890000-0000-7000-8000-000000000000' }, body: '12;1' }))
        .status,
    ).toBe(404);
  });
});
