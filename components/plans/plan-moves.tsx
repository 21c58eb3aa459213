'use client';

import { useState } from 'react';
import { FormStatus } from '@/components/forms/form-status';
import { PasswordField } from '@/components/forms/password-field';
import { ProblemForm, useProblemForm } from '@/components/forms/problem-form';
import { sendJson } from '@/components/forms/send-json';
import { SubmitButton } from '@/components/forms/submit-button';
import { TextAreaField } from '@/components/forms/text-field';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { Plan } from '@/services/contracts/plan-content';

export type PlanMove = 'check' | 'approval' | 'withdrawal';

interface MoveProps {
  readonly plan: Plan;
  readonly move: PlanMove;
  readonly onDone: (plan: Plan) => void;
}

function MoveForm({ plan, move, onDone }: MoveProps) {
  const t = useMessages('plans');
  const form = useProblemForm({
    initialValues: { reason: '', password: '' },
    onSubmit: async ({ reason, password }) => {
      const body = move === 'check' ? {} : move === 'approval' ? { password } : { password, reason };
      onDone(await sendJson<Plan>(`/api/plans/${plan.id}/${move}`, { body }));
    },
  });
  const named = { drawing: plan.drawing, revision: plan.revision, issue: plan.issue };
  return (
    <ProblemForm form={form} label={t(`moves.${move}`)}>
      <p className="border-s-4 border-accent ps-3">{t(`sentences.${move}`, named)}</p>
      <FormStatus />
      {move === 'withdrawal' ? <TextAreaField name="reason" label={t('reason')} maxLength={400} /> : null}
      {move === 'check' ? null : <PasswordField name="password" label={t('password')} />}
      <div>
        <SubmitButton kind={move === 'withdrawal' ? 'danger' : 'primary'}>{t(`moves.${move}`)}</SubmitButton>
      </div>
    </ProblemForm>
  );
}

/** One move of a plan issue, with the sentence that it states. */
export function MoveButton(props: MoveProps) {
  const t = useMessages('plans');
  const { move } = props;
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind={move === 'withdrawal' ? 'danger' : 'primary'} onClick={() => setOpen(true)}>
        {t(`moves.${move}`)}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t(`moves.${move}`)}>
        <MoveForm
          {...props}
          onDone={(plan) => {
            setOpen(false);
            props.onDone(plan);
          }}
        />
      </Dialog>
    </>
  );
}
