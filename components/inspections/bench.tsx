'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { Skeleton } from '@/components/ui/skeleton';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { BenchFields } from './bench-fields';
import { BenchHead, MethodCaution } from './bench-head';
import type { ServedDraft } from './draft-keeper';
import { EvidencePanel } from './evidence-panel';
import { usualTypes } from './indication-words';
import { missingEntries } from './missing-entries';
import { asked } from './plan-rows';
import { SignDialog } from './sign-dialog';
import { SignedPanel } from './signed-panel';
import { TwoVersions } from './two-versions';
import { useDraft } from './use-draft';
import { useEvidence } from './use-evidence';
import { VerdictBar } from './verdict-bar';

interface Person {
  readonly id: string;
  readonly name: string;
}

interface BenchProps {
  readonly answer: InspectionAnswer;
  readonly me: Person;
  readonly maySign: boolean;
  readonly renew: (answer?: InspectionAnswer) => Promise<unknown>;
}

// Somebody else at the same draft is seen within this time, also when nothing is saved here.
const lookAgainMs = 15_000;

function Bench({ answer, me, maySign, renew }: BenchProps) {
  const t = useMessages('inspections');
  const writable = answer.state === 'draft' && maySign;
  const draft = useDraft(answer, me.id, writable, (saved) => void renew(saved));
  const evidence = useEvidence(answer, draft, renew);
  const [selectedId, select] = useState<string | null>(null);
  const [putAside, setPutAside] = useState<ServedDraft | null>(null);
  const rows = asked(answer);
  const types = [...new Set([...usualTypes, ...rows.ruledTypes])];
  const [nextType, setNextType] = useState(types[0] ?? 'gas-pore');
  const missing = writable ? missingEntries({ ...answer, content: draft.content, judgement: draft.judgement }) : [];
  const common = { draft, answer, rows, selectedId, onSelect: select, readOnly: !writable };
  const { theirs } = draft;
  const columns = rows.hasRules ? 'lg:grid-cols-[minmax(0,5fr)_minmax(25rem,3fr)]' : 'lg:grid-cols-[minmax(0,2fr)_minmax(0,3fr)]';
  return (
    <div data-density="capture" className="flex h-[calc(100dvh-5rem)] min-h-0 flex-col">
      <BenchHead answer={answer} me={me} />
      <div className={`relative grid min-h-0 flex-1 gap-3 overflow-y-auto py-2 lg:grid-rows-1 lg:overflow-hidden ${columns}`}>
        <EvidencePanel {...common} evidence={evidence} nextType={nextType} />
        <div className="flex min-h-0 min-w-0 flex-col gap-2">
          <MethodCaution method={answer.requirement.method} />
          <div
            tabIndex={0}
            role="region"
            aria-label={t('asked', { title: answer.requirement.title })}
            className="relative flex min-h-0 flex-1 flex-col gap-3 lg:overflow-y-auto"
          >
            <SignedPanel answer={answer} mayInspect={maySign} />
            {draft.restored ? <Notice title={t('restored')} /> : null}
            <BenchFields
              {...common}
              types={types}
              nextType={writable && evidence.shown ? nextType : undefined}
              onNextType={setNextType}
              me={me}
              onReadingsFile={(file) => evidence.uploads.add([file], 'reading-file')}
            />
          </div>
        </div>
      </div>
      <VerdictBar judgement={draft.judgement} missing={missing} {...(writable ? { saved: draft.saved } : {})}>
        {theirs ? <Button onClick={() => setPutAside(null)}>{t('compare')}</Button> : null}
        {writable ? <SignDialog draft={draft} answer={answer} me={me} missing={missing} onSigned={renew} /> : null}
      </VerdictBar>
      <TwoVersions draft={draft} open={theirs !== null && theirs !== putAside} onClose={() => setPutAside(theirs)} />
    </div>
  );
}

/** The bench: where an inspection of one requirement of one part is made, and where a signed one is read. */
export function BenchPage({ id, me, maySign }: { id: string; me: Person; maySign: boolean }) {
  const url = `/api/inspections/${id}`;
  const { answer, problem, renew } = useAnswer<InspectionAnswer>(url, lookAgainMs);
  // The new answer is read before the old one goes: the bench stays as it is meanwhile, with its uploads and its focus.
  const readAgain = async (known?: InspectionAnswer) =>
    renew(known ?? (await sendJson<InspectionAnswer>(url, { method: 'GET' })));
  // A lost network must not take the bench away: what was read stays, and what is typed is kept.
  if (!answer) return problem ? <ProblemNotice problem={problem} /> : <Skeleton lines={10} />;
  return <Bench key={answer.id} answer={answer} me={me} maySign={maySign} renew={readAgain} />;
}
