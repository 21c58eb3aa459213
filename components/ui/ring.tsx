'use client';

import { Fragment, useId } from 'react';
import type { ReactNode } from 'react';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useMessages } from '@/components/theme/use-messages';
import { closedPath, isClosed, labelPoint, largeProfile, ringShapes, smallProfile } from './ring-geometry';
import type { RequirementState, RingProfile, RingSegment, SegmentForm } from './ring-geometry';
import { collapse, countStates, ringCounts, sumSegments } from './ring-summary';
import type { StateCounts } from './ring-summary';

const inks: Record<SegmentForm, string> = {
  full: 'fill-accept',
  half: 'fill-accent',
  thin: 'fill-line-strong',
  detached: 'fill-unsure',
  notched: 'fill-reject',
  ticked: 'fill-unsure',
};

/** Says a ring in words: '9 of 12 accepted, 1 awaiting review, held'. */
export function useRingWords(): (counts: StateCounts, held: boolean) => string {
  const t = useMessages('ui');
  return (states, held) => {
    const counts = ringCounts(states);
    const said = [t('ring.accepted', { accepted: counts.accepted, total: counts.total })];
    if (counts.inWork > 0) said.push(t('ring.inWork', { count: counts.inWork }));
    if (counts.awaiting > 0) said.push(t('ring.awaiting', { count: counts.awaiting }));
    if (counts.rejected > 0) said.push(t('ring.rejected', { count: counts.rejected }));
    if (counts.toBeRepeated > 0) said.push(t('ring.toBeRepeated', { count: counts.toBeRepeated }));
    if (held) said.push(t('ring.held'));
    return said.join(', ');
  };
}

interface DrawnPart {
  state: RequirementState;
  weight?: number;
  key?: string;
  title?: string;
  href?: string;
}

interface DrawingProps {
  parts: readonly DrawnPart[];
  held: boolean;
  profile: RingProfile;
  /** Makes a segment a link, or answers a press on it. */
  wrap?: (part: DrawnPart, shape: ReactNode) => ReactNode;
}

/** The strokes alone: shapes, hatching when held, the unbroken circle when closed. */
function RingDrawing({ parts, held, profile, wrap = (_, shape) => shape }: DrawingProps) {
  const hatch = useId();
  const closed = isClosed(parts);
  const step = profile === smallProfile ? 16 : 4.5;
  const fill = held ? `url(#${hatch})` : undefined;
  return (
    <>
      {held && (
        <pattern id={hatch} width={step} height={step} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <rect width={step} height={step} className="fill-held-wash" />
          <rect width={step * 0.55} height={step} className="fill-held" />
        </pattern>
      )}
      {closed && <path d={closedPath(profile)} fill={fill} className={held ? '' : 'fill-accept'} />}
      {ringShapes(parts, profile).map(({ path, form }, index) => {
        const part = parts[index];
        // A closed ring is one circle; its segments stay where they were, unseen, for whoever presses one.
        const ink = closed ? 'fill-transparent' : held ? 'stroke-held' : inks[form];
        const shape = <path d={path} fill={fill} strokeWidth={held ? profile.gap / 5 : 0} className={ink} />;
        return part && <Fragment key={part.key ?? index}>{wrap(part, shape)}</Fragment>;
      })}
    </>
  );
}

const fineFromPixels = 48;

function profileFor(pixels: number): RingProfile {
  return pixels < fineFromPixels ? smallProfile : largeProfile;
}

export interface RingProps {
  segments: readonly RingSegment[];
  held?: boolean;
  size?: 'small' | 'large';
  /** Side in pixels of a ring without labels: 20 to 28 in tables, up to 96 in a heading. From 48 it is drawn finer. */
  pixels?: number;
  /** A large ring that stands beside the list of its links is pressed with a pointer only; the list serves the keyboard. */
  pointerOnly?: boolean;
}

/** The state of a serial: one segment for each requirement of its route, clockwise from twelve. */
export function Ring({ segments, held = false, size = 'small', pixels = 24, pointerOnly = false }: RingProps) {
  const words = useRingWords()(countStates(segments), held);
  if (size === 'large') return <LargeRing segments={segments} held={held} words={words} pointerOnly={pointerOnly} />;
  return (
    <svg viewBox="0 0 100 100" width={pixels} height={pixels} role="img" aria-label={words} className="shrink-0 overflow-visible">
      <RingDrawing parts={pixels < fineFromPixels ? collapse(segments) : segments} held={held} profile={profileFor(pixels)} />
    </svg>
  );
}

interface LargeRingProps {
  segments: readonly RingSegment[];
  held: boolean;
  words: string;
  pointerOnly: boolean;
}

function LargeRing({ segments, held, words, pointerOnly }: LargeRingProps) {
  const t = useMessages('ui');
  const router = useRouter();
  const counts = ringCounts(countStates(segments));
  const linked = !pointerOnly && segments.some(({ href }) => href !== undefined);
  const every = segments.length > 40 ? 5 : 1;
  const wrap = ({ href, title = '', state }: DrawnPart, shape: ReactNode) => {
    if (href === undefined) return shape;
    if (pointerOnly) {
      return (
        <g onClick={() => router.push(href)} className="cursor-pointer hover:opacity-70">
          {shape}
        </g>
      );
    }
    return (
      <Link href={href} aria-label={`${title}: ${t(`state.${state}`)}`} className="hover:opacity-70">
        {shape}
      </Link>
    );
  };
  return (
    <svg
      viewBox="-9 -9 118 118"
      role={linked ? 'group' : 'img'}
      aria-label={words}
      className="h-auto w-80 max-w-full overflow-visible"
    >
      <RingDrawing parts={segments} held={held} profile={largeProfile} wrap={wrap} />
      <g aria-hidden className="fill-ink-soft" fontSize="5.2" textAnchor="middle" dominantBaseline="central">
        {ringShapes(segments, largeProfile).map(({ middleDeg, form }, index) => {
          const { x, y } = labelPoint(middleDeg, form === 'detached' ? 54 : 49.5);
          return index % every === 0 ? (
            <text key={segments[index]?.key} x={x} y={y}>
              {index + 1}
            </text>
          ) : null;
        })}
      </g>
      <g aria-hidden textAnchor="middle">
        <text x="50" y="52.5" fontSize="14" fontWeight="700" className="fill-ink">
          {counts.accepted}/{counts.total}
        </text>
        <text x="50" y="61" fontSize="5.4" className="fill-ink-soft">
          {held ? t('ring.held') : isClosed(segments) ? t('ring.closed') : t('ring.acceptedWord')}
        </text>
      </g>
    </svg>
  );
}

export interface SumRingProps {
  /** How many requirements (or serials) are in each state. */
  counts: StateCounts;
  held?: boolean;
  pixels?: number;
}

/** The ring of a lot or shipment: the same shapes, each as wide as its share. */
export function SumRing({ counts, held = false, pixels = 24 }: SumRingProps) {
  const words = useRingWords()(counts, held);
  return (
    <svg viewBox="0 0 100 100" width={pixels} height={pixels} role="img" aria-label={words} className="shrink-0 overflow-visible">
      <RingDrawing parts={sumSegments(counts)} held={held} profile={profileFor(pixels)} />
    </svg>
  );
}
