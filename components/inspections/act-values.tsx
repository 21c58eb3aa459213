'use client';

import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { stepWithin } from '@/services/contracts/block-check';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { PlanRequirement } from '@/services/contracts/plan-content';
import { goOn } from './go-on';

type Act = InspectionContent['acts'][number];

/** Facts of an exposure, as they go into the act's values. */
const exposureFields = ['kV', 'mA', 'exposureS', 'distanceMm', 'indicatorSeen'] as const;

interface ValueFieldProps {
  readonly id: string;
  readonly label: string;
  readonly value: string;
  readonly readOnly: boolean;
  readonly isText?: boolean;
  readonly onType: (text: string) => void;
}

function ValueField({ id, label, value, readOnly, isText = false, onType }: ValueFieldProps) {
  const exact = isText ? undefined : decimalFrom(value);
  return (
    <label className="flex flex-col gap-0.5">
      <span>{label}</span>
      <input
        id={id}
        data-next=""
        className={`field max-w-32 font-mono tabular-nums ${isText ? '' : 'text-right'}`}
        inputMode={isText ? 'text' : 'decimal'}
        autoComplete="off"
        maxLength={200}
        readOnly={readOnly}
        value={value}
        onChange={(event) => onType(event.target.value)}
        onBlur={() => {
          if (!readOnly && exact !== undefined && exact !== value) onType(exact);
        }}
        onKeyDown={goOn}
      />
    </label>
  );
}

export interface ActValuesProps {
  readonly kind: Act['kind'];
  /** What the act is called. */
  readonly title: string;
  readonly act: Act | undefined;
  readonly requirement: Pick<PlanRequirement, 'blockCheck' | 'indicator'>;
  readonly readOnly: boolean;
  readonly onValue: (name: string, text: string) => void;
}

/** Block readings with their tolerance, or the facts of an exposure; nothing for an act that has neither. */
export function ActValues({ kind, title, act, requirement, readOnly, onValue }: ActValuesProps) {
  const t = useMessages('inspections');
  const valueOf = (name: string) => act?.values[name] ?? '';
  if (kind.startsWith('block-check') && requirement.blockCheck) {
    const { unit, steps } = requirement.blockCheck;
    return (
      <div className="flex flex-wrap gap-x-4 gap-y-1">
        {steps.map(({ nominal, tolerance }) => {
          const within = stepWithin(valueOf(nominal).trim(), nominal, tolerance);
          return (
            <div key={nominal} className="flex flex-col">
              <ValueField
                id={`act-${kind}-${nominal}`}
                label={t('step', { nominal, act: title })}
                value={valueOf(nominal)}
                readOnly={readOnly}
                onType={(text) => onValue(nominal, text)}
              />
              <span className="flex items-center gap-2 text-sm">
                {t('stepTolerance', { tolerance, unit })}
                {within === null ? null : <VerdictMark verdict={within ? 'accept' : 'reject'} />}
              </span>
            </div>
          );
        })}
      </div>
    );
  }
  if (kind !== 'exposed') return null;
  const required = requirement.indicator?.required;
  return (
    <div className="flex flex-wrap gap-x-4 gap-y-1">
      {exposureFields
        .filter((name) => name !== 'indicatorSeen' || required !== undefined)
        .map((name) => (
          <ValueField
            key={name}
            id={`act-${kind}-${name}`}
            label={t(`exposure.${name}`, { required: required ?? '' })}
            value={valueOf(name)}
            isText={name === 'indicatorSeen'}
            readOnly={readOnly}
            onType={(text) => onValue(name, text)}
          />
        ))}
    </div>
  );
}
