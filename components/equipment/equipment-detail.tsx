'use client';

import { useState } from 'react';
import { SuspectListsTable } from '@/components/suspects/suspect-lists-table';
import { useAnswer } from '@/components/theme/use-answer';
import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { DefinitionList } from '@/components/ui/definition-list';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { Equipment } from '@/services/contracts/equipment';
import { CalibrationForm, type CalibrationAnswer } from './calibration-form';
import { CalibrationsPanel } from './calibrations-panel';
import { EquipmentState } from './equipment-state';
import { RetireForm } from './retire-form';

function Facts({ equipment }: { equipment: Equipment }) {
  const t = useMessages('equipment');
  const methodWords = useMethodWords();
  const { state, dueOn, method, kind, location, inspections, retired } = equipment;
  return (
    <Panel title={t('facts')}>
      <DefinitionList
        columns={2}
        items={[
          { term: t('state'), value: <EquipmentState state={state} /> },
          { term: t('due'), value: <When at={dueOn} /> },
          { term: t('method'), value: methodWords(method) },
          { term: t('kind'), value: <span className="font-mono">{kind}</span> },
          { term: t('location'), value: location ?? '–' },
          { term: t('used'), value: inspections },
          ...(retired
            ? [
                {
                  term: t('retiredBy'),
                  value: (
                    <>
                      <When at={retired.at} /> {retired.by?.name}: {retired.reason}
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

/** What a calibration just recorded came to: nothing, or a suspect list that holds parts. */
function Outcome({ answer: { equipment, suspects } }: { answer: CalibrationAnswer }) {
  const t = useMessages('equipment');
  const newest = equipment.calibrations[0];
  if (!suspects) return <Notice kind="done" title={newest?.asFound === 'failed' ? t('doneNothing') : t('done')} />;
  const { id, number, inspections, held, recall } = suspects;
  return (
    <Notice
      kind="held"
      title={t('doneList', { number, count: inspections, held, recall })}
      actions={<LinkButton href={`/suspects/${id}`}>{t('openList')}</LinkButton>}
    />
  );
}

/** One piece of equipment: whether it counts, its calibrations, and what it made suspect. */
export function EquipmentDetail({ id, mayKeep }: { id: string; mayKeep: boolean }) {
  const t = useMessages('equipment');
  const { answer: equipment, problem, renew } = useAnswer<Equipment>(`/api/equipment/${id}`);
  const [open, setOpen] = useState<'record' | 'retire'>();
  const [outcome, setOutcome] = useState<CalibrationAnswer>();
  if (problem) return <ProblemNotice problem={problem} />;
  if (!equipment) return <Skeleton lines={8} />;
  const keeps = mayKeep && equipment.retired === null;
  const recorded = (answer: CalibrationAnswer) => {
    setOutcome(answer);
    setOpen(undefined);
    void renew(answer.equipment);
  };
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={equipment.title}
        code={equipment.number}
        actions={
          keeps ? (
            <>
              <Button onClick={() => setOpen('retire')}>{t('retire')}</Button>
              <Button kind="primary" onClick={() => setOpen('record')}>
                {t('record')}
              </Button>
            </>
          ) : undefined
        }
      />
      {outcome ? <Outcome answer={outcome} /> : null}
      <Facts equipment={equipment} />
      <CalibrationsPanel calibrations={equipment.calibrations} />
      <Panel title={t('suspects')} flush>
        <SuspectListsTable query={`equipment=${id}`} key={outcome?.calibration ?? ''} />
      </Panel>
      <Dialog
        open={open !== undefined}
        onClose={() => setOpen(undefined)}
        title={open === 'retire' ? t('retireTitle', { number: equipment.number }) : t('record')}
      >
        {open === 'retire' ? (
          <RetireForm
            equipment={equipment}
            onRetired={(answer) => {
              setOpen(undefined);
              void renew(answer);
            }}
          />
        ) : (
          <CalibrationForm equipment={equipment} onRecorded={recorded} />
        )}
      </Dialog>
    </div>
  );
}
