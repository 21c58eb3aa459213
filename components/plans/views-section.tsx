'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { CornersTable } from './corners-table';
import { textOfValue } from './entry-values';
import type { Corner } from './micrometres';
import { PlanFault, PlanField } from './plan-field';
import { usePlanEditing } from './plan-editing';
import { AddRow, RowButtons } from './row-buttons';
import { ZoneDrawing, type DrawnZone } from './zone-drawing';

function useZones(): DrawnZone[] {
  const { rows, at } = usePlanEditing();
  return rows('criteria.zones').map((_, place) => {
    const polygon = at(`criteria.zones.${String(place)}.polygon`);
    return {
      place,
      id: textOfValue(at(`criteria.zones.${String(place)}.id`)),
      polygon: Array.isArray(polygon) ? (polygon as Corner[]) : [],
    };
  });
}

/** One view: its size, the zones on it, drawn and in numbers. */
function View({ path, place }: { readonly path: string; readonly place: number }) {
  const t = useMessages('plans');
  const { content, at, set, add, remove, readOnly, faultAt } = usePlanEditing();
  const [wanted, setWanted] = useState<number | null>(null);
  const view = content.views[place];
  const zones = useZones().filter((zone) => at(`criteria.zones.${String(zone.place)}.view`) === view?.name);
  if (!view) return null;
  const chosen = zones.find((zone) => zone.place === wanted) ?? zones[0];
  const put = (polygon: Corner[]) => chosen && set(`criteria.zones.${String(chosen.place)}.polygon`, polygon);
  const base = chosen ? `criteria.zones.${String(chosen.place)}` : '';
  return (
    <Panel
      title={view.title === '' ? view.name : view.title}
      actions={<RowButtons path="views" place={place} name={view.title} />}
    >
      <div className="mb-4 grid gap-x-4 gap-y-2 sm:grid-cols-4">
        <PlanField path={`${path}.name`} label={t('viewName')} kind="text" />
        <PlanField path={`${path}.title`} label={t('title')} kind="text" />
        <PlanField path={`${path}.widthUm`} label={t('widthUm')} kind="whole" />
        <PlanField path={`${path}.heightUm`} label={t('heightUm')} kind="whole" />
      </div>
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <ZoneDrawing view={view} zones={zones} chosen={readOnly ? null : (chosen?.place ?? null)} onCorners={put} />
        <div className="flex flex-col gap-3">
          <div className="flex flex-wrap gap-2" role="group" aria-label={t('zonesOn', { view: view.title })}>
            {zones.map((zone) => (
              <Button
                key={zone.place}
                kind={zone === chosen ? 'primary' : 'quiet'}
                aria-pressed={zone === chosen}
                onClick={() => setWanted(zone.place)}
              >
                {t('zone', { id: zone.id })}
              </Button>
            ))}
            {readOnly ? null : (
              <Button
                kind="bare"
                onClick={() => {
                  add('criteria.zones', { id: '', view: view.name, polygon: [] });
                  setWanted(content.criteria.zones === undefined ? 0 : (content.criteria.zones as unknown[]).length);
                }}
              >
                {t('addZone')}
              </Button>
            )}
          </div>
          {chosen ? (
            <>
              <PlanField path={`${base}.id`} label={t('zoneId')} kind="text" />
              <PlanFault text={faultAt(`${base}.polygon`)} />
              <CornersTable polygon={chosen.polygon} onCorners={put} readOnly={readOnly} />
              {readOnly ? null : (
                <div>
                  <Button kind="danger" onClick={() => remove('criteria.zones', chosen.place)}>
                    {t('removeZone', { id: chosen.id })}
                  </Button>
                </div>
              )}
            </>
          ) : (
            <p className="text-ink-soft">{t('noZones')}</p>
          )}
        </div>
      </div>
    </Panel>
  );
}

/** The nominal views of the part and the zones on them. */
export function ViewsSection() {
  const t = useMessages('plans');
  const { content } = usePlanEditing();
  return (
    <div className="flex flex-col gap-4">
      {content.views.map((_, place) => (
        <View key={place} place={place} path={`views.${String(place)}`} />
      ))}
      <div>
        <AddRow path="views" row={{ name: '', title: '', widthUm: 40000, heightUm: 25000 }} label={t('addView')} />
      </div>
    </div>
  );
}
