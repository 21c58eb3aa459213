'use client';

import { useId } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import { bandScale } from './band-scale';
import type { Band } from './band-scale';
import type { Verdict } from './verdict-mark';

export interface BandLineProps extends Band {
  unit: string;
  verdict?: Verdict;
}

const inks: Record<Verdict, string> = {
  accept: 'text-accept',
  reject: 'text-reject',
  indeterminate: 'text-unsure',
  'not-evaluable': 'text-ink-soft',
};

const width = 240;
const x = (share: number) => 8 + share * (width - 16);

/** A reading on its gauge line: limits as posts, the guard band hatched, the value with its uncertainty whisker. */
export function BandLine({ unit, verdict, ...band }: BandLineProps) {
  const t = useMessages('ui');
  const { locale } = useWorkstation();
  const hatch = useId();
  const scale = bandScale(band);
  const local = (text: string) => (locale === 'fr' ? text.replace('.', ',') : text);
  const said = [
    band.value === undefined ? t('band.noValue') : t('band.value', { value: local(band.value), unit }),
    band.lower === undefined ? '' : t('band.lower', { value: local(band.lower), unit }),
    band.upper === undefined ? '' : t('band.upper', { value: local(band.upper), unit }),
    band.guardBand === undefined ? '' : t('band.guard', { value: local(band.guardBand), unit }),
    band.uncertainty === undefined ? '' : t('band.uncertainty', { value: local(band.uncertainty), unit }),
    verdict === undefined ? '' : t(`verdict.${verdict}`),
  ].filter((text) => text !== '');
  const from = x(scale.lower ?? 0);
  const to = x(scale.upper ?? 1);
  return (
    <svg viewBox={`0 0 ${width} 28`} role="img" aria-label={said.join(', ')} className="h-7 w-60 max-w-full">
      <pattern id={hatch} width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <rect width="1.6" height="4" className="fill-unsure" />
      </pattern>
      <path d={`M8 14H${width - 8}`} className="stroke-line-strong" strokeWidth="1" />
      <rect
        x={from}
        y="10"
        width={Math.max(0, to - from)}
        height="8"
        className="fill-accept-wash stroke-line-strong"
        strokeWidth="1"
      />
      {scale.guardLower !== undefined && (
        <rect x={from} y="10" width={Math.max(0, x(scale.guardLower) - from)} height="8" fill={`url(#${hatch})`} />
      )}
      {scale.guardUpper !== undefined && (
        <rect x={x(scale.guardUpper)} y="10" width={Math.max(0, to - x(scale.guardUpper))} height="8" fill={`url(#${hatch})`} />
      )}
      {scale.nominal !== undefined && (
        <path d={`M${x(scale.nominal)} 10v8`} className="stroke-line-strong" strokeWidth="1" strokeDasharray="2 2" />
      )}
      {scale.lower !== undefined && (
        <path d={`M${from} 4v20m0-20h4m-4 20h4`} fill="none" className="stroke-ink" strokeWidth="2" />
      )}
      {scale.upper !== undefined && <path d={`M${to} 4v20m0-20h-4m4 20h-4`} fill="none" className="stroke-ink" strokeWidth="2" />}
      {scale.value !== undefined && (
        <g className={verdict === undefined ? 'text-ink' : inks[verdict]}>
          {scale.whisker && (
            <path
              d={`M${x(scale.whisker[0])} 14H${x(scale.whisker[1])}M${x(scale.whisker[0])} 10v8M${x(scale.whisker[1])} 10v8`}
              fill="none"
              stroke="currentColor"
              strokeWidth="2"
            />
          )}
          <ValueShape at={x(scale.value)} verdict={verdict} beyond={scale.beyond} />
        </g>
      )}
    </svg>
  );
}

/** The value: a pointer at the edge when beyond the line, else the shape of its verdict (disc, cross, split diamond). */
function ValueShape({
  at,
  verdict,
  beyond,
}: {
  at: number;
  verdict: Verdict | undefined;
  beyond: 'below' | 'above' | undefined;
}) {
  if (beyond === 'above') return <path d={`M${at - 4} 6l9 8-9 8z`} fill="currentColor" />;
  if (beyond === 'below') return <path d={`M${at + 4} 6l-9 8 9 8z`} fill="currentColor" />;
  if (verdict === 'reject') return <path d={`M${at - 5} 9l10 10m0-10l-10 10`} stroke="currentColor" strokeWidth="3" />;
  if (verdict === 'indeterminate') {
    return (
      <>
        <path d={`M${at} 7l7 7-7 7-7-7z`} className="fill-raised" stroke="currentColor" strokeWidth="1.8" />
        <path d={`M${at} 7v14l-7-7z`} fill="currentColor" />
      </>
    );
  }
  return <circle cx={at} cy="14" r="5" fill="currentColor" className="stroke-raised" strokeWidth="1" />;
}
