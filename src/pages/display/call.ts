/**
 * A question to our own server. `status` 0: no answer within `limitMs`. Never throws: a display has nobody to tell.
 */
export async function call(
  method: 'GET' | 'POST',
  path: string,
  body?: unknown,
  limitMs = 6000,
): Promise<{ status: number; body: unknown }> {
  try {
    const answer = await fetch(path, {
      method,
      signal: AbortSignal.timeout(limitMs),
      credentials: 'same-origin',
      headers: body === undefined ? {} : { 'content-type': 'application/json' },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    const read: unknown = await answer.json().catch(() => null);
    return { status: answer.status, body: read };
  } catch {
    return { status: 0, body: null };
  }
}

export const wait = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));
