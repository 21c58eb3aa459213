import { useState } from 'react';
import type { ReactNode } from 'react';
import { useFormatter } from 'use-intl';
import { useMessages } from '@/components/theme/use-messages';
import { pitchFromWidth } from './scale';
import type { Desk } from './use-desk';
import { ToolButton } from './viewer-toolbar';
import { trueScalePercent } from './viewport';

const field = 'min-h-capture w-24 rounded border border-line-strong bg-raised px-2 text-right font-mono text-base text-ink';

/** Below the picture: window and level in stored values, true scale, pitch, line width and region statistics. */
export function ViewerStatus({ desk, onScaleEntered }: { desk: Desk; onScaleEntered: ((pitchUm: number) => void) | undefined }) {
  const t = useMessages('viewer');
  const format = useFormatter();
  const percent = trueScalePercent(desk.pane.viewport, desk.pane.devicePixelRatio);
  const { statistics } = desk;
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1 border-t border-line bg-surface p-1 text-sm text-ink">
      {desk.windowing.available && <WindowFields desk={desk} />}
      <span className="font-mono">
        {t('trueScale', { percent: format.number(percent, { maximumFractionDigits: percent < 10 ? 1 : 0 }) })} ·{' '}
        {Math.abs(percent - Math.round(percent / 100) * 100) < 0.001 ? t('exact') : t('resampled')}
      </span>
      <ScaleWord desk={desk} />
      {!desk.readOnly && !desk.scale.calibrated && onScaleEntered && (
        <ScaleField widthPx={desk.source.width} onScaleEntered={onScaleEntered} />
      )}
      {desk.tool === 'polyline' && <LineWidthField desk={desk} />}
      {statistics && (
        <span role="status">
          {t('statistics', {
            mean: format.number(statistics.mean, { maximumFractionDigits: 1 }),
            deviation: format.number(statistics.deviation, { maximumFractionDigits: 1 }),
            count: format.number(statistics.count),
          })}
        </span>
      )}
    </div>
  );
}

function Labelled({ label, children }: { label: string; children: ReactNode }) {
  return (
    <label className="flex items-center gap-2">
      <span>{label}</span>
      {children}
    </label>
  );
}

function WindowFields({ desk }: { desk: Desk }) {
  const t = useMessages('viewer');
  const { low, high } = desk.windowing.current;
  const [width, level] = [high - low, (high + low) / 2];
  const set = (nextWidth: number, nextLevel: number) => {
    if (Number.isFinite(nextWidth) && Number.isFinite(nextLevel))
      desk.windowing.set(nextLevel - nextWidth / 2, nextLevel + nextWidth / 2);
  };
  return (
    <>
      <Labelled label={t('windowWidth')}>
        <input
          type="number"
          min={1}
          max={65535}
          value={width}
          onChange={(event) => set(event.target.valueAsNumber, level)}
          className={field}
        />
      </Labelled>
      <Labelled label={t('level')}>
        <input
          type="number"
          min={0}
          max={65535}
          step="any"
          value={level}
          onChange={(event) => set(width, event.target.valueAsNumber)}
          className={field}
        />
      </Labelled>
      <ToolButton onPress={desk.windowing.whole}>{t('wholeRange')}</ToolButton>
    </>
  );
}

function ScaleWord({ desk }: { desk: Desk }) {
  const t = useMessages('viewer');
  const format = useFormatter();
  const { frame, calibrated } = desk.scale;
  if (!frame) return <strong className="text-unsure">{t('noScale')}</strong>;
  const pitch = t('pitch', { pitch: format.number(frame.pitchUm, { maximumFractionDigits: 3 }) });
  return <span>{calibrated ? pitch : `${pitch}, ${t('indicative')}`}</span>;
}

function ScaleField({ widthPx, onScaleEntered }: { widthPx: number; onScaleEntered: (pitchUm: number) => void }) {
  const t = useMessages('viewer');
  const [typed, setTyped] = useState('');
  const [wrong, setWrong] = useState(false);
  const take = () => {
    const acrossMm = /^\d+([.,]\d+)?$/.test(typed.trim()) ? Number(typed.trim().replace(',', '.')) : Number.NaN;
    setWrong(!(acrossMm > 0));
    if (acrossMm > 0) onScaleEntered(pitchFromWidth(widthPx, acrossMm));
  };
  return (
    <>
      <Labelled label={t('across')}>
        <input
          inputMode="decimal"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
          aria-invalid={wrong}
          className={field}
        />
      </Labelled>
      <ToolButton onPress={take}>{t('setScale')}</ToolButton>
      {wrong && (
        <span role="alert" className="text-reject">
          {t('scaleWrong')}
        </span>
      )}
    </>
  );
}

function LineWidthField({ desk }: { desk: Desk }) {
  const t = useMessages('viewer');
  const hasSize = desk.scale.calibrated;
  const shown = hasSize ? (desk.lineWidthPx * desk.frame.pitchUm) / 1000 : desk.lineWidthPx;
  const set = (value: number) => {
    if (value > 0) desk.setLineWidthUm(hasSize ? value * 1000 : value * desk.frame.pitchUm);
  };
  return (
    <Labelled label={hasSize ? t('lineWidth') : t('lineWidthPx')}>
      <input
        type="number"
        min={0}
        step="any"
        value={Number(shown.toFixed(4))}
        onChange={(event) => set(event.target.valueAsNumber)}
        className={field}
      />
    </Labelled>
  );
}
