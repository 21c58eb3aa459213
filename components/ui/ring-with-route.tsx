import Link from 'next/link';
import { Ring } from './ring';
import type { RingSegment } from './ring-geometry';
import { StateWord } from './state-word';

export interface RingWithRouteProps {
  segments: readonly RingSegment[];
  held?: boolean;
}

/** The large ring beside its route: numbered as around the ring, each requirement with its state in words and its link. */
export function RingWithRoute({ segments, held = false }: RingWithRouteProps) {
  return (
    <div className="grid items-start gap-x-8 gap-y-4 lg:grid-cols-[20rem_1fr]">
      <Ring segments={segments} held={held} size="large" pointerOnly />
      <ol className="columns-1 gap-x-8 xl:columns-2">
        {segments.map(({ key, title, state, href }, index) => (
          <li key={key} className="flex min-h-9 break-inside-avoid items-baseline gap-3 border-b border-line py-1.5">
            <span className="w-6 shrink-0 text-right font-mono text-sm text-ink-soft">{index + 1}</span>
            <span className="min-w-0 flex-1">
              {href ? (
                <Link
                  href={href}
                  className="text-accent underline decoration-line-strong underline-offset-4 hover:decoration-accent"
                >
                  {title}
                </Link>
              ) : (
                title
              )}
            </span>
            <StateWord state={state} />
          </li>
        ))}
      </ol>
    </div>
  );
}
