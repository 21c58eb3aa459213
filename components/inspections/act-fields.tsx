'use client';

import { useMessages } from '@/components/theme/use-messages';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { ActEquipment } from './act-equipment';
import { ActValues } from './act-values';
import { ChoiceField } from './choice-field';
import { TimeField } from './time-field';

type Act = InspectionContent['acts'][number];

export interface ActFieldsProps {
  readonly kind: Act['kind'];
  readonly act: Act | undefined;
  readonly needsEquipment: boolean;
  readonly answer: InspectionAnswer;
  readonly readOnly: boolean;
  /** Begins the act with me and now, or takes it back. */
  readonly onDone: (done: boolean) => void;
  readonly onChange: (next: Partial<Act>) => void;
}

/** Who and when: the person is the one at the bench unless said otherwise, the time is the plant's. */
function WhoWhen({ act, title, answer, readOnly, onChange }: ActFieldsProps & { act: Act; title: string }) {
  const t = useMessages('inspections');
  const person = answer.people.find(({ id }) => id === act.person);
  const people = answer.people.map(({ id, name, counts }) => ({ value: id, text: counts ? name : t('notCounting', { name }) }));
  return (
    <div className="flex flex-wrap items-end gap-x-3 gap-y-1">
      <ChoiceField
        label={t('person', { act: title })}
        disabled={readOnly}
        value={act.person ?? ''}
        onChoose={(id) => onChange({ person: id })}
        options={person ? people : [{ value: act.person ?? '', text: '–' }, ...people]}
      />
      <TimeField
        label={t('time', { act: title })}
        at={act.at}
        readOnly={readOnly}
        wrong={t('timeForm')}
        onChange={(at) => onChange({ at })}
      />
      {person && !person.counts ? (
        <p className="w-full text-sm font-semibold text-unsure">{t('whyNotCounting', { why: person.why ?? '' })}</p>
      ) : null}
    </div>
  );
}

/** One act: done or not, who, when, with which equipment, and what was set or read. */
export function ActFields(props: ActFieldsProps) {
  const { kind, act, needsEquipment, answer, readOnly, onDone, onChange } = props;
  const t = useMessages('inspections');
  const title = t(`act.${kind}`);
  return (
    <fieldset disabled={readOnly} className="mb-2 flex min-w-0 flex-col gap-1 border-b border-line pb-2 last:border-b-0">
      <legend className="float-left w-full font-semibold">
        <label className="flex min-h-12 items-center gap-2">
          <input
            id={`act-${kind}`}
            type="checkbox"
            className="size-5"
            checked={act !== undefined}
            onChange={(event) => onDone(event.target.checked)}
          />
          {title}
        </label>
      </legend>
      <ActValues
        kind={kind}
        title={title}
        act={act}
        requirement={answer.requirement}
        readOnly={readOnly}
        onValue={(name, text) => onChange({ values: { ...act?.values, [name]: text } })}
      />
      {needsEquipment ? (
        <ActEquipment
          id={`act-${kind}-equipment`}
          act={title}
          choices={answer.equipment}
          chosen={act?.equipment ?? []}
          readOnly={readOnly}
          onChoose={(equipment) => onChange({ equipment })}
        />
      ) : null}
      {act ? <WhoWhen {...props} act={act} title={title} /> : null}
    </fieldset>
  );
}
