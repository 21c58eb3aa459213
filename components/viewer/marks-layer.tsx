import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from '@/components/ui/glyph';
import { handlesOf, middleOf } from './marks';
import type { MarkShape, MarkVerdict } from './marks';
import { toPicture } from './scale';
import type { Frame, PicturePoint } from './scale';
import { paneAt } from './viewport';
import type { Viewport } from './viewport';

// Over a picture hue means nothing: a line pattern, a shape and a word carry the verdict.
const dashes: Record<MarkVerdict | 'unjudged', string | undefined> = {
  accept: undefined,
  reject: undefined,
  indeterminate: '10 5',
  'not-evaluable': '2 5',
  unjudged: '6 3',
};

interface Placing {
  readonly viewport: Viewport;
  readonly frame: Frame;
}

function placed({ viewport, frame }: Placing, point: PicturePoint): PicturePoint {
  return paneAt(viewport, toPicture(frame, point));
}

/** One outline in two tones, so that it shows on any ground. */
export function Outline({
  shape,
  placing,
  verdict,
  heavy = false,
}: {
  shape: MarkShape;
  placing: Placing;
  verdict?: MarkVerdict | undefined;
  heavy?: boolean;
}) {
  const width = heavy || verdict === 'reject' ? 3.5 : 2;
  const dash = dashes[verdict ?? 'unjudged'];
  return (
    <g fill="none" strokeLinejoin="round" strokeLinecap="butt">
      <Drawn shape={shape} placing={placing} stroke="var(--mark-ground)" strokeWidth={width + 3} />
      <Drawn shape={shape} placing={placing} stroke="var(--mark)" strokeWidth={width} strokeDasharray={dash} />
    </g>
  );
}

type Stroke = { stroke: string; strokeWidth: number; strokeDasharray?: string | undefined; fill?: string };

function Drawn({ shape, placing, ...stroke }: { shape: MarkShape; placing: Placing } & Stroke) {
  const perUnit = placing.viewport.zoom / placing.frame.pitchUm;
  if (shape.kind === 'circle' || shape.kind === 'ellipse') {
    const [x, y] = placed(placing, shape.center);
    if (shape.kind === 'circle') return <circle cx={x} cy={y} r={Math.max(3, (shape.diameter / 2) * perUnit)} {...stroke} />;
    const [first, second] = shape.axes;
    const turn = `rotate(${String(placing.frame.turnDeg - shape.angle)} ${String(x)} ${String(y)})`;
    return (
      <ellipse
        cx={x}
        cy={y}
        rx={Math.max(3, (first / 2) * perUnit)}
        ry={Math.max(3, (second / 2) * perUnit)}
        transform={turn}
        {...stroke}
      />
    );
  }
  const points = shape.points.map((point) => placed(placing, point).join(',')).join(' ');
  if (shape.kind === 'polygon') return <polygon points={points} {...stroke} />;
  const breadth = Math.max(stroke.strokeWidth, shape.width * perUnit);
  return (
    <>
      {breadth > stroke.strokeWidth && (
        <polyline
          points={points}
          {...stroke}
          strokeWidth={breadth}
          strokeDasharray={undefined}
          strokeLinecap="round"
          opacity={0.35}
        />
      )}
      <polyline points={points} {...stroke} />
    </>
  );
}

/** Where the number of a mark stands: right of and above its outline. */
function labelPlace(shape: MarkShape, placing: Placing): PicturePoint {
  const corners = [...handlesOf(shape), middleOf(shape)].map((point) => placed(placing, point));
  const reach = shape.kind === 'circle' ? (shape.diameter / 2) * (placing.viewport.zoom / placing.frame.pitchUm) : 0;
  return [Math.max(...corners.map(([x]) => x)) + 8, Math.min(...corners.map(([, y]) => y)) - reach * 0.7 - 8];
}

export interface ShownMark {
  readonly id: string;
  readonly shape: MarkShape;
  readonly verdict: MarkVerdict | undefined;
}

