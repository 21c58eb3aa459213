'use client';

import Link from 'next/link';
import { useState } from 'react';
import { useWindowWords } from '@/components/baskets/window-words';
import { sendJson } from '@/components/forms/send-json';
import { useScans } from '@/components/scanner/page-scanner';
import { playTone } from '@/components/scanner/tones';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import { Skeleton } from '@/components/ui/skeleton';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { RunAnswer } from '@/services/contracts/runs';
import { ChangeValuesDialog, VoidedNotice } from './change-values-dialog';
import { StandingWord } from './standing-word';

type Changed = Parameters<Parameters<typeof ChangeValuesDialog>[0]['onChanged']>[0];

function Values({ run }: { run: RunAnswer }) {
  const t = useMessages('runs');
  const windowWords = useWindowWords();
  return (
    <DataTable
      caption={t('values')}
      rows={run.windows}
      rowKey={({ number }) => number}
      empty={<EmptyState title={t('noWindows')} />}
      columns={[
        { key: 'title', title: t('process'), names: true, cell: ({ title }) => title },
        {
          key: 'value',
          title: t('value'),
          align: 'end',
          cell: ({ number }) => {
            const read = run.process.find((one) => one.number === number);
            return <span className="font-mono">{read ? `${read.value} ${read.unit}` : t('missing')}</span>;
          },
        },
        { key: 'window', title: t('window'), cell: windowWords },
        {
          key: 'verdict',
          title: t('verdict'),
          cell: ({ number }) => {
            const judged = run.judged.find((one) => one.number === number);
            return judged ? <VerdictMark verdict={judged.verdict} reason={judged.text} /> : '–';
          },
        },
      ]}
    />
  );
}

function History({ run }: { run: RunAnswer }) {
  const t = useMessages('runs');
  return (
    <DataTable
      caption={t('history')}
      rows={run.values}
      rowKey={({ at }) => at}
      columns={[
        { key: 'at', title: t('entered'), names: true, cell: ({ at }) => <When at={at} /> },
        { key: 'by', title: t('by'), cell: ({ by }) => by },
        {
          key: 'values',
          title: t('values'),
          cell: ({ process }) => (
            <span className="font-mono">
              {process.map(({ number, value, unit }) => `${number} ${value} ${unit}`).join(' · ') || '–'}
            </span>
          ),
        },
        { key: 'standing', title: t('standing'), cell: ({ standing }) => <StandingWord standing={standing} /> },
        { key: 'reason', title: t('reason'), cell: ({ reason }) => reason ?? '–' },
      ]}
    />
  );
}

function Members({
  run,
  onAdd,
  problem,
}: {
  run: RunAnswer;
  onAdd: ((scan: string) => void) | undefined;
  problem: Problem | undefined;
}) {
  const t = useMessages('runs');
  const [serial, setSerial] = useState('');
  return (
    <Panel title={t('members')} {...(onAdd ? { subtitle: t('scanHint') } : {})} flush>
      {onAdd ? (
        <form
          data-density="capture"
          className="flex items-end gap-2 p-3"
          onSubmit={(event) => {
            event.preventDefault();
            if (serial.trim() !== '') onAdd(serial.trim());
            setSerial('');
          }}
        >
          <label className="flex w-64 flex-col gap-0.5">
            <span>{t('serial')}</span>
            <input
              className="field font-mono"
              autoComplete="off"
              spellCheck={false}
              value={serial}
              onChange={(event) => setSerial(event.target.value)}
            />
          </label>
          <Button size="capture" type="submit">
            {t('add')}
          </Button>
        </form>
      ) : null}
      {problem ? (
        <div className="px-3 pb-3">
          <ProblemNotice problem={problem} />
        </div>
      ) : null}
      <DataTable
        caption={t('members')}
        rows={run.members}
        rowKey={({ part }) => part}
        empty={<EmptyState title={t('membersEmpty')} />}
        columns={[
          {
            key: 'serial',
            title: t('serial'),
            names: true,
            cell: ({ part, serial: named }) => (
              <Link className="font-mono text-accent underline underline-offset-4" href={`/parts/${part}`}>
                {named}
              </Link>
            ),
          },
          { key: 'number', title: t('parts'), cell: ({ partNumber }) => <span className="font-mono">{partNumber}</span> },
          { key: 'place', title: t('place'), cell: ({ place }) => place ?? '–' },
        ]}
      />
    </Panel>
  );
}

