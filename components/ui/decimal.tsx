'use client';

import { useWorkstation } from '@/components/theme/workstation';

export interface DecimalProps {
  /** The exact decimal as recorded: '0.10' stays '0.10'. Null is shown as a dash: missing is not zero. */
  value: string | null;
  unit?: string;
  /** Digits kept free after the separator, so that a column aligns on it. */
  places?: number;
  sign?: boolean;
}

/** A recorded decimal with the separator of the language; no digit is added or lost. */
export function Decimal({ value, unit, places, sign = false }: DecimalProps) {
  const { locale } = useWorkstation();
  if (value === null) return <span className="text-ink-soft">–</span>;
  const [whole = '', fraction = ''] = value.replace(/^-/, '').split('.');
  const lead = value.startsWith('-') ? '−' : sign ? '+' : '';
  const tail = fraction === '' ? '' : `${locale === 'fr' ? ',' : '.'}${fraction}`;
  const width = places === undefined ? undefined : { minWidth: `${places === 0 ? 0 : places + 1}ch` };
  return (
    <span className="font-mono whitespace-nowrap">
      {lead}
      {whole}
      <span className="inline-block text-left" style={width}>
        {tail}
      </span>
      {unit !== undefined && <span className="ml-1 font-sans text-ink-soft">{unit}</span>}
    </span>
  );
}
