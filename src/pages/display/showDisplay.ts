import { keepAwake } from '@/inputs/wakeLock';
import { createShowLink } from '@/link/showLink';
import { call } from './call';
import { DisplayPicture } from './displayPicture';
import { recover } from './health';
import { keepPage } from './keepPage';
import { type Known, remember } from './lastPicture';
import { FrameMeter } from './reports';

export interface Self {
  displayId: string;
  showId: string;
}

/** Each ms. While the link is away, the server is asked whether we are still joined. */
const periods = { remember: 1000, vitals: 1000, self: 4000, recover: 5000 } as const;

/**
 * Draws a show's picture on a canvas until this display is taken out of the show. Goes on by itself while the hub is
 * away, over a reload as well.
 * @returns resolves once the display is no longer joined
 */
export async function showDisplay(canvas: HTMLCanvasElement, { displayId, showId }: Self): Promise<void> {
  const link = createShowLink({ showId, room: 'live', as: 'display' });
  const meter = new FrameMeter();
  const started = performance.now();
  let trouble: string | null = null;
  let awake = false;
  const note = (error: unknown): void => {
    trouble = (error instanceof Error ? error.message : String(error)).slice(0, 120);
    console.warn('display', error);
  };
  const picture = new DisplayPicture(canvas, link, displayId, note);

  const reportVitals = (): void => {
    const { status, linkMs, clockErrorMs } = link.getSnapshot();
    const { onBoard, wanted } = picture.files.counts();
    const rates = meter.read();
    Object.assign(document.documentElement.dataset, {
      link: status,
      fps: rates.fps,
      files: `${onBoard}/${wanted}`,
      still: picture.stillness.still,
    });
    link.reportVitals({
      displayId,
      ...rates,
      clockErrorMs,
      linkMs,
      filesOnBoard: onBoard,
      filesWanted: wanted,
      raster: picture.size,
      visible: !document.hidden,
      fullscreen: document.fullscreenElement !== null || window.innerHeight >= window.screen.height,
      awake,
      still: picture.stillness.still,
      changes: picture.changes.count,
      upS: Math.round((performance.now() - started) / 1000),
      trouble: picture.dark ? 'nothing is drawn, the graphics card is lost' : trouble,
    });
    trouble = null;
  };
  const stopAwake = keepAwake((state) => {
    awake = state === 'awake';
  });
  const stopLoop = eachFrame((performanceMs) => {
    picture.draw(performanceMs);
    meter.frame(performanceMs);
  }, note);
  const stopFaults = onFault(note);
  link.onDraft((id, map) => {
    if (id === displayId) picture.setDraft(map);
  });
  link.onReload((id) => {
    if (id === displayId) window.location.reload();
  });
  const timers = [
    setInterval(reportVitals, periods.vitals),
    setInterval(rememberer(displayId, picture), periods.remember),
    setInterval(() => {
      if (picture.dark) void recover();
    }, periods.recover),
  ];

  await untilOut(link);
  stopLoop();
  stopAwake();
  for (const timer of timers) clearInterval(timer);
  stopFaults();
  link.close();
  picture.dispose();
}

/** Hears of everything that nobody caught. Returns what stops it. */
function onFault(note: (error: unknown) => void): () => void {
  const onError = (event: ErrorEvent): void => note(event.error ?? event.message);
  const onRejection = (event: PromiseRejectionEvent): void => note(event.reason);
  window.addEventListener('error', onError);
  window.addEventListener('unhandledrejection', onRejection);
  return () => {
    window.removeEventListener('error', onError);
    window.removeEventListener('unhandledrejection', onRejection);
  };
}

/** After the first word from the hub; the first picture comes first, ms. */
const keepPageAfter = 3000;

/** Keeps what the hub has told, when it is news: writing a whole show each second would cost frames. */
function rememberer(displayId: string, picture: DisplayPicture): () => void {
  let kept: Known | null = null;
  return () => {
    const known = picture.fromHub();
    if (!known) return;
    const same =
      kept !== null &&
      known.state === kept.state &&
      known.manifest === kept.manifest &&
      known.map === kept.map &&
      known.name === kept.name;
    if (same) return;
    if (!kept) setTimeout(() => void keepPage(), keepPageAfter);
    kept = known;
    remember(displayId, known);
  };
}

/** Calls a work at each frame; a frame that fails is not the last. Returns what stops it. */
function eachFrame(work: (performanceMs: number) => void, onFault: (error: unknown) => void): () => void {
  const loop = (performanceMs: number): void => {
    handle = requestAnimationFrame(loop);
    try {
      work(performanceMs);
    } catch (error) {
      onFault(error);
    }
  };
  let handle = requestAnimationFrame(loop);
  return () => cancelAnimationFrame(handle);
}

/** Resolves once the server says that this display is not joined any more. No answer is no reason to go dark. */
function untilOut(link: ReturnType<typeof createShowLink>): Promise<void> {
  return new Promise((resolve) => {
    let asking = false;
    const ask = async (): Promise<void> => {
      const { status, mode } = link.getSnapshot();
      if (status === 'on' || asking) return;
      // A newer program is there; a night that is on is never broken off for it.
      if (status === 'outdated' && mode !== 'live') return window.location.reload();
      asking = true;
      const answer = await call('GET', '/api/display/self');
      asking = false;
      if (answer.status !== 401) return;
      clearInterval(timer);
      stop();
      resolve();
    };
    const timer = setInterval(() => void ask(), periods.self);
    const stop = link.subscribe(() => {
      if (link.getSnapshot().status === 'refused') void ask();
    });
  });
}
