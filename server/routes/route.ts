import type { Request, Response } from 'express';
import type { CommandContext } from '@/server/commands/commandContext';
import type { Role } from '@/shared/contracts/common';
import type { YardAction } from '@/shared/contracts/yards';
import type { z } from '@/shared/zod';

/**
 * Who may call a route. `public`: anyone. `signed_in`: any account. `{ yard }`: members of the yard in the path whose role
 * may do that action; everybody else is told that the yard is not there. With `orSelf` also the member whose id stands in
 * that path parameter, whatever the role. `demonstration`: anyone, but only while the demonstration runs.
 */
export type Access = 'public' | 'signed_in' | 'demonstration' | { yard: YardAction; orSelf?: string };

export interface SignedInUser {
  id: string;
  sessionId: string;
}

export interface RequestContext<Params, Query, Body> extends CommandContext {
  requestId: string;
  params: Params;
  query: Query;
  body: Body;
  /** Present on every route that is not public. */
  user: SignedInUser;
  /** Present on yard routes. */
  role: Role;
  yardId: string;
  /** For cookies and headers only; the body of the answer is what the handler returns. */
  request: Request;
  response: Response;
}

type Parsed<S> = S extends z.ZodType ? z.output<S> : Record<string, never>;

export interface RouteOptions<P extends z.ZodType | undefined, Q extends z.ZodType | undefined, B extends z.ZodType | undefined, R extends z.ZodType> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Path below /api in Express form, for example '/yards/:yardId/zones'. */
  path: string;
  /** Heading in the API description. */
  tag: string;
  /** One line that says what the route does. */
  summary: string;
  access: Access;
  params?: P;
  query?: Q;
  body?: B;
  response: R;
  /** 200 unless said otherwise. */
  status?: 200 | 201 | 202;
  /** auth: the strict limit for sign-in, sign-up and reset; standard for the rest. */
  limit?: 'auth' | 'standard';
  /**
   * Runs inside one transaction unless the method is get. What it returns is parsed by `response`, so nothing else leaves.
   */
  handler(context: RequestContext<Parsed<P>, Parsed<Q>, Parsed<B>>): Promise<z.input<R>>;
  /** False for work that must not hold a transaction open, such as the jump of the demonstration clock. */
  transaction?: boolean;
}

/** A route with its types folded away: a table entry for the app, the API description and the test that walks all routes. */
export interface Route {
  method: RouteOptions<undefined, undefined, undefined, z.ZodType>['method'];
  path: string;
  tag: string;
  summary: string;
  access: Access;
  params: z.ZodType | undefined;
  query: z.ZodType | undefined;
  body: z.ZodType | undefined;
  response: z.ZodType;
  status: 200 | 201 | 202;
  limit: 'auth' | 'standard';
  transaction: boolean;
  handler(context: RequestContext<unknown, unknown, unknown>): Promise<unknown>;
}

/** Declares one route of the API. */
export function defineRoute<R extends z.ZodType, P extends z.ZodType | undefined = undefined, Q extends z.ZodType | undefined = undefined, B extends z.ZodType | undefined = undefined>(
  options: RouteOptions<P, Q, B, R>,
): Route {
  return {
    method: options.method,
    path: options.path,
    tag: options.tag,
    summary: options.summary,
    access: options.access,
    params: options.params,
    query: options.query,
    body: options.body,
    response: options.response,
    status: options.status ?? 200,
    limit: options.limit ?? 'standard',
    transaction: options.transaction ?? options.method !== 'get',
    handler: options.handler,
  };
}
