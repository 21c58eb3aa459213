'use client';

import { useState } from 'react';
import { AttachedFiles } from '@/components/evidence/attached-files';
import { AttachField } from '@/components/evidence/attach-field';
import { PartOutline } from '@/components/evidence/part-outline';
import { UploadList } from '@/components/evidence/upload-list';
import { useMessages } from '@/components/theme/use-messages';
import { ProblemNotice } from '@/components/ui/notice';
import type { EvidenceRole } from '@/services/contracts/evidence';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { ChoiceField } from './choice-field';
import { MarkedPicture } from './marked-picture';
import type { Asked } from './plan-rows';
import type { Draft } from './use-draft';
import type { Evidence } from './use-evidence';

export interface EvidencePanelProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly evidence: Evidence;
  readonly rows: Asked;
  /** What a new mark is taken for. */
  readonly nextType: string;
  readonly selectedId: string | null;
  readonly onSelect: (id: string | null) => void;
  readonly readOnly: boolean;
}

function usualRole({ requirement }: InspectionAnswer): EvidenceRole {
  if (requirement.evidence[0]) return requirement.evidence[0].role;
  if (requirement.method === 'radiography') return 'radiograph';
  return requirement.characteristics.length > 0 ? 'reading-file' : 'photograph';
}

/** The part's own view where there is no picture, with what was entered counted in its zones. */
function NoPicture({ answer, draft, evidence, rows, readOnly }: EvidencePanelProps) {
  const t = useMessages('evidence');
  const view = answer.views.find(({ name }) => name === evidence.view) ?? answer.views[0];
  const counts: Record<string, number> = {};
  for (const { zones } of draft.judgement.evaluation?.indications ?? []) {
    for (const zone of zones) counts[zone] = (counts[zone] ?? 0) + 1;
  }
  return (
    <div className="flex size-full flex-col">
      {readOnly || !rows.hasRules ? null : <p className="px-3 py-2 text-ink-soft">{t('noPicture')}</p>}
      {view ? (
        <div className="min-h-0 flex-1">
          <PartOutline view={view} zones={rows.zones.filter((zone) => zone.view === view.name)} counts={counts} />
        </div>
      ) : null}
    </div>
  );
}

/** Left of the bench: the picture on show with its marks, or the part's view; what is attached and what is on its way. */
export function EvidencePanel(props: EvidencePanelProps) {
  const { draft, answer, evidence, rows, nextType, selectedId, onSelect, readOnly } = props;
  const t = useMessages('evidence');
  const { shown, uploads } = evidence;
  const views = answer.views.filter(
    ({ name }) => answer.requirement.views.length === 0 || answer.requirement.views.includes(name),
  );
  const marking = rows.hasRules && !readOnly;
  const [marked, setMarked] = useState<string>();
  const onDetach = (file: InspectionAnswer['evidence'][number]) => {
    const isMarked = draft.content.indications.some((one) => one.evidence === file.id);
    setMarked(isMarked ? file.name : undefined);
    if (!isMarked) evidence.detach(file);
  };
  return (
    <section aria-label={t('attached')} className="flex min-h-0 min-w-0 flex-col gap-2">
      <div className="flex flex-wrap items-center gap-2">
        {readOnly ? null : (
          <AttachField
            usualRole={usualRole(answer)}
            // With a picture on show its own view is corrected beside it; the next file shows the next view that lacks one.
            views={shown ? [] : views}
            view={evidence.view}
            onView={evidence.chooseView}
            onFiles={uploads.add}
          />
        )}
        <AttachedFiles
          files={answer.evidence}
          shownId={shown?.id ?? null}
          readOnly={readOnly}
          onShow={evidence.show}
          onDetach={onDetach}
        />
        {shown && marking && views.length > 1 ? (
          <ChoiceField
            label={t('viewOf', { name: shown.name })}
            hideLabel
            value={shown.view ?? ''}
            options={views.map(({ name, title }) => ({ value: name, text: title }))}
            onChoose={(view) => evidence.relink(shown, { view })}
          />
        ) : null}
      </div>
      <UploadList uploads={uploads} />
      {marked === undefined ? null : (
        <p role="alert" className="font-semibold text-reject">
          {t('detachMarked', { name: marked })}
        </p>
      )}
      {evidence.problem ? <ProblemNotice problem={evidence.problem} /> : null}
      <div className="relative min-h-60 flex-1 border border-line bg-raised">
        {shown ? (
          <MarkedPicture
            draft={draft}
            file={shown}
            zones={rows.zones}
            nextType={nextType}
            selectedId={selectedId}
            onSelect={onSelect}
            onPitch={(pitchUm) => evidence.relink(shown, { pitchUm })}
            readOnly={readOnly || !rows.hasRules}
          />
        ) : (
          <NoPicture {...props} />
        )}
      </div>
    </section>
  );
}
