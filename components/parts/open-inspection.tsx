'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';

export interface OpenInspectionProps {
  readonly part: string;
  readonly requirement: string;
  readonly label: string;
  /** The one that comes next stands out, and fits a gloved finger. */
  readonly next?: boolean;
}

/** Opens (or goes on with) the inspection of a requirement of a part. */
export function OpenInspection({ part, requirement, label, next = false }: OpenInspectionProps) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const open = async () => {
    setBusy(true);
    setProblem(undefined);
    try {
      const { id } = await sendJson<{ id: string }>('/api/inspections', { body: { subject: { part }, requirement } });
      router.push(`/inspections/${id}`);
    } catch (failure) {
      setProblem(problemOf(failure));
      setBusy(false);
    }
  };
  return (
    <>
      <Button {...(next ? { kind: 'primary', size: 'capture' } : {})} busy={busy} onClick={() => void open()}>
        {label}
      </Button>
      {problem ? <ProblemNotice problem={problem} /> : null}
    </>
  );
}
