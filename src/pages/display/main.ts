import { z } from 'zod';
import { call, wait } from './call';
import { forget, recallDisplay } from './lastPicture';
import { pair } from './pairing';
import { type Self, showDisplay } from './showDisplay';

const selfSchema = z.object({ displayId: z.string(), showId: z.string() });

/** Who this browser is: a joined display, nobody yet, or what it was before when the server does not answer. */
async function whoAmI(): Promise<Self | 'nobody'> {
  for (;;) {
    const { status, body } = await call('GET', '/api/display/self');
    const self = selfSchema.safeParse(body);
    if (status === 200 && self.success) return self.data;
    if (status === 401) return 'nobody';
    const before = recallDisplay();
    if (before) return before;
    await wait(1500);
  }
}

/** A canvas of its own for each life: a lost card or another show starts from a clean one. */
function freshCanvas(): HTMLCanvasElement {
  const old = document.getElementById('picture');
  const canvas = document.createElement('canvas');
  canvas.id = 'picture';
  old?.replaceWith(canvas);
  return canvas;
}

async function live(place: HTMLElement): Promise<void> {
  for (;;) {
    const who = await whoAmI();
    document.documentElement.dataset.state = who === 'nobody' ? 'pairing' : 'joined';
    if (who === 'nobody') {
      forget();
      freshCanvas();
      await pair(place);
    } else await showDisplay(freshCanvas(), who);
  }
}

function goFullscreen(): void {
  if (document.fullscreenElement) return;
  // Refused without a touch, or by the machine's policy: the picture is the same.
  document.documentElement.requestFullscreen({ navigationUI: 'hide' }).catch(() => undefined);
}

window.addEventListener('pointerdown', goFullscreen);
window.addEventListener('keydown', ({ key }) => {
  if (key === 'f' || key === 'Enter') goFullscreen();
});
window.addEventListener('contextmenu', (event) => event.preventDefault());

const place = document.getElementById('code');
if (place) void live(place);
