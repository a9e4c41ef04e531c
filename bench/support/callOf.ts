import type { BrowserContext } from 'playwright';
import type { House } from '../../e2e/support/house';
import type { Call } from '../../e2e/support/night';

/** Sends JSON requests with the lead's cookies; throws what the server said when one is refused. */
export const callOf =
  (lead: BrowserContext, { address }: House): Call =>
  async (method, path, data) => {
    const answer = await lead.request.fetch(`${address}${path}`, {
      method,
      headers: { origin: address },
      data,
    });
    if (!answer.ok()) throw new Error(`${method} ${path}: ${await answer.text()}`);
    return answer.status() === 204 ? (undefined as never) : answer.json();
  };
