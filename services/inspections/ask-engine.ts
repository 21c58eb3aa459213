import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { AskEngine } from '@/services/contracts/live-judgement';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import { Problem } from '@/services/http/problem';

/** The engine as the bench asks it: a guard band that leaves no zone makes the reading not-evaluable instead of a fault. */
export const askEngine: AskEngine = (body) => {
  const answer = evaluate(body, { zoneless: 'not-evaluable' });
  return answer.ok ? { evaluation: answer.answer } : { faults: answer.faults };
};

/** POST /api/evaluate: the engine alone, every fault with the engine's own path. Problem: invalid-input. */
export function evaluateAlone(body: unknown): EvaluationAnswer {
  const answer = evaluate(body, { zoneless: 'fault' });
  if (answer.ok) return answer.answer;
  const { faults } = answer;
  throw new Problem(
    'invalid-input',
    `${String(faults.length)} fault(s): ${faults
      .slice(0, 20)
      .map(({ path, message }) => `${path} ${message}`)
      .join('; ')}`,
    faults,
  );
}
