'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { Caution } from '@/components/ui/caution';
import { PageTitle } from '@/components/ui/page-title';
import { Ring } from '@/components/ui/ring';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { InspectionAnswer } from '@/services/contracts/inspections';

const cautions = { radiography: 'xray', penetrant: 'penetrant', airflow: 'pressure' } as const;

/** What can hurt at this operation, beside the fields where it is recorded; nothing where nothing does. */
export function MethodCaution({ method }: { method: string }) {
  const t = useMessages('inspections');
  const own = method in cautions ? cautions[method as keyof typeof cautions] : undefined;
  return own ? <Caution title={t(`caution.title.${own}`)}>{t(`caution.${own}`)}</Caution> : null;
}

/** Which part, which operation, by which technique, and who else has been here. */
export function BenchHead({ answer, me }: { answer: InspectionAnswer; me: { readonly id: string } }) {
  const t = useMessages('inspections');
  const { part, requirement, technique, plan } = answer;
  return (
    <header className="flex flex-wrap items-center gap-x-5 gap-y-0.5 border-b border-line-strong bg-raised px-3 py-1.5">
      <PageTitle title={`${part.serial} ${requirement.operation} ${requirement.title}`} />
      <Ring segments={part.ring} held={part.held} size="small" pixels={32} />
      <h1 className="text-xl font-bold">
        <Link href={`/parts/${part.id}`} className="font-mono underline-offset-4 hover:underline">
          {part.serial}
        </Link>{' '}
        <span className="font-normal">
          {part.partNumber} {part.revision}
        </span>
      </h1>
      {part.held ? <StateWord state="held" /> : null}
      <p className="text-lg font-semibold">
        {requirement.operation} {requirement.title}
      </p>
      {technique ? (
        <p className="text-ink-soft">
          {t('technique', { number: technique.number, issue: technique.issue, standard: technique.standard })}
        </p>
      ) : requirement.technique ? (
        <p className="font-semibold text-reject">{t('noTechnique', { number: requirement.technique })}</p>
      ) : null}
      <p className="text-ink-soft">{t('planIssue', { issue: plan.issue })}</p>
      {plan.state === 'withdrawn-for-error' ? <p className="font-semibold text-reject">{t('planWithdrawn')}</p> : null}
      {answer.repeatReason ? <p className="font-semibold text-unsure">{t(`repeat.${answer.repeatReason}`)}</p> : null}
      {answer.state === 'draft' && answer.changed.id !== me.id ? (
        <p className="font-semibold text-unsure">
          {t('changedBy', { name: answer.changed.name })} <When at={answer.changed.at} />
        </p>
      ) : null}
      {answer.state === 'abandoned' ? <p className="font-semibold text-reject">{t('abandoned')}</p> : null}
    </header>
  );
}
