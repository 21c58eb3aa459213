import { ProblemError } from '@/components/ui/problem';
import type { Problem } from '@/components/ui/problem';

export interface SendOptions {
  method?: 'POST' | 'PUT' | 'PATCH' | 'DELETE' | 'GET';
  body?: unknown;
  headers?: Record<string, string>;
  signal?: AbortSignal;
}

function isProblem(value: unknown): value is Problem {
  return typeof value === 'object' && value !== null && 'title' in value && 'status' in value;
}

async function bodyOf(response: Response): Promise<unknown> {
  const text = await response.text();
  if (text === '') return undefined;
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

/** What a call answered. Throws ProblemError with the server's problem details when it refused. */
export async function answerOf<Answer>(response: Response): Promise<Answer> {
  const answer = await bodyOf(response);
  if (response.ok) return answer as Answer;
  throw new ProblemError(
    isProblem(answer)
      ? answer
      : { type: 'about:blank', title: response.statusText || String(response.status), status: response.status },
  );
}

/** Calls our API with JSON. Throws ProblemError with the server's problem details, TypeError when nothing answered. */
export async function sendJson<Answer = unknown>(
  url: string,
  { method = 'POST', body, headers, signal }: SendOptions = {},
): Promise<Answer> {
  const response = await fetch(url, {
    method,
    signal: signal ?? null,
    headers: { accept: 'application/json', ...(body === undefined ? {} : { 'content-type': 'application/json' }), ...headers },
    body: body === undefined ? null : JSON.stringify(body),
  });
  return answerOf<Answer>(response);
}
