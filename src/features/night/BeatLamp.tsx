import { useRef } from 'react';
import { beatAt, beatsPerBar } from '#shared/time/beatClock';
import { useFrame } from '@/hooks/useFrame';
import type { Night } from './useNight';

const dim = 0.22;
/** Fastest that the lamp lights up, beats a minute: above it only every second beat does, so never 3 a second. */
const fastest = 179;

/**
 * Light of each of the four dots at a beat position, 0..1: full at its beat, falling softly until the next. Pure.
 */
export const lampLights = (beat: number, bpm: number): number[] => {
  const step = bpm > fastest ? 2 : 1;
  const at = beat / step;
  const lit = (((Math.floor(at) * step) % beatsPerBar) + beatsPerBar) % beatsPerBar;
  const gone = at - Math.floor(at);
  return Array.from({ length: beatsPerBar }, (_, i) => (i === lit ? dim + (1 - dim) * (1 - gone) ** 2 : dim));
};

/** Four dots that walk with the beat; the first is the one. Drawn outside React, a frame at a time. */
export const BeatLamp = ({ night }: { night: Night }) => {
  const dots = useRef<HTMLSpanElement>(null);
  const { link } = night;
  useFrame((at) => {
    const { state } = link.getSnapshot();
    if (!state || !dots.current) return;
    const lights = lampLights(beatAt(state.beat, link.hubTimeOf(at)), state.beat.bpm);
    lights.forEach((light, i) => {
      const dot = dots.current?.children[i];
      if (dot instanceof HTMLElement) dot.style.opacity = light.toFixed(2);
    });
  });
  return (
    <span ref={dots} className="flex gap-1.5" aria-hidden="true">
      {['one', 'two', 'three', 'four'].map((name) => (
        <span
          key={name}
          className={`size-2.5 rounded-full ${name === 'one' ? 'bg-(--firefly)' : 'bg-(--text)'}`}
          style={{ opacity: dim }}
        />
      ))}
    </span>
  );
};
