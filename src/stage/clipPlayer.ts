import { ImageSource } from 'pixi.js';

/** How far a clip may be off before it is nudged, and before it is put to its place, seconds. */
const nudgeable = 0.25;
const nudge = 0.05;
const defaultFps = 30;
/** Least time between two seeks, ms: a seek needs time to land before its error counts. */
const betweenSeeks = 400;

/** What to do with a clip that is `error` seconds late (negative: early). Half a frame either way is on time. */
export const correction = (error: number, fps: number): { seek: boolean; speed: number } => {
  if (Math.abs(error) < 0.5 / fps) return { seek: false, speed: 1 };
  if (Math.abs(error) < nudgeable) return { seek: false, speed: error > 0 ? 1 + nudge : 1 - nudge };
  return { seek: true, speed: 1 };
};

/** Distance to a target on a loop of `length` seconds, the short way round: positive when the clip is late. */
export const loopError = (target: number, at: number, length: number): number => {
  const error = (((target - at) % length) + length) % length;
  return error > length / 2 ? error - length : error;
};

export interface ClipPlayer {
  /** The newest frame, or null while there is none yet. */
  source(): ImageSource | null;
  /** Holds the clip to a place, in seconds, at a speed. */
  hold(positionS: number, rate: number, paused: boolean): void;
  /** Stops without giving up what is loaded. */
  rest(): void;
  dispose(): void;
}

/** Plays one clip without sound, looped, held to the hub's clock. */
export const createClipPlayer = (url: string, durationS: number, fps: number | null): ClipPlayer => {
  const video = document.createElement('video');
  video.muted = true;
  video.loop = true;
  video.playsInline = true;
  video.preload = 'auto';
  video.src = url;
  let image: ImageSource | null = null;
  let handle = 0;
  let lastSeek = Number.NEGATIVE_INFINITY;
  let over = false;

  const onFrame = (): void => {
    if (over) return;
    handle = video.requestVideoFrameCallback(onFrame);
    if (image) image.update();
    else if (video.videoWidth > 0)
      image = new ImageSource({
        resource: video,
        alphaMode: 'no-premultiply-alpha',
        autoGenerateMipmaps: false,
      });
  };
  handle = video.requestVideoFrameCallback(onFrame);

  const seek = (to: number): void => {
    lastSeek = performance.now();
    video.currentTime = to;
  };

  return {
    source: () => image,
    hold(positionS, rate, paused) {
      if (video.readyState < HTMLMediaElement.HAVE_METADATA || video.seeking) return;
      const length = Number.isFinite(video.duration) && video.duration > 0 ? video.duration : durationS;
      const error = loopError(positionS % length, video.currentTime, length);
      if (paused) {
        if (!video.paused) video.pause();
        if (Math.abs(error) > 0.5 / (fps ?? defaultFps)) seek(positionS % length);
        return;
      }
      const { seek: far, speed } = correction(error, fps ?? defaultFps);
      const wanted = Math.min(4, Math.max(0.1, rate * speed));
      if (video.playbackRate !== wanted) video.playbackRate = wanted;
      if (far && performance.now() - lastSeek > betweenSeeks) seek(positionS % length);
      if (video.paused) video.play().catch(() => undefined);
    },
    rest() {
      if (!video.paused) video.pause();
    },
    dispose() {
      over = true;
      video.cancelVideoFrameCallback(handle);
      video.pause();
      video.removeAttribute('src');
      video.load();
      image?.destroy();
      image = null;
    },
  };
};
