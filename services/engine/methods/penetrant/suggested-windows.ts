import type { PenetrantStep, PenetrantWindow } from './windows';

/** A window as a source is remembered or was read to state it: offered when a technique is written, never judged against. */
export interface SuggestedWindow extends PenetrantWindow {
  readonly step: PenetrantStep;
  readonly source: string;
  /** `memory`: to be confirmed against the edition that the technique invokes. */
  readonly known: 'read' | 'memory';
  readonly where?: string;
}

type Row = readonly [PenetrantStep, string | null, string | null, string, SuggestedWindow['known'], string?];

const BY_SOURCE: Readonly<Record<string, readonly Row[]>> = {
  'ASTM E1417': [
    ['part-temperature', '4', '52', '°C', 'memory'],
    ['penetrant-dwell', '10', '120', 'min', 'memory', '10 °C to 52 °C; from 4 °C at least 20 min'],
    ['emulsifier-dwell', null, '3', 'min', 'memory', 'lipophilic, type I'],
    ['remover-dwell', null, '2', 'min', 'memory', 'hydrophilic, immersion'],
    ['rinse-temperature', '10', '38', '°C', 'memory'],
    ['rinse-pressure', null, '275', 'kPa', 'memory'],
    ['rinse-air-pressure', null, '172', 'kPa', 'memory', 'hydro-air nozzle'],
    ['rinse-distance', '300', null, 'mm', 'memory'],
    ['drying-temperature', null, '71', '°C', 'memory'],
    ['developer-dwell', '10', '240', 'min', 'memory', 'dry powder; aqueous up to 120, nonaqueous up to 60'],
    ['uv-a', '1000', null, 'µW/cm²', 'read'],
    ['ambient-light', null, '21.5', 'lx', 'read'],
    ['white-light', '1076', null, 'lx', 'read', 'type II'],
    ['dark-adaptation', '1', null, 'min', 'memory'],
  ],
  'ISO 3059': [
    ['uv-a', '10', null, 'W/m²', 'read'],
    ['ambient-light', null, '20', 'lx', 'read'],
  ],
  'ISO 3452-1': [
    ['part-temperature', '10', '50', '°C', 'memory'],
    ['penetrant-dwell', '5', '60', 'min', 'memory'],
    ['developer-dwell', '10', '30', 'min', 'memory', 'longer by agreement'],
  ],
  'T.O. 33B-1-1': [
    ['drying-temperature', null, '60', '°C', 'read', 'above it, or after 10 min, reprocess'],
    ['drying-time', null, '10', 'min', 'read'],
    ['ambient-light', null, '21.5', 'lx', 'read'],
  ],
};

/** Sources that disagree with each other: the technique names the one it invokes. */
export const WINDOW_SOURCES: readonly string[] = Object.keys(BY_SOURCE);

/** Windows that a source suggests, in the order of the work; none for an unknown source. */
export function suggestedWindows(source: string): readonly SuggestedWindow[] {
  const rows = Object.hasOwn(BY_SOURCE, source) ? (BY_SOURCE[source] ?? []) : [];
  return rows.map(([step, lower, upper, unit, known, where]) => ({
    step,
    lower,
    upper,
    unit,
    known,
    source,
    ...(where === undefined ? {} : { where }),
  }));
}
