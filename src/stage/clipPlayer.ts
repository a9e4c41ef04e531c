import { ImageSource } from 'pixi.js';
import { correction, loopError } from './clipClock';

const defaultFps = 30;
/** Least time between two seeks, ms: a seek needs time to land before its error counts. */
const betweenSeeks = 400;
/** A seek in a playing clip takes about this long (measured in software at 720p), so it aims ahead, seconds. */
const seekLead = 0.06;

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
      if (far && performance.now() - lastSeek > betweenSeeks) seek((positionS + seekLead * rate) % length);
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