/** A mark with its number and verdict; a finger may miss its line by 12 px. */
export function MarkDrawing({
  mark,
  placing,
  selected,
  movable,
}: {
  mark: ShownMark;
  placing: Placing;
  selected: boolean;
  movable: boolean;
}) {
  const t = useMessages('viewer');
  const [x, y] = labelPlace(mark.shape, placing);
  const word = mark.verdict ? t(`verdict.${mark.verdict}`) : '';
  const name = t('mark', { number: mark.id, shape: t(`tool.${mark.shape.kind}`), verdict: word || t('unjudged') });
  const breadth = 22 + (mark.id.length + (word ? word.length + 1 : 0)) * 8 + (mark.verdict ? 18 : 0) - 10;
  return (
    <g data-mark={mark.id} role="img" aria-label={name} className={movable ? 'cursor-move' : 'cursor-pointer'}>
      <Outline shape={mark.shape} placing={placing} verdict={mark.verdict} heavy={selected} />
      <Drawn
        shape={mark.shape}
        placing={placing}
        stroke="transparent"
        strokeWidth={24}
        fill={mark.shape.kind === 'polyline' ? 'none' : 'transparent'}
      />
      <g transform={`translate(${String(x)} ${String(y - 12)})`} color="var(--mark)">
        <rect
          width={breadth}
          height={24}
          fill="var(--mark-ground)"
          stroke="var(--mark)"
          strokeWidth={selected ? 2 : 0}
          opacity={0.9}
        />
        <text x={6} y={17} fontSize={14} fontWeight={700} fill="currentColor" className="font-mono">
          {mark.id}
        </text>
        {mark.verdict && (
          <svg x={12 + mark.id.length * 8.5} y={4} width={16} height={16} overflow="visible">
            <Glyph name={mark.verdict} />
          </svg>
        )}
        {word && (
          <text x={32 + mark.id.length * 8.5} y={17} fontSize={14} fill="currentColor">
            {word}
          </text>
        )}
      </g>
    </g>
  );
}

/** Handles of the selected mark: small to see, 48 px to touch, kept clear of the middle so that a small mark can still be moved. */
export function Handles({ shape, placing }: { shape: MarkShape; placing: Placing }) {
  const middle = placed(placing, middleOf(shape));
  return (
    <g>
      {handlesOf(shape).map((handle, index) => {
        const [x, y] = clearOf(middle, placed(placing, handle));
        return (
          <g key={index} data-handle={index} className="cursor-crosshair">
            <circle cx={x} cy={y} r={24} fill="transparent" />
            <rect x={x - 6} y={y - 6} width={12} height={12} fill="var(--mark)" stroke="var(--mark-ground)" strokeWidth={3} />
          </g>
        );
      })}
    </g>
  );
}

function clearOf(middle: PicturePoint, [x, y]: PicturePoint): PicturePoint {
  const [dx, dy] = [x - middle[0], y - middle[1]];
  const distance = Math.hypot(dx, dy);
  if (distance >= 36) return [x, y];
  return distance < 1 ? [middle[0] + 36, middle[1]] : [middle[0] + (dx / distance) * 36, middle[1] + (dy / distance) * 36];
}

/** Outline of a zone of the plan, quieter than any mark. */
export function ZoneOutline({ id, polygon, placing }: { id: string; polygon: readonly PicturePoint[]; placing: Placing }) {
  const t = useMessages('viewer');
  const corners = polygon.map((point) => placed(placing, point));
  const [x, y] = corners.reduce(
    ([left, top], corner) => [Math.min(left, corner[0]), Math.min(top, corner[1])],
    [Infinity, Infinity],
  );
  const points = corners.map((corner) => corner.join(',')).join(' ');
  return (
    <g role="img" aria-label={t('zone', { zone: id })} pointerEvents="none">
      <polygon points={points} fill="none" stroke="var(--mark-ground)" strokeWidth={3} opacity={0.7} />
      <polygon points={points} fill="none" stroke="var(--mark)" strokeWidth={1} strokeDasharray="1 4" />
      <text
        x={x + 6}
        y={y + 18}
        fontSize={14}
        fontWeight={700}
        fill="var(--mark)"
        stroke="var(--mark-ground)"
        strokeWidth={4}
        paintOrder="stroke"
      >
        {id}
      </text>
    </g>
  );
}

/** The cross that the arrow keys move. */
export function Cross({ at, viewport }: { at: PicturePoint; viewport: Viewport }) {
  const [x, y] = paneAt(viewport, at);
  const path = `M${String(x - 14)} ${String(y)}h10m8 0h10M${String(x)} ${String(y - 14)}v10m0 8v10`;
  return (
    <g pointerEvents="none" fill="none">
      <path d={path} stroke="var(--mark-ground)" strokeWidth={5} />
      <path d={path} stroke="var(--mark)" strokeWidth={2} />
    </g>
  );
}

/** The rectangle from which window or statistics are taken. */
export function RegionBox({ from, to, viewport }: { from: PicturePoint; to: PicturePoint; viewport: Viewport }) {
  const [a, b] = [paneAt(viewport, from), paneAt(viewport, to)];
  const box = { x: Math.min(a[0], b[0]), y: Math.min(a[1], b[1]), width: Math.abs(a[0] - b[0]), height: Math.abs(a[1] - b[1]) };
  return (
    <g pointerEvents="none" fill="none">
      <rect {...box} stroke="var(--mark-ground)" strokeWidth={4} />
      <rect {...box} stroke="var(--mark)" strokeWidth={1.5} strokeDasharray="4 3" />
    </g>
  );
}
