import { type MouseEvent, useMemo, useRef } from 'react';
import type { Screen } from '#shared/venue/schema';
import { personHeightM, unroll } from '#shared/venue/skyline';
import { useWidth } from '@/hooks/useWidth';
import { placeLabels } from './labels';
import { nearestScreen } from './nearest';
import { SkylineScreen } from './SkylineScreen';
import type { ScreenLook } from './screenLook';

const noLook: ScreenLook = { picture: null, ageMs: null, light: 'none', feed: 'none' };
/** A tap this near to a screen means it, CSS pixels: about half a thumb. */
const thumbPx = 28;

interface Props {
  screens: readonly Screen[];
  /** By screen id; a screen without one is drawn dark, as no display feeds it. */
  looks: Readonly<Record<string, ScreenLook>>;
  /** Ids with the bright outline. */
  chosen?: readonly string[];
  /** Called with the screen that was tapped. Without it nothing can be chosen. */
  onToggle?: (screenId: string) => void;
  /** Most height of the drawing, CSS pixels, without the names. */
  maxHeight: number;
  /** Size of the names, CSS pixels. */
  fontPx?: number;
}

const Person = ({ x, room }: { x: number; room: { length: number; height: number } }) => (
  <svg
    viewBox="0 0 10 35"
    aria-hidden="true"
    className="absolute bottom-0 -translate-x-1/2"
    style={{ left: `${(x / room.length) * 100}%`, height: `${(personHeightM / room.height) * 100}%` }}
  >
    <circle cx="5" cy="4" r="3" fill="var(--line)" />
    <path d="M2 10q3-3 6 0l-1 12-.7 13H3.7L3 22Z" fill="var(--line)" />
  </svg>
);

/**
 * The skyline: the room unrolled into one strip, every screen in its true shape, size and height over the floor, with
 * people to scale, filled with the newest true picture. You point at walls, not at rows in a list.
 */
export const Skyline = ({ screens, looks, chosen = [], onToggle, maxHeight, fontPx = 13 }: Props) => {
  const frame = useRef<HTMLDivElement>(null);
  const strip = useRef<HTMLDivElement>(null);
  const width = useWidth(frame, 366);
  const room = useMemo(() => unroll({ screens: [...screens] }), [screens]);
  const names = useMemo(() => Object.fromEntries(screens.map(({ id, name }) => [id, name])), [screens]);
  if (room.items.length === 0)
    return <p className="py-6 text-center text-(--quiet)">No screens yet. The venue has none drawn.</p>;

  // Outlines stand 4 px outside their screens, so the strip keeps that much free on every side.
  const scale = Math.min((width - 12) / room.length, maxHeight / room.height);
  const stripPx = room.length * scale;
  const labels = placeLabels(room.items, names, scale, stripPx, fontPx);
  const rows = labels.some((label) => label.row === 1) ? 2 : 1;

  const choose = (event: MouseEvent) => {
    if (!onToggle) return;
    const button = (event.target as Element).closest<HTMLElement>('[data-screen]');
    // detail 0: pressed by key, which means exactly the focused screen.
    if (button?.dataset.screen && event.detail === 0) return onToggle(button.dataset.screen);
    const box = strip.current?.getBoundingClientRect();
    if (!box || box.width === 0) return button?.dataset.screen && onToggle(button.dataset.screen);
    const x = (event.clientX - box.left) / scale;
    const y = (box.bottom - event.clientY) / scale;
    const hit = nearestScreen(room.items, x, y, thumbPx / scale);
    if (hit) onToggle(hit);
  };

  return (
    // The buttons inside are what keys reach; the frame only widens their reach for a thumb.
    // biome-ignore lint/a11y/noStaticElementInteractions: see above
    // biome-ignore lint/a11y/useKeyWithClickEvents: a key press on a button arrives here as a click
    <div ref={frame} onClick={choose} className="w-full select-none">
      <div
        ref={strip}
        className="relative mx-auto mt-1.5"
        style={{ width: stripPx, height: room.height * scale }}
      >
        {room.people.map((x) => (
          <Person key={x} x={x} room={room} />
        ))}
        {room.items.map((item) => (
          <SkylineScreen
            key={item.screenId}
            item={item}
            name={names[item.screenId] ?? ''}
            look={looks[item.screenId] ?? noLook}
            chosen={chosen.includes(item.screenId)}
            room={room}
            choosable={onToggle !== undefined}
          />
        ))}
      </div>
      <div className="border-(--line) border-t" />
      <div
        aria-hidden="true"
        className="relative mx-auto text-(--quiet)"
        style={{
          width: stripPx,
          height: rows * (fontPx + 4) + 2,
          fontSize: fontPx,
          lineHeight: `${fontPx + 4}px`,
        }}
      >
        {labels.map(({ screenId, x, row }) => (
          <span
            key={screenId}
            className={`absolute -translate-x-1/2 whitespace-nowrap ${chosen.includes(screenId) ? 'text-(--text)' : ''}`}
            style={{ left: x, top: row * (fontPx + 4) }}
          >
            {names[screenId]}
          </span>
        ))}
      </div>
    </div>
  );
};
