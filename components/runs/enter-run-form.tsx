'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { clockHere } from '@/components/inspections/act-time';
import { TimeField } from '@/components/inspections/time-field';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { RunAnswer, RunSetUp } from '@/services/contracts/runs';
import { RunValuesFields } from './run-values-fields';

const kinds = ['penetrant-load', 'furnace', 'leach', 'coating'] as const;

interface Values {
  readonly kind: (typeof kinds)[number];
  readonly technique: string;
  readonly line: string;
  readonly person: string;
  readonly at: string;
  readonly equipment: readonly string[];
  readonly process: InspectionContent['process'];
}

interface Fields {
  readonly values: Values;
  readonly setUp: RunSetUp | undefined;
  readonly onChange: (values: Values) => void;
}

function What({ values, setUp, onChange }: Fields) {
  const t = useMessages('runs');
  const kind = (name: string) => kinds.find((one) => one === name) ?? 'penetrant-load';
  return (
    <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
      <label className="flex flex-col gap-0.5">
        <span>{t('kind')}</span>
        <select
          className="field"
          value={values.kind}
          onChange={(event) => onChange({ ...values, kind: kind(event.target.value) })}
        >
          {kinds.map((name) => (
            <option key={name} value={name}>
              {t(`kinds.${name}`)}
            </option>
          ))}
        </select>
      </label>
      <label className="flex flex-col gap-0.5">
        <span>{t('technique')}</span>
        <select
          className="field"
          value={values.technique}
          onChange={(event) => onChange({ ...values, technique: event.target.value, process: [], equipment: [] })}
        >
          <option value="">{t('chooseTechnique')}</option>
          {(setUp?.techniques ?? []).map(({ number, title }) => (
            <option key={number} value={number}>
              {number} {title}
            </option>
          ))}
        </select>
      </label>
      <label className="flex flex-col gap-0.5">
        <span>{t('line')}</span>
        <input
          className="field"
          autoComplete="off"
          maxLength={60}
          value={values.line}
          onChange={(event) => onChange({ ...values, line: event.target.value })}
        />
      </label>
    </div>
  );
}

function Who({ values, setUp, onChange }: Fields) {
  const t = useMessages('runs');
  return (
    <div className="grid gap-x-4 gap-y-3 sm:grid-cols-2">
      <label className="flex flex-col gap-0.5">
        <span>{t('processedBy')}</span>
        <select className="field" value={values.person} onChange={(event) => onChange({ ...values, person: event.target.value })}>
          <option value="">{t('choose')}</option>
          {(setUp?.people ?? []).map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      </label>
      <TimeField
        label={t('processedAt')}
        at={values.at}
        readOnly={false}
        wrong={t('wrongTime')}
        onChange={(at) => onChange({ ...values, at })}
      />
      {(setUp?.equipment ?? []).length > 0 ? (
        <fieldset className="flex flex-wrap gap-2 sm:col-span-2">
          <legend className="mb-1">{t('equipment')}</legend>
          {(setUp?.equipment ?? []).map(({ id, number, title }) => {
            const chosen = values.equipment.includes(id);
            const equipment = chosen ? values.equipment.filter((one) => one !== id) : [...values.equipment, id];
            return (
              <Button
                key={id}
                size="capture"
                aria-pressed={chosen}
                glyph={chosen ? 'accept' : 'ring'}
                title={title}
                onClick={() => onChange({ ...values, equipment })}
              >
                <span className="font-mono">{number}</span>
              </Button>
            );
          })}
        </fieldset>
      ) : null}
    </div>
  );
}

function bodyOf({ kind, technique, line, person, at, equipment, process }: Values): object {
  return {
    kind,
    technique,
    ...(line.trim() === '' ? {} : { line: line.trim() }),
    process,
    acts: [{ kind: 'processed', person: person === '' ? null : person, at, equipment }],
  };
}

/** A run is entered when the load goes in; values that are not known yet may follow. */
export function EnterRunForm({ me }: { me: string }) {
  const t = useMessages('runs');
  const router = useRouter();
  const [values, setValues] = useState<Values>(() => ({
    ...{ kind: 'penetrant-load', technique: '', line: '', person: me, at: clockHere() },
    ...{ equipment: [], process: [] },
  }));
  const query = values.technique === '' ? '' : `?technique=${encodeURIComponent(values.technique)}`;
  const { answer: setUp } = useAnswer<RunSetUp>(`/api/runs/set-up${query}`);
  const { answer: first } = useAnswer<RunSetUp>('/api/runs/set-up');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const pressed = useRef(false);
  const enter = async (event: FormEvent) => {
    event.preventDefault();
    if (pressed.current) return;
    pressed.current = true;
    setBusy(true);
    try {
      const { id } = await sendJson<RunAnswer>('/api/runs', { body: bodyOf(values) });
      router.push(`/runs/${id}`);
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
    pressed.current = false;
  };
  const fields = { values, setUp: setUp ?? first, onChange: setValues };
  return (
    <Panel title={t('enter')}>
      <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void enter(event)}>
        <What {...fields} />
        {values.technique === '' ? null : (
          <>
            <Who {...fields} />
            <RunValuesFields
              windows={setUp?.windows ?? []}
              process={values.process}
              onChange={(process) => setValues({ ...values, process })}
            />
          </>
        )}
        {problem ? <ProblemNotice problem={problem} /> : null}
        <div>
          <Button kind="primary" size="capture" type="submit" busy={busy} disabled={values.technique === ''}>
            {t('enterNow')}
          </Button>
        </div>
      </form>
    </Panel>
  );
}
