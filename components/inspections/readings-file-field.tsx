'use client';

import { useState } from 'react';
import { FileButton } from '@/components/evidence/file-button';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { parseReadingsFile, type ParsedReadings } from '@/services/contracts/readings-file';
import type { CharacteristicRow } from './plan-rows';

export interface ReadingsFileFieldProps {
  readonly rows: readonly CharacteristicRow[];
  readonly onTake: (readings: ParsedReadings['readings'][number][]) => void;
  readonly onFile: (file: File) => void;
}

interface Read {
  readonly file: File;
  readonly text: string;
  readonly parsed: ParsedReadings;
  readonly taken: boolean;
}

const mostShown = 40;

/** A CSV of readings: taken at once when every row is good; otherwise its rows and faults are shown first. */
export function ReadingsFileField({ rows, onTake, onFile }: ReadingsFileFieldProps) {
  const t = useMessages('inspections');
  const [read, setRead] = useState<Read>();
  const take = (file: File, text: string, parsed: ParsedReadings) => {
    // Of several rows for one station the last one counts, as when they are typed one after the other.
    onTake([...new Map(parsed.readings.map((one) => [one.characteristic, one])).values()]);
    onFile(file);
    setRead({ file, text, parsed, taken: true });
  };
  const parse = (file: File, text: string, decimalSign?: '.' | ',') => {
    const stations = rows.map(({ number, title, unit }) => ({ number, title: title ?? number, unit }));
    const parsed = parseReadingsFile(text, stations, { decimalSign });
    const repeated = new Set(parsed.readings.map(({ characteristic }) => characteristic)).size < parsed.readings.length;
    if (parsed.faults.length === 0 && !repeated && parsed.readings.length > 0) take(file, text, parsed);
    else setRead({ file, text, parsed, taken: false });
  };
  return (
    <div className="mt-3 flex flex-col gap-2 border-t border-line pt-3">
      <div>
        <FileButton
          label={t('file')}
          accept=".csv,.txt,text/csv"
          onFiles={([file]) => {
            if (file) void file.text().then((text) => parse(file, text));
          }}
        />
      </div>
      {read?.taken ? <p role="status">{t('fileTaken', { name: read.file.name, count: read.parsed.readings.length })}</p> : null}
      {read && !read.taken ? (
        <Preview
          read={read}
          onSign={(sign) => parse(read.file, read.text, sign)}
          onTake={() => take(read.file, read.text, read.parsed)}
          onLeave={() => setRead(undefined)}
        />
      ) : null}
    </div>
  );
}

interface PreviewProps {
  readonly read: Read;
  readonly onSign: (sign: '.' | ',') => void;
  readonly onTake: () => void;
  readonly onLeave: () => void;
}

function Preview({ read, onSign, onTake, onLeave }: PreviewProps) {
  const t = useMessages('inspections');
  const { readings, faults } = read.parsed;
  return (
    <Notice kind="refusal" title={t('fileFaults', { name: read.file.name, count: faults.length })}>
      <ul className="list-disc pl-5">
        {faults.length === 0 ? <li>{t('fileRepeated')}</li> : null}
        {faults.slice(0, mostShown).map(({ line, message }) => (
          <li key={`${String(line)} ${message}`}>{t('line', { line, message })}</li>
        ))}
      </ul>
      {readings.length > 0 ? (
        <div tabIndex={0} role="region" aria-label={t('fileRows')} className="mt-2 max-h-48 overflow-y-auto">
          <p className="font-semibold">{t('fileRows')}</p>
          <ul className="grid grid-cols-2 gap-x-6 font-mono tabular-nums sm:grid-cols-3">
            {readings.map(({ characteristic, value, unit }, place) => (
              <li key={`${characteristic} ${String(place)}`}>
                {characteristic}: {value} {unit}
              </li>
            ))}
          </ul>
        </div>
      ) : null}
      <div className="mt-3 flex flex-wrap gap-2">
        {readings.length > 0 ? (
          <Button onClick={onTake}>{t('fileTake', { count: readings.length })}</Button>
        ) : (
          <>
            <Button onClick={() => onSign('.')}>{t('fileSign', { sign: '.' })}</Button>
            <Button onClick={() => onSign(',')}>{t('fileSign', { sign: ',' })}</Button>
          </>
        )}
        <Button onClick={onLeave}>{t('fileLeave')}</Button>
      </div>
    </Notice>
  );
}
