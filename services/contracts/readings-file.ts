import Papa from 'papaparse';
import type { InspectionContent } from './inspection-content';

type EnteredReading = InspectionContent['readings'][number];

/** A characteristic a file may give readings for, as the plan names it. */
export interface FileStation {
  readonly number: string;
  readonly title: string;
  readonly unit: string;
}

export interface RowFault {
  /** Line of the file, from 1. */
  readonly line: number;
  readonly message: string;
}

export interface ParsedReadings {
  readonly separator: string;
  readonly decimalSign: '.' | ',';
  readonly readings: readonly EnteredReading[];
  readonly faults: readonly RowFault[];
}

export interface FileForm {
  readonly separator?: string | undefined;
  readonly decimalSign?: '.' | ',' | undefined;
}

/** A file longer than this is no list of stations; the rest is refused by line. */
const mostRows = 5000;

const stationHeads = ['station', 'characteristic', 'number', 'no', 'nr', 'point', 'repère', 'repere'];
const valueHeads = ['value', 'thickness', 'reading', 'measured', 'valeur', 'épaisseur', 'epaisseur', 'mesure'];
const unitHeads = ['unit', 'units', 'unité', 'unite'];

interface Columns {
  readonly station: number;
  readonly value: number;
  readonly unit: number | null;
  readonly headed: boolean;
}

function bare(text: string): string {
  return text
    .trim()
    .toLowerCase()
    .replace(/\s*[[(].*$/, '');
}

/** Columns by their headings (English or French), or, in a file without headings, station then value then unit. */
function columnsOf(first: readonly string[]): Columns {
  const heads = first.map(bare);
  const find = (names: readonly string[]) => heads.findIndex((head) => names.includes(head));
  const [station, value, unit] = [find(stationHeads), find(valueHeads), find(unitHeads)];
  if (station >= 0 && value >= 0) return { station, value, unit: unit >= 0 ? unit : null, headed: true };
  return { station: 0, value: 1, unit: first.length > 2 ? 2 : null, headed: false };
}

/** `thickness (mm)` or `thickness [mm]` names the unit of its column. */
function unitOfHead(head: string): string | null {
  return /[[(]\s*([^\])]+?)\s*[\])]\s*$/.exec(head)?.[1] ?? null;
}

/**
 * The decimal sign: declared, or read off the separator (a file separated by commas cannot have decimal commas), or the
 * one sign that the value column uses. Undefined when the column uses both, so that nothing is guessed.
 */
function decimalSignOf(values: readonly string[], separator: string, declared: '.' | ',' | undefined): '.' | ',' | undefined {
  if (declared !== undefined) return declared;
  if (separator === ',') return '.';
  const comma = values.some((value) => value.includes(','));
  const point = values.some((value) => value.includes('.'));
  if (comma && point) return undefined;
  return comma ? ',' : '.';
}

/** `4`, `004`, `12`, or a word of the title such as `station 4`, to the characteristic's number. */
function stationNumber(text: string, stations: readonly FileStation[]): FileStation | string {
  const wanted = text.trim();
  const byNumber = stations.filter(({ number }) => number === wanted);
  if (byNumber[0]) return byNumber[0];
  const unpadded = stations.filter(({ number }) => number.replace(/^0+(?=.)/, '') === wanted.replace(/^0+(?=.)/, ''));
  if (unpadded.length === 1 && unpadded[0]) return unpadded[0];
  const words = wanted.toLowerCase();
  const titled = stations.filter(({ title }) => title.toLowerCase() === words || title.toLowerCase().endsWith(`, ${words}`));
  if (titled.length === 1 && titled[0]) return titled[0];
  return titled.length > 1 ? `${wanted} fits several stations of this operation` : `${wanted} is not a station of this operation`;
}

/** A value as the file writes it, to a decimal with a point; null when it is none. Nothing is rounded or regrouped. */
function decimalOf(text: string, sign: '.' | ','): string | null {
  const wanted = text.trim();
  const other = sign === '.' ? ',' : '.';
  if (wanted.includes(other)) return null;
  const pointed = sign === ',' ? wanted.replace(',', '.') : wanted;
  return /^-?[0-9]{1,16}(\.[0-9]{1,16})?$/.test(pointed) ? pointed : null;
}

interface ParsedRow {
  readonly line: number;
  readonly cells: readonly string[];
}

/** The separator of the first line that says something: a semicolon or tab beats a comma, which may be a decimal sign. */
function separatorOf(text: string): string {
  const line = text.split(/\r\n|\n|\r/).find((one) => one.trim() !== '' && !one.startsWith('#')) ?? '';
  return ['\t', ';', '|'].find((sign) => line.includes(sign)) ?? ',';
}

function rowsOf(text: string, separator: string | undefined): { rows: ParsedRow[]; separator: string; faults: RowFault[] } {
  const plain = text.replace(/^\ufeff/, '');
  const delimiter = separator ?? separatorOf(plain);
  const parsed = Papa.parse<string[]>(plain, { delimiter, skipEmptyLines: false, preview: mostRows + 2 });
  const rows = parsed.data
    .map((cells, index) => ({ line: index + 1, cells }))
    .filter(({ cells }) => cells.some((cell) => cell.trim() !== '') && !(cells[0] ?? '').startsWith('#'));
  const faults = parsed.errors
    .filter(({ type }) => type === 'Quotes')
    .map(({ row, message }) => ({ line: (row ?? 0) + 1, message }));
  return { rows, separator: delimiter, faults };
}

/**
 * Reads a CSV of readings. Pure, so that the bench shows the same rows and faults before anything is sent. Good rows are
 * taken and each bad row is named by its line: a wrong station, a value that is no decimal, a unit that differs is not guessed.
 */
export function parseReadingsFile(text: string, stations: readonly FileStation[], form: FileForm = {}): ParsedReadings {
  const { rows, separator, faults: quoteFaults } = rowsOf(text, form.separator);
  const first = rows[0];
  if (!first) return { separator, decimalSign: '.', readings: [], faults: [{ line: 1, message: 'the file has no rows' }] };
  const columns = columnsOf(first.cells);
  const headUnit = columns.headed ? unitOfHead(first.cells[columns.value] ?? '') : null;
  const body = columns.headed ? rows.slice(1) : rows;
  const sign = decimalSignOf(
    body.map(({ cells }) => cells[columns.value] ?? ''),
    separator,
    form.decimalSign,
  );
  const faults = [...quoteFaults];
  if (sign === undefined)
    return {
      separator,
      decimalSign: '.',
      readings: [],
      faults: [{ line: 1, message: 'values use both a point and a comma; say which is the decimal sign' }],
    };
  const readings = body.slice(0, mostRows).flatMap(({ line, cells }): EnteredReading[] => {
    const station = stationNumber(cells[columns.station] ?? '', stations);
    const raw = cells[columns.value] ?? '';
    const value = decimalOf(raw, sign);
    const unit = (columns.unit === null ? '' : (cells[columns.unit] ?? '').trim()) || headUnit;
    if (typeof station === 'string') faults.push({ line, message: station });
    else if (cells.length < 2 || raw.trim() === '') faults.push({ line, message: `station ${station.number} has no value` });
    else if (value === null) faults.push({ line, message: `${raw.trim()} is not a decimal with the decimal sign ${sign}` });
    else return [{ characteristic: station.number, value, unit: unit ?? station.unit, source: 'file' }];
    return [];
  });
  if (body.length > mostRows) faults.push({ line: mostRows + 1, message: `only the first ${String(mostRows)} rows are read` });
  return { separator, decimalSign: sign, readings, faults };
}
