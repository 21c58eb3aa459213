'use client';

import type { ReactNode, Ref } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';
import type { GlyphName } from './glyph';
import { noAnswerType, notAProblemType } from './problem';
import type { Problem } from './problem';
import { toneText, toneWash } from './tones';
import type { Tone } from './tones';

export type NoticeKind = 'information' | 'done' | 'unsure' | 'refusal' | 'held';

const looks: Record<NoticeKind, { tone: Tone; glyph: GlyphName }> = {
  information: { tone: 'accent', glyph: 'information' },
  done: { tone: 'accept', glyph: 'closed' },
  unsure: { tone: 'unsure', glyph: 'indeterminate' },
  refusal: { tone: 'reject', glyph: 'reject' },
  held: { tone: 'held', glyph: 'hatch' },
};

export interface NoticeProps {
  kind?: NoticeKind;
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
  ref?: Ref<HTMLDivElement>;
}

/** Something to know, in the page. A refusal is announced at once, the rest when the reader is free. */
export function Notice({ kind = 'information', title, children, actions, ref }: NoticeProps) {
  const { tone, glyph } = looks[kind];
  return (
    <div
      ref={ref}
      tabIndex={-1}
      role={kind === 'refusal' ? 'alert' : 'status'}
      className={`flex gap-3 rounded border border-l-4 border-current px-4 py-3 ${toneText[tone]} ${toneWash[tone]}`}
    >
      <span className="pt-0.5">
        <Glyph name={glyph} pixels={20} />
      </span>
      <div className="min-w-0 flex-1">
        <p className="font-semibold">{title}</p>
        {children !== undefined && <div className="text-ink">{children}</div>}
      </div>
      {actions}
    </div>
  );
}

export interface ProblemNoticeProps {
  problem: Problem;
  /** Field paths that are already shown beside their fields. */
  shownElsewhere?: readonly string[];
  /** What a field is called, for a list of field errors. */
  labelOf?: (path: string) => string;
  actions?: ReactNode;
  ref?: Ref<HTMLDivElement>;
}

/** A refusal: what happened, which field, what to do. */
export function ProblemNotice({ problem, shownElsewhere = [], labelOf = (path) => path, actions, ref }: ProblemNoticeProps) {
  const t = useMessages('ui');
  const noAnswer = problem.type === noAnswerType;
  const title = noAnswer ? t('problem.noAnswer') : problem.type === notAProblemType ? t('problem.unexpected') : problem.title;
  const detail = noAnswer ? t('problem.noAnswerDetail') : problem.detail;
  const listed = (problem.errors ?? []).filter(({ path }) => !shownElsewhere.includes(path));
  return (
    <Notice kind="refusal" title={title} actions={actions} ref={ref}>
      {detail !== undefined && <p>{detail}</p>}
      {listed.length > 0 && (
        <ul className="mt-1 list-disc pl-5">
          {listed.map(({ path, message }, index) => (
            <li key={`${path}-${index}`}>
              {path !== '' && <strong>{labelOf(path)}: </strong>}
              {message}
            </li>
          ))}
        </ul>
      )}
    </Notice>
  );
}
