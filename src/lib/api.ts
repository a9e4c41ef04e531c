import type { Problem } from '#shared/api/problem';

/** What the server, or the lack of it, said: fields as in RFC 9457, with words for people. */
export class ProblemError extends Error {
  readonly status: number;
  readonly title: string;
  readonly detail: string;
  readonly mend: string;
  readonly fields: Problem['fields'];

  constructor(problem: Partial<Problem> & { status: number }) {
    super(problem.detail ?? 'Something did not work.');
    this.status = problem.status;
    this.title = problem.title ?? 'Problem';
    this.detail = problem.detail ?? 'Something did not work.';
    this.mend = problem.mend ?? 'Try again.';
    this.fields = problem.fields ?? [];
  }
}

const noAnswer = (): ProblemError =>
  new ProblemError({
    status: 0,
    title: 'No answer',
    detail: 'Lampyrid does not answer.',
    mend: 'Look at the network, then try again. What you typed is still here.',
  });

const readProblem = async (response: Response): Promise<ProblemError> => {
  const body: unknown = await response.json().catch(() => null);
  const problem = typeof body === 'object' && body !== null ? (body as Partial<Problem>) : {};
  return new ProblemError({
    detail: `The server answered ${response.status}.`,
    ...problem,
    status: response.status,
  });
};

const call = async <T>(method: string, path: string, body?: unknown): Promise<T> => {
  const response = await fetch(path, {
    method,
    credentials: 'same-origin',
    headers: body === undefined && method === 'GET' ? {} : { 'content-type': 'application/json' },
    body: method === 'GET' ? undefined : JSON.stringify(body ?? {}),
  }).catch(() => {
    throw noAnswer();
  });
  if (!response.ok) throw await readProblem(response);
  if (response.status === 204) return undefined as T;
  return (await response.json().catch(() => undefined)) as T;
};

/** JSON over HTTP to our own server. Rejects with a ProblemError. */
export const api = {
  get: <T>(path: string) => call<T>('GET', path),
  post: <T>(path: string, body?: unknown) => call<T>('POST', path, body),
  put: <T>(path: string, body?: unknown) => call<T>('PUT', path, body),
  patch: <T>(path: string, body?: unknown) => call<T>('PATCH', path, body),
  delete: <T = void>(path: string) => call<T>('DELETE', path),
};
