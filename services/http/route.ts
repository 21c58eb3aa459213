import type { z } from 'zod';
import { appendEvent, type NewEvent } from '@/db/repositories/events';
import { touchSitting } from '@/db/repositories/sittings';
import { inTransaction, reading, type Reading, type Work } from '@/db/work';
import { may, permissions, type PermissionName } from '@/services/accounts/permissions';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf, Operation, ParamsOf, QueryOf } from '@/services/contracts/operation';
import type { EventKind } from './event-kinds';
import { toProblem } from './faults';
import { replayed, rememberAnswer } from './idempotency';
import { Problem, problemResponse } from './problem';
import { readJson } from './read-body';
import { refuseForeignOrigin } from './same-origin';
import { actorOfRequest } from './request-actor';

/** What a use-case is told: validated params, query and body, and the raw request for streams and headers. */
export interface Input<O> {
  readonly params: ParamsOf<O>;
  readonly query: QueryOf<O>;
  readonly body: BodyOf<O>;
  readonly request: Request;
  /** Version named by If-Match, when the header is there. */
  readonly ifMatch: number | null;
}

/** A use-case's answer to a change: what goes out, and the events that tell of it (kind is the route's unless given). */
export interface Recorded<Answer> {
  readonly answer: Answer;
  readonly events: readonly (Omit<NewEvent, 'kind'> & { readonly kind?: EventKind })[];
  readonly status?: number;
  readonly headers?: Readonly<Record<string, string>>;
}

/** A reader's answer when it needs its own headers or is no JSON. */
export class Raw {
  constructor(readonly response: Response) {}
}

type Who = PermissionName | 'anyone';
type Caller<W extends Who> = W extends 'anyone' ? Actor | null : Actor;

interface ReadDeclaration<O extends Operation, W extends Who> {
  readonly contract: O;
  readonly who: W;
  readonly event: null;
  readonly call: (reading: Reading & { readonly actor: Caller<W> }, input: Input<O>) => Promise<AnswerOf<O> | Raw>;
}

interface ChangeDeclaration<O extends Operation, W extends Who, P> {
  readonly contract: O;
  readonly who: W;
  readonly event: EventKind;
  /** Slow work outside the transaction (receiving a file, checking a password) whose result the call gets. */
  readonly prepare?: (actor: Caller<W>, input: Input<O>) => Promise<P>;
  readonly call: (work: Work & { readonly actor: Caller<W> }, input: Input<O>, prepared: P) => Promise<Recorded<AnswerOf<O>>>;
}

type Answering = (
  request: Request,
  context: { params: Promise<Record<string, string | string[] | undefined>> },
) => Promise<Response>;

/** A handler that can be asked what it declared, so that one test holds every route against its permission. */
export type Handler = Answering & { readonly declared: { readonly contract: Operation; readonly who: Who } };

/**
 * A route handler as a declaration: who may, which contract, which event the journal gets, one call.
 * A call that changes something does not type-check without its event, and the event is written in the same transaction.
 */
export function route<O extends Operation<false>, W extends Who>(declaration: ReadDeclaration<O, W>): Handler;
export function route<O extends Operation<true>, W extends Who, P = undefined>(declaration: ChangeDeclaration<O, W, P>): Handler;
export function route(declaration: ReadDeclaration<Operation, Who> | ChangeDeclaration<Operation, Who, unknown>): Handler {
  const { contract, who } = declaration;
  const answer: Answering = async (request, context) => {
    try {
      if (contract.method !== 'GET') refuseForeignOrigin(request);
      const actor = await permitted(request, who, contract.name);
      const input = await inputOf(contract, request, await context.params);
      if (declaration.event === null) return await answerRead(declaration, actor, input);
      return await answerChange(declaration, actor, input);
    } catch (error) {
      return problemResponse(toProblem(error, contract.name));
    }
  };
  return Object.assign(answer, { declared: { contract, who } });
}

async function permitted(request: Request, who: Who, call: string): Promise<Actor | null> {
  const actor = await actorOfRequest(request, call);
  if (who === 'anyone') return actor;
  if (!actor) throw new Problem('not-signed-in', 'There is no valid session. Sign in and send the request again.');
  if (!may(actor, who)) throw new Problem('not-permitted', permissions[who].sentence);
  return actor;
}

async function inputOf(contract: Operation, request: Request, params: Record<string, unknown>): Promise<Input<Operation>> {
  const query = Object.fromEntries(new URL(request.url).searchParams);
  const body = contract.body && contract.bodyKind !== 'stream' ? await readJson(request) : undefined;
  const parsedParams = contract.params?.safeParse(params);
  if (parsedParams && !parsedParams.success) throw new Problem('not-found', 'There is nothing at this address.');
  const parsedQuery = contract.query?.safeParse(query);
  const parsedBody = contract.body && contract.bodyKind !== 'stream' ? contract.body.safeParse(body ?? {}) : undefined;
  const errors = [...fieldErrors(parsedQuery), ...fieldErrors(parsedBody)];
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path || 'body'}: ${message}`).join('; '), errors);
  const match = /^(?:W\/)?"?(\d+)"?$/.exec(request.headers.get('if-match') ?? '');
  return {
    params: parsedParams?.data as never,
    query: parsedQuery?.data as never,
    body: parsedBody?.data as never,
    request,
    ifMatch: match ? Number(match[1]) : null,
  };
}

function fieldErrors(parsed: z.ZodSafeParseResult<unknown> | undefined): { path: string; message: string }[] {
  if (!parsed || parsed.success) return [];
  return parsed.error.issues.flatMap((issue) => {
    const path = issue.path.map(String).join('.');
    // An unknown key's path ends in that key, so that the sender finds it.
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({ path: path ? `${path}.${key}` : key, message: 'is not a known field' }));
    return [{ path, message: issue.message }];
  });
}

async function answerRead(
  declaration: ReadDeclaration<Operation, Who>,
  actor: Actor | null,
  input: Input<Operation>,
): Promise<Response> {
  const answer = await declaration.call({ ...reading(), actor }, input);
  if (answer instanceof Raw) return answer.response;
  return jsonResponse(declaration.contract, answer, declaration.contract.status, {});
}

async function answerChange(
  declaration: ChangeDeclaration<Operation, Who, unknown>,
  actor: Actor | null,
  input: Input<Operation>,
): Promise<Response> {
  const { contract } = declaration;
  // Whoever changes something is working: the sitting goes on.
  if (actor?.sessionId) await touchSitting(actor.sessionId);
  const prepared = declaration.prepare ? await declaration.prepare(actor, input) : undefined;
  return inTransaction(actor, async (work) => {
    const before = await replayed(work, contract, input);
    if (before) return before;
    const recorded = await declaration.call({ ...work, actor }, input, prepared);
    for (const event of recorded.events) await appendEvent(work, { ...event, kind: event.kind ?? declaration.event });
    const response = jsonResponse(contract, recorded.answer, recorded.status ?? contract.status, recorded.headers ?? {});
    return rememberAnswer(work, input, response);
  });
}

function jsonResponse(contract: Operation, answer: unknown, status: number, headers: Readonly<Record<string, string>>): Response {
  const all = new Headers({ 'cache-control': 'no-store', ...headers });
  if (status === 204) return new Response(null, { status, headers: all });
  // In tests an answer outside its contract is a fault; in service the contract's own tests have shown it.
  const body: unknown = process.env.NODE_ENV === 'production' || !contract.response ? answer : contract.response.parse(answer);
  all.set('content-type', 'application/json');
  return new Response(JSON.stringify(body), { status, headers: all });
}
