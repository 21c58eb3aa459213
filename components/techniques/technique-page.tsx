'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { MethodCaution } from '@/components/inspections/bench-head';
import { useMethodWords } from '@/components/personnel/method-words';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { DefinitionList } from '@/components/ui/definition-list';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { Technique } from '@/services/contracts/techniques';
import { MeasurementProcesses } from './measurement-processes';
import { TechniqueContentView } from './technique-content';
import { TechniqueDecision, type Decided } from './technique-decision';
import { TechniqueForm } from './technique-form';
import { TechniqueState } from './technique-state';

export interface TechniqueReader {
  readonly id: string;
  readonly name: string;
  readonly mayWrite: boolean;
  readonly mayApprove: boolean;
  readonly mayRecord: boolean;
}

type Opened = 'edit' | 'next' | 'approve' | 'withdraw';

function Course({ technique }: { technique: Technique }) {
  const t = useMessages('techniques');
  const methodWords = useMethodWords();
  const by = (person: Technique['author']) =>
    person ? (
      <>
        {person.name}, <When at={person.at} />
      </>
    ) : (
      '–'
    );
  const { state, method, standard, customerApproval, author, checked, approved, ended, endedReason } = technique;
  return (
    <Panel title={t('history')}>
      <DefinitionList
        columns={2}
        items={[
          { term: t('state'), value: <TechniqueState state={state} /> },
          { term: t('method'), value: methodWords(method) },
          { term: t('standard'), value: standard },
          { term: t('customerApproval'), value: customerApproval ?? '–' },
          { term: t('author'), value: by(author) },
          { term: t('checkedBy'), value: by(checked) },
          { term: t('approvedBy'), value: by(approved) },
          ...(ended
            ? [
                {
                  term: t('endedBy'),
                  value: (
                    <>
                      {by(ended)} {endedReason}
                    </>
                  ),
                },
              ]
            : []),
        ]}
      />
    </Panel>
  );
}

function Faults({ technique: { faults } }: { technique: Technique }) {
  const t = useMessages('techniques');
  if (faults.length === 0) return null;
  return (
    <Notice kind="unsure" title={t('faults')}>
      <ul className="list-disc pl-5">
        {faults.map(({ path, message }) => (
          <li key={path}>
            <span className="font-mono">{path.replace('content.', '')}</span> {message}
          </li>
        ))}
      </ul>
    </Notice>
  );
}

/** The moves this reader can make from here; the server has the last word. */
function Moves({
  technique,
  reader,
  onOpen,
  onCheck,
}: {
  technique: Technique;
  reader: TechniqueReader;
  onOpen: (what: Opened) => void;
  onCheck: () => void;
}) {
  const t = useMessages('techniques');
  const { state, hands, faults } = technique;
  const wrote = hands.includes(reader.id);
  return (
    <>
      {reader.mayWrite && state === 'draft' ? <Button onClick={() => onOpen('edit')}>{t('edit')}</Button> : null}
      {reader.mayWrite && state === 'approved' ? <Button onClick={() => onOpen('next')}>{t('next')}</Button> : null}
      {reader.mayApprove && (state === 'approved' || state === 'checked') ? (
        <Button kind="danger" onClick={() => onOpen('withdraw')}>
          {t('withdraw')}
        </Button>
      ) : null}
      {reader.mayApprove && state === 'draft' && !wrote ? (
        <Button kind="primary" disabled={faults.length > 0} onClick={onCheck}>
          {t('markChecked')}
        </Button>
      ) : null}
      {reader.mayApprove && state === 'checked' && !wrote ? (
        <Button kind="primary" onClick={() => onOpen('approve')}>
          {t('approve')}
        </Button>
      ) : null}
    </>
  );
}

/** One technique issue: what it says, its course, and the moves from here. */
export function TechniquePage({ id, reader }: { id: string; reader: TechniqueReader }) {
  const t = useMessages('techniques');
  const router = useRouter();
  const { answer: technique, problem, renew } = useAnswer<Technique>(`/api/techniques/${id}`);
  const [open, setOpen] = useState<Opened>();
  const [refused, setRefused] = useState<Problem>();
  const [suspects, setSuspects] = useState<{ id: string; number: string }>();
  if (problem) return <ProblemNotice problem={problem} />;
  if (!technique) return <Skeleton lines={8} />;
  const done = (answer: Decided) => {
    setOpen(undefined);
    setSuspects(answer.suspects ?? undefined);
    if (answer.id === id) void renew(answer);
    else router.push(`/techniques/${answer.id}`);
  };
  const check = () => {
    setRefused(undefined);
    sendJson<Technique>(`/api/techniques/${id}/check`, { body: {} }).then(done, (failure: unknown) =>
      setRefused(problemOf(failure)),
    );
  };
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={technique.title}
        code={technique.number}
        subtitle={t('issueOf', { issue: technique.issue })}
        actions={<Moves technique={technique} reader={reader} onOpen={setOpen} onCheck={check} />}
      />
      {refused ? <ProblemNotice problem={refused} /> : null}
      {suspects ? (
        <Notice
          kind="held"
          title={t('withdrawnList', { number: suspects.number })}
          actions={<LinkButton href={`/suspects/${suspects.id}`}>{t('openList')}</LinkButton>}
        />
      ) : null}
      <MethodCaution method={technique.method} />
      <Faults technique={technique} />
      <Course technique={technique} />
      <TechniqueContentView content={technique.content} />
      <MeasurementProcesses technique={technique.number} mayRecord={reader.mayRecord} />
      <Dialog
        open={open !== undefined}
        onClose={() => setOpen(undefined)}
        title={t(open ?? 'edit')}
        width={open === 'edit' || open === 'next' ? 'wide' : 'normal'}
      >
        {open === 'approve' || open === 'withdraw' ? (
          <TechniqueDecision kind={open} technique={technique} me={reader.name} onDone={done} />
        ) : (
          <TechniqueForm from={technique} draft={open === 'edit' ? technique : undefined} onSaved={done} />
        )}
      </Dialog>
    </div>
  );
}
