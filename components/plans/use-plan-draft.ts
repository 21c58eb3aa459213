import { useCallback, useMemo, useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';
import { contentOf, type Plan, type PlanContent } from '@/services/contracts/plan-content';
import { typedPlanFaults } from '@/services/contracts/plan-faults';
import type { Fault } from '@/services/engine/evaluate/fault';

export interface PlanDraft {
  readonly content: PlanContent;
  readonly faults: readonly Fault[];
  readonly changed: boolean;
  readonly busy: boolean;
  readonly problem: Problem | undefined;
  readonly change: (next: PlanContent) => void;
  readonly save: () => Promise<void>;
  /** Puts away what was typed and takes the issue as it stands on the server. */
  readonly takeTheirs: (plan: Plan) => void;
}

/** A draft being typed; saved on demand against the version that was read, so that nobody's work is overwritten unseen. */
export function usePlanDraft(plan: Plan, onSaved: (plan: Plan) => void): PlanDraft {
  const [content, setContent] = useState<PlanContent>(() => contentOf(plan));
  const [changed, setChanged] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const faults = useMemo(() => typedPlanFaults(content), [content]);
  const change = useCallback((next: PlanContent) => {
    setContent(next);
    setChanged(true);
  }, []);
  const save = async () => {
    setBusy(true);
    setProblem(undefined);
    try {
      const headers = { 'if-match': `"${String(plan.version)}"` };
      onSaved(await sendJson<Plan>(`/api/plans/${plan.id}`, { method: 'PUT', headers, body: content }));
      setChanged(false);
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  const takeTheirs = (theirs: Plan) => {
    setContent(contentOf(theirs));
    setChanged(false);
    setProblem(undefined);
    onSaved(theirs);
  };
  return { content, faults, changed, busy, problem, change, save, takeTheirs };
}
