'use client';

import { useId } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import type { InspectionAnswer } from '@/services/contracts/inspections';

export interface OutlineZone {
  readonly id: string;
  readonly polygon: readonly (readonly [number, number])[];
}

export interface PartOutlineProps {
  readonly view: InspectionAnswer['views'][number];
  readonly zones: readonly OutlineZone[];
  /** How many indications lie in a zone, by its id. */
  readonly counts: Readonly<Record<string, number>>;
}

function path(points: readonly (readonly [number, number])[], heightUm: number): string {
  // The plan counts upwards, a drawing on a screen downwards.
  return `M${points.map(([x, y]) => `${String(x)} ${String(heightUm - y)}`).join('L')}Z`;
}

function middle(points: readonly (readonly [number, number])[], heightUm: number): readonly [number, number] {
  const xs = points.map(([x]) => x);
  const ys = points.map(([, y]) => y);
  return [(Math.min(...xs) + Math.max(...xs)) / 2, heightUm - (Math.min(...ys) + Math.max(...ys)) / 2];
}

/** The nominal view of the part with the plan's zones, where there is no picture: whole micrometres, drawn to fit. */
export function PartOutline({ view, zones, counts }: PartOutlineProps) {
  const t = useMessages('evidence');
  const title = useId();
  const { widthUm, heightUm } = view;
  const unit = Math.max(widthUm, heightUm) / 100;
  return (
    <figure className="flex size-full min-h-0 flex-col">
      <svg
        viewBox={`${String(-2 * unit)} ${String(-2 * unit)} ${String(widthUm + 4 * unit)} ${String(heightUm + 4 * unit)}`}
        role="img"
        aria-labelledby={title}
        className="min-h-0 w-full flex-1"
      >
        {view.outline && view.outline.length > 2 ? (
          <path d={path(view.outline, heightUm)} className="fill-sunken stroke-ink" strokeWidth={unit * 0.5} />
        ) : (
          <rect width={widthUm} height={heightUm} className="fill-sunken stroke-ink" strokeWidth={unit * 0.5} />
        )}
        {zones.map((zone) => {
          const [x, y] = middle(zone.polygon, heightUm);
          const count = counts[zone.id] ?? 0;
          return (
            <g key={zone.id}>
              <path
                d={path(zone.polygon, heightUm)}
                className={`fill-none ${count > 0 ? 'stroke-accent' : 'stroke-line-strong'}`}
                strokeWidth={unit * (count > 0 ? 0.6 : 0.3)}
                strokeDasharray={`${String(1.5 * unit)} ${String(unit)}`}
              />
              <text x={x} y={y} textAnchor="middle" fontSize={unit * 4} className="fill-ink font-semibold">
                {zone.id}
              </text>
              {count > 0 ? (
                <text x={x} y={y + unit * 4} textAnchor="middle" fontSize={unit * 3.2} className="fill-ink">
                  {t('zoneCount', { count })}
                </text>
              ) : null}
            </g>
          );
        })}
      </svg>
      <figcaption id={title} className="px-3 py-1 text-sm text-ink-soft">
        {t('viewTitle', { title: view.title, view: view.name })}
        {zones
          .filter(({ id }) => (counts[id] ?? 0) > 0)
          .map(({ id }) => ` – ${t('zone', { zone: id })}: ${t('zoneCount', { count: counts[id] ?? 0 })}`)}
      </figcaption>
    </figure>
  );
}
