'use client';

import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { sendJson } from '@/components/forms/send-json';
import type { InspectionContent, InspectionPatch } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { gaugeKindsOf } from '@/services/contracts/judging-input';
import { judgeDraft, type Judgement } from '@/services/contracts/live-judgement';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import { DraftKeeper, type DraftView } from './draft-keeper';
import { browserShelf } from './draft-shelf';

/** The draft as the bench works on it. */
export interface Draft extends DraftView {
  readonly judgement: Judgement;
  readonly change: (patch: InspectionPatch) => void;
  readonly takeTheirs: () => void;
  readonly keepMine: () => void;
  /** Sends what is not saved yet; true when everything is. */
  readonly flush: () => Promise<boolean>;
}

function judge(answer: InspectionAnswer, content: InspectionContent): Judgement {
  // A signed inspection shows what was judged when it was signed, whatever the engine would say today.
  if (answer.state === 'signed') return answer.judgement;
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

function keeperFor(answer: InspectionAnswer, person: string, onSaved: (saved: InspectionAnswer) => void): DraftKeeper {
  const url = `/api/inspections/${answer.id}`;
  const server = {
    read: () => sendJson<InspectionAnswer>(url, { method: 'GET' }),
    save: async (body: InspectionContent, version: number) => {
      const saved = await sendJson<InspectionAnswer>(url, {
        method: 'PATCH',
        body,
        headers: { 'if-match': `"${String(version)}"` },
      });
      onSaved(saved);
      return saved;
    },
  };
  return new DraftKeeper(answer, server, browserShelf(answer.id, person));
}

/** Typed at once, judged at once by the same engine as on the server, saved shortly after. `writable` takes up unsent entries. */
export function useDraft(
  answer: InspectionAnswer,
  person: string,
  writable: boolean,
  onSaved: (saved: InspectionAnswer) => void,
): Draft {
  const [keeper] = useState(() => keeperFor(answer, person, onSaved));
  const view = useSyncExternalStore(keeper.subscribe, keeper.current, keeper.current);
  useEffect(() => {
    if (writable) keeper.restore(answer);
    keeper.adopt(answer);
  }, [keeper, answer, writable]);
  useEffect(() => {
    const again = () => void keeper.flush();
    keeper.wake();
    // The network is back, or the person is: after signing in on another page, say.
    for (const sign of ['online', 'focus'] as const) window.addEventListener(sign, again);
    return () => {
      for (const sign of ['online', 'focus'] as const) window.removeEventListener(sign, again);
      keeper.rest();
    };
  }, [keeper]);
  // What the server keeps of a signed inspection is what is shown, also when the last save of this page came after it.
  const content = answer.state === 'signed' ? answer.content : view.content;
  const judgement = useMemo(() => judge(answer, content), [answer, content]);
  return {
    ...view,
    content,
    judgement,
    change: keeper.change,
    takeTheirs: keeper.takeTheirs,
    keepMine: keeper.keepMine,
    flush: keeper.flush,
  };
}
