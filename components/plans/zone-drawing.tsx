'use client';

import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import type { PlanContent } from '@/services/contracts/plan-content';
import { mmText, sideNearest, type Corner } from './micrometres';

export interface DrawnZone {
  /** Place in the plan's list of zones. */
  readonly place: number;
  readonly id: string;
  readonly polygon: readonly Corner[];
}

export interface ZoneDrawingProps {
  readonly view: PlanContent['views'][number];
  readonly zones: readonly DrawnZone[];
  /** Place of the zone whose corners can be moved; null while none is chosen or nothing may change. */
  readonly chosen: number | null;
  readonly onCorners: (polygon: Corner[]) => void;
}

const arrows: Readonly<Record<string, Corner>> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, 1], ArrowDown: [0, -1] };

/** Zones on a nominal view: pressing the view adds a corner to the chosen zone, corners are dragged or moved by the arrows. */
export function ZoneDrawing({ view, zones, chosen, onCorners }: ZoneDrawingProps) {
  const t = useMessages('plans');
  const picture = useRef<SVGSVGElement>(null);
  const dragged = useRef<number | null>(null);
  const { widthUm, heightUm } = view;
  const unit = Math.max(widthUm, heightUm) / 100;
  const zone = zones.find(({ place }) => place === chosen);
  const corners = zone?.polygon ?? [];
  const path = (points: readonly Corner[]) =>
    points.length === 0 ? '' : `M${points.map(([x, y]) => `${String(x)} ${String(heightUm - y)}`).join('L')}Z`;
  const cornerAt = (event: PointerEvent): Corner | undefined => {
    const matrix = picture.current?.getScreenCTM();
    if (!matrix) return undefined;
    const { x, y } = new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix.inverse());
    // Tenths of a millimetre: what a hand can place and a drawing can say.
    return [Math.round(x / 100) * 100, Math.round((heightUm - y) / 100) * 100];
  };
  const put = (place: number, corner: Corner) => onCorners(corners.map((one, at) => (at === place ? corner : one)));
  const press = (event: PointerEvent) => {
    const corner = cornerAt(event);
    if (!zone || !corner || dragged.current !== null) return;
    const after = corners.length < 3 ? corners.length - 1 : sideNearest(corners, corner);
    onCorners([...corners.slice(0, after + 1), corner, ...corners.slice(after + 1)]);
  };
  const key = (event: KeyboardEvent, place: number, [x, y]: Corner) => {
    const arrow = arrows[event.key];
    if (event.key === 'Delete' || event.key === 'Backspace') onCorners(corners.filter((_, at) => at !== place));
    else if (arrow) put(place, [x + arrow[0] * (event.shiftKey ? 1000 : 100), y + arrow[1] * (event.shiftKey ? 1000 : 100)]);
    else return;
    event.preventDefault();
  };
  return (
    <svg
      ref={picture}
      viewBox={`${String(-4 * unit)} ${String(-4 * unit)} ${String(widthUm + 8 * unit)} ${String(heightUm + 8 * unit)}`}
      role="group"
      aria-label={t('drawingOf', { view: view.title })}
      className={`max-h-[28rem] w-full touch-none border border-line bg-sunken ${zone ? 'cursor-crosshair' : ''}`}
      onPointerDown={press}
      onPointerMove={(event) => {
        const corner = cornerAt(event);
        if (dragged.current !== null && corner) put(dragged.current, corner);
      }}
      onPointerUp={() => {
        dragged.current = null;
      }}
    >
      <path
        d={view.outline && view.outline.length > 2 ? path(view.outline) : `M0 0H${String(widthUm)}V${String(heightUm)}H0Z`}
        className="fill-raised stroke-ink"
        strokeWidth={unit * 0.4}
      />
      {zones.map(({ place, id, polygon }) => (
        <g key={place}>
          <path
            d={path(polygon)}
            className={place === chosen ? 'fill-accent-wash stroke-accent' : 'fill-none stroke-line-strong'}
            fillOpacity={0.6}
            strokeWidth={unit * (place === chosen ? 0.7 : 0.4)}
            strokeDasharray={place === chosen ? undefined : `${String(1.5 * unit)} ${String(unit)}`}
          />
          {polygon[0] ? (
            <text
              x={polygon[0][0] + unit}
              y={heightUm - polygon[0][1] - unit}
              fontSize={unit * 4}
              className="fill-ink font-semibold"
            >
              {id}
            </text>
          ) : null}
        </g>
      ))}
      {corners.map((corner, place) => (
        <circle
          key={place}
          role="button"
          tabIndex={0}
          aria-label={t('cornerAt', { number: place + 1, x: mmText(corner[0]), y: mmText(corner[1]) })}
          cx={corner[0]}
          cy={heightUm - corner[1]}
          r={unit * 1.6}
          className="cursor-move fill-raised stroke-accent focus-visible:stroke-focus"
          strokeWidth={unit * 0.6}
          onPointerDown={(event) => {
            event.stopPropagation();
            dragged.current = place;
            picture.current?.setPointerCapture(event.pointerId);
          }}
          onKeyDown={(event) => key(event, place, corner)}
        />
      ))}
    </svg>
  );
}