function Leaning({ run }: { run: RunAnswer }) {
  const t = useMessages('runs');
  return (
    <Panel title={t('inspections')} flush>
      <DataTable
        caption={t('inspections')}
        rows={run.inspections}
        rowKey={({ inspection }) => inspection}
        empty={<EmptyState title={t('inspectionsEmpty')} />}
        columns={[
          {
            key: 'number',
            title: t('inspections'),
            names: true,
            cell: ({ inspection, number }) => (
              <Link className="font-mono text-accent underline underline-offset-4" href={`/inspections/${inspection}`}>
                {number}
              </Link>
            ),
          },
          { key: 'serial', title: t('serial'), cell: ({ serial }) => <span className="font-mono">{serial}</span> },
          {
            key: 'verdict',
            title: t('verdict'),
            cell: ({ verdict, voided }) =>
              voided ? <span className="font-semibold text-reject">{t('voided')}</span> : <VerdictMark verdict={verdict} />,
          },
        ]}
      />
    </Panel>
  );
}

function Run({ run, mayInspect, renew }: { run: RunAnswer; mayInspect: boolean; renew: (run: RunAnswer) => void }) {
  const t = useMessages('runs');
  const [problem, setProblem] = useState<Problem>();
  const [changed, setChanged] = useState<Changed>();
  const add = async (scan: string) => {
    setProblem(undefined);
    try {
      renew(await sendJson<RunAnswer>(`/api/runs/${run.id}/parts`, { body: { scan } }));
      playTone('added');
    } catch (failure) {
      setProblem(problemOf(failure));
      playTone('unknown');
    }
  };
  useScans({
    onScan: (text) => {
      if (mayInspect) void add(text);
    },
  });
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t(`kinds.${run.kind}`)}
        code={run.number}
        subtitle={[run.technique, run.line].filter((text) => text !== null).join(' · ')}
        actions={
          <>
            <StandingWord standing={run.standing} />
            {mayInspect ? (
              <ChangeValuesDialog
                run={run}
                onChanged={(answer) => {
                  setChanged(answer);
                  renew(answer.run);
                }}
              />
            ) : null}
          </>
        }
      />
      {changed ? (
        <VoidedNotice changed={changed} />
      ) : run.standing === 'void' ? (
        <Notice kind="refusal" title={t('voidRun')} />
      ) : null}
      <Panel title={t('values')} flush>
        <Values run={run} />
      </Panel>
      <Panel title={t('acts')}>
        <ul>
          {run.acts.map((act, place) => (
            <li key={place}>
              {t(`act.${act.kind}`)}: {act.name ?? '–'} {act.at ? <When at={act.at} /> : null}
            </li>
          ))}
        </ul>
      </Panel>
      <Members run={run} problem={problem} onAdd={mayInspect ? (scan) => void add(scan) : undefined} />
      <Leaning run={run} />
      <Panel title={t('history')} flush>
        <History run={run} />
      </Panel>
    </div>
  );
}

/** One run: what was read, how the engine judged it, which parts were in it, and what leans on it. */
export function RunPage({ id, mayInspect }: { id: string; mayInspect: boolean }) {
  const { answer, problem, renew } = useAnswer<RunAnswer>(`/api/runs/${id}`);
  if (!answer) return problem ? <ProblemNotice problem={problem} /> : <Skeleton lines={10} />;
  return <Run run={answer} mayInspect={mayInspect} renew={(run) => void renew(run)} />;
}
