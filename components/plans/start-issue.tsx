'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import { contentOf, type Plan, type PlanContent } from '@/services/contracts/plan-content';

const empty: PlanContent = { views: [], criteria: {}, route: [], rework: [], effectivity: null };

type StartIssueProps =
  | { /** The issue whose content the next one begins with. */ readonly from: Plan }
  | { readonly drawing: string; readonly revision: string };

/** Starts the next plan issue as a draft: empty, or as a copy of an earlier one. */
export function StartIssue(props: StartIssueProps) {
  const t = useMessages('plans');
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const copied = 'from' in props;
  const start = async () => {
    setBusy(true);
    setProblem(undefined);
    const { drawing, revision } = copied ? props.from : props;
    try {
      const body = { ...(copied ? contentOf(props.from) : empty), revision };
      const { id } = await sendJson<Plan>(`/api/drawings/${encodeURIComponent(drawing)}/plans`, { body });
      router.push(`/plans/${id}`);
    } catch (failure) {
      setProblem(problemOf(failure));
      setBusy(false);
    }
  };
  return (
    <>
      <Button busy={busy} onClick={() => void start()}>
        {t(copied ? 'startCopy' : 'startEmpty')}
      </Button>
      {problem ? <ProblemNotice problem={problem} /> : null}
    </>
  );
}
