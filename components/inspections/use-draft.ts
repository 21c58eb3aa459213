'use client';

import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { problemOf, ProblemError, type Problem } from '@/components/ui/problem';
import { sendJson } from '@/components/forms/send-json';
import type { InspectionContent, InspectionPatch } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { gaugeKindsOf } from '@/services/contracts/judging-input';
import { judgeDraft, type Judgement } from '@/services/contracts/live-judgement';
import { evaluate } from '@/services/engine/evaluate/evaluate';

const pauseMs = 500;
// A save that failed is tried again by itself: a network that was gone for a moment must not leave a draft behind.
const againMs = 2000;

export type SavedState =
  { readonly kind: 'saved' } | { readonly kind: 'saving' } | { readonly kind: 'unsaved'; readonly problem: Problem };

export interface Draft {
  readonly content: InspectionContent;
  readonly judgement: Judgement;
  readonly saved: SavedState;
  /** The other version when somebody else saved meanwhile. */
  readonly theirs: InspectionAnswer | null;
  readonly change: (patch: InspectionPatch) => void;
  readonly takeTheirs: () => void;
  readonly keepMine: () => void;
  /** Sends what is not saved yet; true when everything is. */
  readonly flush: () => Promise<boolean>;
}

function judge(answer: InspectionAnswer, content: InspectionContent): Judgement {
  const source = {
    plan: { criteria: answer.criteria },
    requirement: answer.requirement,
    content,
    uncertainties: answer.uncertainties,
    gaugeKinds: gaugeKindsOf(content, answer.equipment),
  };
  return judgeDraft(source, (body) => {
    const result = evaluate(body, { zoneless: 'not-evaluable' });
    return result.ok ? { evaluation: result.answer } : { faults: result.faults };
  });
}

function kept(key: string): { version: number; content: InspectionContent } | null {
  try {
    return JSON.parse(window.localStorage.getItem(key) ?? 'null') as { version: number; content: InspectionContent } | null;
  } catch {
    return null;
  }
}

/** The draft as this page holds it: typed at once, judged at once, saved shortly after, kept in the browser until the server has it. */
export function useDraft(answer: InspectionAnswer): Draft {
  const key = `ringtrue-draft-${answer.id}`;
  const [content, setContent] = useState(answer.content);
  const [saved, setSaved] = useState<SavedState>({ kind: 'saved' });
  const [theirs, setTheirs] = useState<InspectionAnswer | null>(null);
  const version = useRef(answer.version);
  const latest = useRef(answer.content);
  const dirty = useRef(false);
  const sending = useRef<Promise<boolean> | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  const again = useRef<(() => Promise<boolean>) | null>(null);

  const send = useCallback(async (): Promise<boolean> => {
    if (sending.current) await sending.current;
    if (!dirty.current) return true;
    dirty.current = false;
    setSaved({ kind: 'saving' });
    const body = latest.current;
    sending.current = sendJson<InspectionAnswer>(`/api/inspections/${answer.id}`, {
      method: 'PATCH',
      body,
      headers: { 'if-match': `"${String(version.current)}"` },
    })
      .then((next) => {
        version.current = next.version;
        if (!dirty.current) {
          window.localStorage.removeItem(key);
          setSaved({ kind: 'saved' });
        }
        return true;
      })
      .catch(async (failure: unknown) => {
        dirty.current = true;
        setSaved({ kind: 'unsaved', problem: problemOf(failure) });
        if (failure instanceof ProblemError && failure.problem.status === 412) {
          setTheirs(await sendJson<InspectionAnswer>(`/api/inspections/${answer.id}`, { method: 'GET' }));
        } else {
          clearTimeout(timer.current);
          timer.current = setTimeout(() => void again.current?.(), againMs);
        }
        return false;
      });
    const good = await sending.current;
    sending.current = null;
    return good;
  }, [answer.id, key]);

  useEffect(() => {
    again.current = send;
    return () => clearTimeout(timer.current);
  }, [send]);

  const schedule = useCallback(() => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => void send(), pauseMs);
  }, [send]);

  const change = useCallback(
    (patch: InspectionPatch) => {
      const sent = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
      latest.current = { ...latest.current, ...sent };
      dirty.current = true;
      window.localStorage.setItem(key, JSON.stringify({ version: version.current, content: latest.current }));
      setContent(latest.current);
      setSaved({ kind: 'saving' });
      schedule();
    },
    [key, schedule],
  );

  // What a lost network or a closed tab left behind is taken up again, if nobody saved since.
  useEffect(() => {
    const left = kept(key);
    if (left && answer.state === 'draft' && left.version === answer.version) change(left.content);
    const online = () => dirty.current && void send();
    window.addEventListener('online', online);
    return () => window.removeEventListener('online', online);
  }, [key, answer.state, answer.version, change, send]);

  const judgement = useMemo(() => judge(answer, content), [answer, content]);
  return {
    content,
    judgement,
    saved,
    theirs,
    change,
    takeTheirs: () => {
      if (!theirs) return;
      version.current = theirs.version;
      latest.current = theirs.content;
      dirty.current = false;
      window.localStorage.removeItem(key);
      setContent(theirs.content);
      setTheirs(null);
      setSaved({ kind: 'saved' });
    },
    keepMine: () => {
      if (!theirs) return;
      version.current = theirs.version;
      setTheirs(null);
      change({});
    },
    flush: () => {
      clearTimeout(timer.current);
      return send();
    },
  };
}
