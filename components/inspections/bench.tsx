'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { useAnswer } from '@/components/theme/use-answer';
import { Caution } from '@/components/ui/caution';
import { ProblemNotice } from '@/components/ui/notice';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { gaugeKindsOf, uncertaintyFor } from '@/services/contracts/judging-input';
import { ActsPanel } from './acts-panel';
import { AttributesPanel } from './attributes-panel';
import { EvidencePanel } from './evidence-panel';
import { IndicationsPanel } from './indications-panel';
import { asked } from './plan-rows';
import { ProcessPanel } from './process-panel';
import { ReadingsPanel } from './readings-panel';
import { SignDialog } from './sign-dialog';
import { useDraft } from './use-draft';
import { VerdictBar } from './verdict-bar';

interface Person {
  readonly id: string;
  readonly name: string;
}

const cautions = { radiography: 'xray', penetrant: 'penetrant', 'ultrasonic-thickness': 'ultrasonic' } as const;

function Cautions({ method }: { method: string }) {
  const t = useMessages('inspections');
  const own = method in cautions ? cautions[method as keyof typeof cautions] : undefined;
  return (
    <>
      {own ? <Caution title={t(`caution.title.${own}`)}>{t(`caution.${own}`)}</Caution> : null}
      <p className="text-sm text-ink-soft">{t('caution.acceptance')}</p>
    </>
  );
}

function Head({ answer }: { answer: InspectionAnswer }) {
  const t = useMessages('inspections');
  const { part, requirement, technique } = answer;
  return (
    <header className="flex flex-wrap items-center gap-x-6 gap-y-1 border-b border-line-strong bg-raised px-4 py-2">
      <Ring segments={part.ring} held={part.held} size="small" pixels={28} />
      <h1 className="text-xl font-bold">
        <Link href={`/parts/${part.id}`} className="font-mono">
          {part.serial}
        </Link>{' '}
        <span className="font-normal">
          {part.partNumber} {part.revision}
        </span>
      </h1>
      <p className="text-lg font-semibold">
        {requirement.operation} {requirement.title}
      </p>
      {technique ? (
        <p className="text-ink-soft">
          {t('technique', { number: technique.number, issue: technique.issue, standard: technique.standard })}
        </p>
      ) : null}
    </header>
  );
}

function Bench({ answer, me, maySign, renew }: { answer: InspectionAnswer; me: Person; maySign: boolean; renew: () => void }) {
  const t = useMessages('inspections');
  const draft = useDraft(answer);
  const readOnly = answer.state !== 'draft' || !maySign;
  const rows = asked(answer);
  const pictured = rows.hasRules || answer.requirement.evidence.length > 0;
  const source = { uncertainties: answer.uncertainties, gaugeKinds: gaugeKindsOf(draft.content, answer.equipment) };
  return (
    <div data-density="capture" className="flex h-[calc(100vh-5rem)] flex-col">
      <Head answer={answer} />
      <div className={`grid min-h-0 flex-1 gap-4 p-4 ${pictured ? 'lg:grid-cols-[minmax(0,3fr)_minmax(24rem,2fr)]' : ''}`}>
        {pictured ? (
          <EvidencePanel draft={draft} answer={answer} zones={rows.zones} readOnly={readOnly} onAttached={renew} />
        ) : null}
        <div
          tabIndex={0}
          role="region"
          aria-label={answer.requirement.title}
          className="flex min-h-0 flex-col gap-4 overflow-y-auto"
        >
          <Cautions method={answer.requirement.method} />
          {answer.signed ? <p className="font-semibold">{t('signedAs', { number: answer.signed.number })}</p> : null}
          {rows.process.length > 0 ? <ProcessPanel draft={draft} rows={rows.process} readOnly={readOnly} /> : null}
          {rows.hasRules ? <IndicationsPanel draft={draft} zones={rows.zones} readOnly={readOnly} /> : null}
          {rows.characteristics.length > 0 ? (
            <ReadingsPanel
              draft={draft}
              rows={rows.characteristics}
              readOnly={readOnly}
              uncertaintyOf={(number) => uncertaintyFor(number, source)?.expanded}
            />
          ) : null}
          {rows.attributes.length > 0 ? <AttributesPanel draft={draft} rows={rows.attributes} readOnly={readOnly} /> : null}
          <ActsPanel draft={draft} answer={answer} me={me} readOnly={readOnly} />
        </div>
      </div>
      <VerdictBar draft={draft}>
        {answer.state === 'draft' && maySign ? <SignDialog draft={draft} answer={answer} me={me} onSigned={renew} /> : null}
      </VerdictBar>
    </div>
  );
}

/** The bench: where an inspection of one requirement of one part is made, and where a signed one is read. */
export function BenchPage({ id, me, maySign }: { id: string; me: Person; maySign: boolean }) {
  const { answer, problem, renew } = useAnswer<InspectionAnswer>(`/api/inspections/${id}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={10} />;
  return <Bench key={answer.id} answer={answer} me={me} maySign={maySign} renew={() => void renew()} />;
}
