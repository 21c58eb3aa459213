/** RFC 9457 problem details as this product answers them. */
export interface Problem {
  type: string;
  title: string;
  status: number;
  detail?: string;
  errors?: { path: string; message: string }[];
}

/** A refused request; carries what the server said. */
export class ProblemError extends Error {
  constructor(readonly problem: Problem) {
    super(problem.detail ?? problem.title);
    this.name = 'ProblemError';
  }
}

/** Types for what happens before any server answers. */
export const noAnswerType = 'about:blank#no-answer';
export const notAProblemType = 'about:blank#not-a-problem';

/** Reads a problem out of any failure. What is no problem document becomes one that says so. */
export function problemOf(failure: unknown): Problem {
  if (failure instanceof ProblemError) return failure.problem;
  if (failure instanceof TypeError) return { type: noAnswerType, title: '', status: 0 };
  return { type: notAProblemType, title: '', status: 0, detail: failure instanceof Error ? failure.message : String(failure) };
}
