/** RFC 9457 answer as pages use it. */
export interface ProblemBody {
  readonly type: string;
  readonly title: string;
  readonly status: number;
  readonly detail: string;
  readonly cure?: string;
  readonly errors?: readonly { readonly path: string; readonly message: string }[];
  readonly [key: string]: unknown;
}

/** A refused or failed call; `problem.status` is 0 when the network gave no answer. */
export class ProblemError extends Error {
  constructor(readonly problem: ProblemBody) {
    super(problem.detail);
    this.name = 'ProblemError';
  }
}

async function read(response: Response): Promise<unknown> {
  const body: unknown = response.status === 204 ? null : await response.json().catch(() => null);
  if (response.ok) return body;
  const fallback: ProblemBody = {
    type: 'about:blank',
    title: response.statusText || 'The server answered with an error',
    status: response.status,
    detail: `The server answered ${String(response.status)}.`,
  };
  throw new ProblemError((body as ProblemBody | null) ?? fallback);
}

async function call(url: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(url, init);
  } catch {
    throw new ProblemError({
      type: 'about:blank',
      title: 'No connection',
      status: 0,
      detail: 'The server cannot be reached. What you entered is kept on this page.',
    });
  }
}

/** SWR fetcher for JSON. Throws ProblemError. */
export async function fetchJson<Answer>(url: string): Promise<Answer> {
  return (await read(await call(url, { headers: { accept: 'application/json' } }))) as Answer;
}

export interface Sent<Answer> {
  readonly answer: Answer;
  readonly etag: string | null;
  readonly status: number;
}

/** Sends JSON. Throws ProblemError; a refused If-Match is status 412. */
export async function sendJson<Answer>(
  url: string,
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  body?: unknown,
  headers: Record<string, string> = {},
): Promise<Sent<Answer>> {
  const response = await call(url, {
    method,
    headers: { accept: 'application/json', ...(body === undefined ? {} : { 'content-type': 'application/json' }), ...headers },
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
  });
  return { answer: (await read(response)) as Answer, etag: response.headers.get('etag'), status: response.status };
}
