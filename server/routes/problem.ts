import { randomUUID } from 'node:crypto';
import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, Request, Response } from 'express';
import { ZodError } from 'zod';
import { Fault } from '#server/services/fault';
import type { Log } from '#server/services/log';
import type { Problem } from '#shared/api/problem';

/** Answers with problem details (RFC 9457). */
function answer(response: Response, problem: Omit<Problem, 'type' | 'title'>): void {
  const title = STATUS_CODES[problem.status] ?? 'Problem';
  response
    .status(problem.status)
    .type('application/problem+json')
    .send(JSON.stringify({ type: 'about:blank', title, ...problem }));
}

const fieldsOf = (error: ZodError): Problem['fields'] =>
  error.issues.map((issue) => ({ path: issue.path.join('.') || 'body', message: issue.message }));

const unreadable: Record<string, [detail: string, mend: string]> = {
  'entity.parse.failed': [
    'The request is not readable JSON.',
    'Send it again; reload the page if it comes back.',
  ],
  'entity.too.large': [
    'The request is larger than 1 MB.',
    'Send less at once; files go through the Library.',
  ],
};

/** A database that is away answers in words too: what was typed stays on the page. */
const databaseAway = (error: unknown): boolean =>
  error instanceof Error &&
  /SequelizeConnection|ECONNREFUSED|Connection terminated|timeout exceeded|starting up|57P0/i.test(
    `${error.name} ${error.message}`,
  );

/** Last middleware: every error becomes an answer that says what, where and how to mend. */
export const problems =
  (log: Log): ErrorRequestHandler =>
  (error: unknown, request: Request, response: Response, next) => {
    if (response.headersSent) return next(error);
    if (error instanceof Fault) {
      const { status, message: detail, mend, fields } = error;
      return answer(response, { status, detail, mend, fields });
    }
    if (error instanceof ZodError) {
      const fields = fieldsOf(error);
      const [first] = fields;
      const detail = first
        ? `${first.path}: ${first.message}`
        : 'Something in the request is not as expected.';
      return answer(response, {
        status: 422,
        detail,
        mend: 'Mend the marked fields and send again.',
        fields,
      });
    }
    const known = unreadable[(error as { type?: string } | null)?.type ?? ''];
    if (known) return answer(response, { status: 400, detail: known[0], mend: known[1], fields: [] });
    const id = randomUUID().slice(0, 8);
    log.error({ err: error, id, path: request.path }, 'request failed');
    if (databaseAway(error)) {
      const detail = 'The database does not answer.';
      return answer(response, {
        status: 503,
        detail,
        mend: 'Try again in a moment; nothing was changed.',
        fields: [],
        id,
      });
    }
    const detail = 'Something broke on our side.';
    const mend = `Try again. If it comes back, tell whoever runs Lampyrid the number ${id}.`;
    return answer(response, { status: 500, detail, mend, fields: [], id });
  };
