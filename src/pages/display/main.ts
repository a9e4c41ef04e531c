import { selfSchema } from '#shared/api/displays';
import { call, wait } from './call';
import { forget, recallDisplay } from './lastPicture';
import { hide, pair, showAway } from './pairing';
import { type Self, showDisplay } from './showDisplay';

/** A display that has a picture of its own goes on with it when the server takes longer than this to answer, ms. */
const picturedMs = 700;

/** Who this browser is: a joined display, nobody yet, or what it was before when the server does not answer. */
async function whoAmI(place: HTMLElement): Promise<Self | 'nobody'> {
  for (;;) {
    const before = recallDisplay();
    const { status, body } = await call(
      'GET',
      '/api/display/self',
      undefined,
      before ? picturedMs : undefined,
    );
    const self = selfSchema.safeParse(body);
    if (status === 200 && self.success) return self.data;
    if (status === 401) return 'nobody';
    // Wrong, should it have been taken out meanwhile: the link then learns it and the code comes up.
    if (before) return before;
    showAway(place);
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
    const who = await whoAmI(place);
    hide(place);
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
  if (key.toLowerCase() === 'f' || key === 'Enter') goFullscreen();
});
window.addEventListener('contextmenu', (event) => event.preventDefault());
window.addEventListener('pageshow', ({ persisted }) => {
  // A page that comes back from the browser's memory has lost its socket and its card's textures.
  if (persisted) window.location.reload();
});

const place = document.getElementById('code');
if (place) void live(place);
