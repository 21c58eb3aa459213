'use client';

import { getIn, useFormikContext } from 'formik';
import { useEffect, useRef } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { useFormProblem } from './problem-form';

export interface FormStatusProps {
  /** What a path of the request is called in this form, for errors that belong to no field. */
  labelOf?: (path: string) => string;
}

function countErrors(errors: unknown): number {
  if (typeof errors === 'string') return 1;
  if (typeof errors !== 'object' || errors === null) return 0;
  return Object.values(errors).reduce((sum: number, value) => sum + countErrors(value), 0);
}

/** What became of the last attempt to send: the refusal, or how many fields need attention. Takes the focus when it appears. */
export function FormStatus({ labelOf }: FormStatusProps) {
  const t = useMessages('forms');
  const { problem, values } = useFormProblem();
  const { errors, submitCount, isSubmitting } = useFormikContext();
  const element = useRef<HTMLDivElement>(null);
  const wrong = submitCount > 0 && !isSubmitting ? countErrors(errors) : 0;
  useEffect(() => {
    if (problem !== undefined) element.current?.focus();
  }, [problem]);
  // Once for each attempt: later, while fields are being mended, the focus belongs to the fields.
  const toldOf = useRef(0);
  useEffect(() => {
    if (wrong === 0 || toldOf.current === submitCount) return;
    toldOf.current = submitCount;
    element.current?.focus();
  }, [wrong, submitCount]);
  if (wrong > 0) return <Notice ref={element} kind="refusal" title={t('attention', { count: wrong })} />;
  if (problem === undefined) return null;
  const shown = (problem.errors ?? []).map(({ path }) => path).filter((path) => path !== '' && getIn(values, path) !== undefined);
  return <ProblemNotice ref={element} problem={problem} shownElsewhere={shown} labelOf={labelOf} />;
}
