import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

// Tables and worked examples collected beside the repository; without them their tests say that they were skipped.
const folder = process.env.RINGTRUE_REFERENCE ?? path.resolve(import.meta.dirname, '../../../shared/reference');

export const withoutReference = !existsSync(folder);

/** A JSON file of the reference folder. The caller states its shape; a missing key fails the test that reads it. */
export function referenceJson<Shape>(name: string): Shape {
  return JSON.parse(readFileSync(path.join(folder, name), 'utf8')) as Shape;
}

/** Splits a line of comma-separated values; a field in quotes may hold commas. */
function fieldsOf(line: string): string[] {
  return [...line.matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g)].map((match) => match[1] ?? match[2] ?? '');
}

/** The rows of a CSV file of the reference folder by column name. */
export function referenceRows(name: string): Record<string, string>[] {
  const [head = '', ...lines] = readFileSync(path.join(folder, name), 'utf8').trim().split(/\r?\n/);
  const names = fieldsOf(head);
  return lines.map((line) => Object.fromEntries(fieldsOf(line).map((value, place) => [names[place] ?? '', value])));
}
