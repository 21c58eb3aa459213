'use client';

import type { InspectionAnswer } from '@/services/contracts/inspections';
import { gaugeKindsOf, uncertaintyFor } from '@/services/contracts/judging-input';
import { ActsPanel } from './acts-panel';
import { AttributesPanel } from './attributes-panel';
import { IndicationsPanel } from './indications-panel';
import type { Asked } from './plan-rows';
import { ProcessPanel } from './process-panel';
import { ReadingsPanel } from './readings-panel';
import type { Draft } from './use-draft';

export interface BenchFieldsProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly rows: Asked;
  readonly types: readonly string[];
  /** What the next mark on a picture is taken for; absent without a picture. */
  readonly nextType: string | undefined;
  readonly onNextType: (type: string) => void;
  readonly me: { readonly id: string };
  readonly selectedId: string | null;
  readonly onSelect: (id: string | null) => void;
  readonly onReadingsFile: (file: File) => void;
  readonly readOnly: boolean;
}

/** Right of the bench: what this operation asks, and nothing that it does not ask. */
export function BenchFields(props: BenchFieldsProps) {
  const { draft, answer, rows, types, nextType, onNextType, me, selectedId, onSelect, onReadingsFile, readOnly } = props;
  const source = { uncertainties: answer.uncertainties, gaugeKinds: gaugeKindsOf(draft.content, answer.equipment) };
  const unit = typeof answer.criteria.lengthUnit === 'string' ? answer.criteria.lengthUnit : 'mm';
  return (
    <>
      {rows.process.length > 0 ? <ProcessPanel draft={draft} rows={rows.process} readOnly={readOnly} /> : null}
      {rows.hasRules ? (
        <IndicationsPanel
          draft={draft}
          zones={rows.zones}
          types={types}
          unit={unit}
          {...(nextType === undefined ? {} : { nextType })}
          onNextType={onNextType}
          selectedId={selectedId}
          onSelect={onSelect}
          readOnly={readOnly}
        />
      ) : null}
      {rows.characteristics.length > 0 ? (
        <ReadingsPanel
          draft={draft}
          rows={rows.characteristics}
          readOnly={readOnly}
          uncertaintyOf={(number) => uncertaintyFor(number, source)?.expanded}
          onFile={onReadingsFile}
        />
      ) : null}
      {rows.attributes.length > 0 ? <AttributesPanel draft={draft} rows={rows.attributes} readOnly={readOnly} /> : null}
      <ActsPanel draft={draft} answer={answer} me={me} readOnly={readOnly} />
    </>
  );
}
