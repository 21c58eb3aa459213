/** One reading as the gauge shows it: the digits are kept as text, since 0.90 is not 0.9. */
export interface StationReading {
  readonly station: number;
  /** Millimetres, with a decimal point. */
  readonly value: string;
}

/** How a gauge's file is written. */
export interface ThicknessFileForm {
  readonly separator: ',' | ';' | '\t';
  readonly decimal: '.' | ',';
  readonly heading: readonly [string, string];
  readonly lineEnd: '\n' | '\r\n';
  /** Some gauges begin their file with a byte order mark. */
  readonly byteOrderMark: boolean;
}

/** The declared forms that the demo's gauges write. */
export const thicknessFileForms = {
  'comma-point': { separator: ',', decimal: '.', heading: ['station', 'thickness_mm'], lineEnd: '\n', byteOrderMark: false },
  'semicolon-comma': { separator: ';', decimal: ',', heading: ['Station', 'Thickness mm'], lineEnd: '\r\n', byteOrderMark: true },
  'semicolon-point': {
    separator: ';',
    decimal: '.',
    heading: ['Station', 'Thickness mm'],
    lineEnd: '\r\n',
    byteOrderMark: false,
  },
  'tab-comma': { separator: '\t', decimal: ',', heading: ['Poste', 'Epaisseur mm'], lineEnd: '\r\n', byteOrderMark: false },
} as const satisfies Record<string, ThicknessFileForm>;

/**
 * File of ultrasonic wall readings, one station a line, in a gauge's own form (UTF-8).
 * @throws RangeError for a form whose separator is its decimal sign, a station that is no whole number above zero, or a value that is no decimal.
 */
export function thicknessCsv(readings: readonly StationReading[], form: ThicknessFileForm): Buffer {
  if (form.separator === form.decimal) throw new RangeError('the separator of a file cannot be its decimal sign');
  const lines = readings.map(({ station, value }) => {
    if (!Number.isInteger(station) || station < 1)
      throw new RangeError(`station ${String(station)} is no whole number above zero`);
    if (!/^-?[0-9]+(\.[0-9]+)?$/.test(value)) throw new RangeError(`'${value}' is no decimal such as 0.90`);
    return `${String(station)}${form.separator}${value.replace('.', form.decimal)}`;
  });
  const text = [form.heading.join(form.separator), ...lines, ''].join(form.lineEnd);
  return Buffer.from(`${form.byteOrderMark ? '\ufeff' : ''}${text}`, 'utf8');
}
