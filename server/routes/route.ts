import type { Request, Response, Router } from 'express';
import type { ZodType } from 'zod';
import { Fault } from '#server/services/fault';
import type { Caller, DisplayCaller } from '#server/services/who';
import { type Action, may, type Principal } from '#shared/show/roles';

/** Who sends a request; set by the app before any route runs. */
export interface Who {
  caller: Caller | null;
  display: DisplayCaller | null;
}

export interface RouteFacts<Body> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  path: string;
  /** Row of the role table that says who may. */
  action: Action;
  /** Checked body; left out for none. */
  body?: ZodType<Body>;
  /** Status of an answer with a value; 200 unless told. Nothing to say is 204. */
  status?: number;
}

/** One request as a route sees it. */
export interface Ask<Body> {
  request: Request;
  response: Response;
  body: Body;
  /** A part of the path, such as `id`. */
  param: (name: string) => string;
  who: Who;
  /** The signed-in member. Only for actions that the role table gives to the crew: 401 otherwise. */
  caller: Caller;
}

/** Every route of the program, for the test that holds each to the role table. */
export const routeList: { method: string; path: string; action: Action }[] = [];

const principalOf = ({ caller, display }: Who, action: Action): Principal => {
  if (caller && may(caller.role, action)) return caller.role;
  if (display && may('display', action)) return 'display';
  return caller?.role ?? (display ? 'display' : 'anyone');
};

/** 401 for a stranger, 403 for a member of the wrong role. */
const refuse = (who: Who): Fault =>
  who.caller
    ? new Fault(403, `Your role, ${who.caller.role}, may not do this.`, 'Ask the lead of your crew.')
    : new Fault(401, 'You are not signed in.', 'Sign in and try again.');

/**
 * Adds one route: checks the role, then the body, then runs the work and answers with what it returns. A work that
 * has answered by itself (a stream) returns `undefined` after `response.end`.
 */
export function route<Body = undefined>(
  router: Router,
  facts: RouteFacts<Body>,
  work: (ask: Ask<Body>) => Promise<unknown> | unknown,
): void {
  const { method, path, action } = facts;
  routeList.push({ method, path, action });
  router[method](path, async (request: Request, response: Response) => {
    const who = response.locals.who as Who;
    if (!may(principalOf(who, action), action)) throw refuse(who);
    const body = facts.body ? facts.body.parse(request.body ?? {}) : (undefined as Body);
    const answer = await work({
      request,
      response,
      body,
      who,
      param: (name) => String(request.params[name] ?? ''),
      get caller() {
        if (!who.caller) throw refuse(who);
        return who.caller;
      },
    });
    if (response.headersSent || response.destroyed) return;
    if (answer === undefined) response.status(204).end();
    else response.status(facts.status ?? 200).json(answer);
  });
}
