import { pairingSchema, pairingStateSchema } from '#shared/api/displays';
import { call, wait } from './call';

/** While the server does not answer, it is asked again this often, ms. */
const awayMs = 2000;
/** How much slower a display asks that was told to slow down, ms. */
const slowerMs = 5000;

const line = (className: string, text: string): HTMLElement => {
  const element = document.createElement('div');
  element.className = className;
  element.textContent = text;
  return element;
};

/** Shows a code in two spoken parts: the word, then the digits. */
function show(place: HTMLElement, code: string): void {
  const [word = '', digits = ''] = code.split(' ');
  place.replaceChildren(
    line('word', word),
    line('digits', digits),
    line('how', 'Type this on Outputs to join'),
  );
  place.hidden = false;
}

/** A dim mark, so that who sets up sees that the page runs and waits for the server. Never over a picture. */
export function showAway(place: HTMLElement): void {
  place.replaceChildren(line('away', '·'));
  place.hidden = false;
}

export function hide(place: HTMLElement): void {
  place.hidden = true;
  place.replaceChildren();
}

const rasterNow = (): [number, number] => [
  Math.max(16, Math.round(window.innerWidth * window.devicePixelRatio)),
  Math.max(16, Math.round(window.innerHeight * window.devicePixelRatio)),
];

/** Waits until somebody has joined the code, or it has ended. True when joined. */
async function untilJoined(deviceSecret: string, intervalMs: number): Promise<boolean> {
  let pause = intervalMs;
  for (;;) {
    await wait(pause);
    const { status, body } = await call('POST', '/api/pairing/wait', { deviceSecret });
    const answer = pairingStateSchema.safeParse(body);
    if (status === 200 && answer.success) {
      if (answer.data.state === 'joined') return true;
      if (answer.data.state === 'expired') return false;
      pause = answer.data.state === 'slow-down' ? intervalMs + slowerMs : intervalMs;
    } else pause = awayMs;
  }
}

/** Shows codes, one after the other, until this display is joined. Its token is then in a cookie. */
export async function pair(place: HTMLElement): Promise<void> {
  for (;;) {
    const { status, body } = await call('POST', '/api/pairing', { raster: rasterNow() });
    const asked = pairingSchema.safeParse(body);
    if (status !== 201 || !asked.success) {
      showAway(place);
      await wait(awayMs);
      continue;
    }
    show(place, asked.data.code);
    const joined = await untilJoined(asked.data.deviceSecret, asked.data.intervalMs);
    hide(place);
    if (joined) return;
  }
}
