import type { z } from 'zod';

export type HttpMethod = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/**
 * One call of the HTTP contract. Route handler, SWR hook, form and OpenAPI document all take their shapes from here.
 * `changes` says whether the call changes a record; one that does cannot be routed without its event.
 */
export interface Operation<
  Changes extends boolean = boolean,
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Response extends z.ZodType = z.ZodType,
> {
  readonly name: string;
  readonly method: HttpMethod;
  readonly path: `/api/${string}`;
  readonly summary: string;
  readonly changes: Changes;
  /** `stream`: the body is a file and is handed on unread. */
  readonly bodyKind?: 'json' | 'stream';
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  readonly response?: Response;
  readonly status: 200 | 201 | 202 | 204;
}

export type ParamsOf<O> = O extends { readonly params: infer S extends z.ZodType } ? z.output<S> : undefined;
export type QueryOf<O> = O extends { readonly query: infer S extends z.ZodType } ? z.output<S> : undefined;
export type BodyOf<O> = O extends { readonly body: infer S extends z.ZodType } ? z.output<S> : undefined;
export type AnswerOf<O> = O extends { readonly response: infer S extends z.ZodType } ? z.output<S> : undefined;

/** Keeps the literal types of a contract. */
export function operation<const O extends Operation>(contract: O): O {
  return contract;
}
