'use client';

import { useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { shapeFrom } from './drawing';
import { Cross, Handles, MarkDrawing, Outline, RegionBox, ZoneOutline } from './marks-layer';
import { PictureCanvas } from './picture-canvas';
import { unscaledFrame } from './scale';
import { shapeOf } from './tools';
import { useDesk } from './use-desk';
import type { Desk } from './use-desk';
import { pressKey } from './use-keys';
import { usePointer } from './use-pointer';
import type { ViewerProps, ViewerZone } from './viewer-props';
import { ViewerStatus } from './viewer-status';
import { ToolButton, ViewerToolbar } from './viewer-toolbar';
import { zoomedAbout } from './viewport';

/** A picture with its marks: radiographs in 16 bits with window and level, photographs as they are. Fills its parent. */
export function Viewer(props: ViewerProps) {
  const t = useMessages('viewer');
  const root = useRef<HTMLDivElement>(null);
  const paneElement = useRef<HTMLDivElement>(null);
  const desk = useDesk(props, paneElement);
  const pointer = usePointer(desk);
  const [showKeys, setShowKeys] = useState(false);
  const { source, view, marks } = props;
  useWheel(paneElement, desk);
  const fullScreen = () => {
    if (document.fullscreenElement) void document.exitFullscreen();
    else void root.current?.requestFullscreen();
  };
  return (
    <div ref={root} className="flex size-full min-h-0 flex-col bg-surface text-ink">
      <ViewerToolbar desk={desk} onKeys={() => setShowKeys(!showKeys)} onFullScreen={fullScreen} />
      <div className="relative min-h-0 flex-1">
        <div
          ref={paneElement}
          role="application"
          tabIndex={0}
          aria-label={t('picture', { view, width: source.width, height: source.height, count: marks.length })}
          // The focus is drawn in the tones of marks: a coloured ring beside a penetrant picture could be taken for an indication.
          className="absolute inset-0 touch-none overflow-hidden border-2 border-mark-ground bg-mark-ground outline-none select-none focus-visible:border-mark"
          onKeyDown={(event) => {
            if (pressKey(desk, event, () => setShowKeys(!showKeys))) event.preventDefault();
          }}
          {...pointer}
        >
          {desk.picture && <PictureCanvas picture={desk.picture} pane={desk.pane} windowing={desk.windowing.current} />}
          <MarksLayer desk={desk} zones={props.zones ?? []} />
        </div>
        {desk.fault !== null && (
          <div
            role="alert"
            className="absolute inset-x-4 top-4 flex items-center gap-4 border border-reject bg-raised p-3 text-reject"
          >
            {t('failed', { reason: desk.fault })}
            <ToolButton onPress={desk.again}>{t('again')}</ToolButton>
          </div>
        )}
        {!desk.picture && desk.fault === null && (
          <p role="status" className="absolute top-4 left-4 bg-raised p-2">
            {t('loading')}
          </p>
        )}
        {/* Above the picture, not below it: a bar that grows would move the picture under the hand that draws. */}
        {desk.points.length > 0 && (
          <p role="status" className="pointer-events-none absolute bottom-2 left-2 bg-mark-ground px-2 py-1 text-sm text-mark">
            {t('drawingHint')}
          </p>
        )}
        {showKeys && <KeyTable />}
      </div>
      <ViewerStatus desk={desk} onScaleEntered={props.onScaleEntered} />
    </div>
  );
}

function MarksLayer({ desk, zones }: { desk: Desk; zones: readonly ViewerZone[] }) {
  const { viewport } = desk.pane;
  const placing = { viewport, frame: desk.frame };
  const zonePlacing = { viewport, frame: desk.scale.frame ?? unscaledFrame(desk.scale.heightPx) };
  const kind = shapeOf(desk.tool);
  const started =
    kind && desk.points.length > 0 ? shapeFrom(kind, [...desk.points, desk.cross], desk.lineWidthPx, desk.frame) : null;
  const selected = desk.shapes.find((mark) => mark.id === desk.selectedId);
  // An outline of two points is no polygon yet, and is shown as a line.
  const preview = started ?? (desk.points.length > 0 ? shapeFrom('polyline', [...desk.points, desk.cross], 1, desk.frame) : null);
  return (
    <svg className="absolute inset-0 size-full">
      {desk.scale.frame && zones.map((zone) => <ZoneOutline key={zone.id} {...zone} placing={zonePlacing} />)}
      {desk.shapes.map((mark) => (
        <MarkDrawing
          key={mark.id}
          mark={mark}
          placing={placing}
          selected={mark.id === desk.selectedId}
          movable={!desk.readOnly}
        />
      ))}
      {preview && <Outline shape={preview} placing={placing} />}
      {selected && !desk.readOnly && desk.tool === 'select' && <Handles shape={selected.shape} placing={placing} />}
      {desk.region && desk.tool === 'region' && <RegionBox {...desk.region} viewport={viewport} />}
      {kind && <Cross at={desk.cross} viewport={viewport} />}
    </svg>
  );
}

// React listens to the wheel passively; the page would scroll along.
function useWheel(pane: RefObject<HTMLDivElement | null>, desk: Desk): void {
  const { viewport, setViewport } = desk.pane;
  useEffect(() => {
    const element = pane.current;
    if (!element) return;
    const turn = (event: WheelEvent) => {
      event.preventDefault();
      const box = element.getBoundingClientRect();
      const at = [event.clientX - box.left - element.clientLeft, event.clientY - box.top - element.clientTop] as const;
      setViewport(zoomedAbout(viewport, at, viewport.zoom * Math.exp(-event.deltaY / 500)));
    };
    element.addEventListener('wheel', turn, { passive: false });
    return () => element.removeEventListener('wheel', turn);
  }, [pane, viewport, setViewport]);
}

const keyNames = [
  'tools',
  'draw',
  'point',
  'arrows',
  'finish',
  'escape',
  'size',
  'turn',
  'remove',
  'undo',
  'view',
  'next',
] as const;

function KeyTable() {
  const t = useMessages('viewer');
  return (
    <ul
      aria-label={t('keys')}
      className="absolute top-2 right-2 max-w-md border border-line-strong bg-raised p-3 text-sm text-ink"
    >
      {keyNames.map((name) => (
        <li key={name}>{t(`key.${name}`)}</li>
      ))}
    </ul>
  );
}
