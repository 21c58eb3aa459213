import { problemCodes, type ProblemCode } from './problem-codes';

export interface FieldError {
  readonly path: string;
  readonly message: string;
}

/** A refusal with a code of the closed list. `errors` name fields or, for gates and signatures, reasons. */
export class Problem extends Error {
  constructor(
    readonly code: ProblemCode,
    detail: string,
    readonly errors: readonly FieldError[] = [],
    readonly more: Readonly<Record<string, unknown>> = {},
  ) {
    super(detail);
    this.name = 'Problem';
  }
}

/** RFC 9457 answer for a problem. */
export function problemResponse(problem: Problem): Response {
  const { status, title, cure } = problemCodes[problem.code];
  const body = {
    type: `/problems/${problem.code}`,
    title,
    status,
    detail: problem.message,
    cure,
    ...(problem.errors.length > 0 ? { errors: problem.errors } : {}),
    ...problem.more,
  };
  const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
  if (typeof problem.more.retryAfterS === 'number') headers.set('retry-after', String(problem.more.retryAfterS));
  return new Response(JSON.stringify(body), { status, headers });
}

/** Shorthand for what a person may not know exists. */
export function notFound(what: string): Problem {
  return new Problem('not-found', `${what} was not found, or is not yours to see.`);
}
