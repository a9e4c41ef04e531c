import type { SkylineItem } from '#shared/venue/skyline';
import { ageLabel, lookWords, type ScreenLook } from './screenLook';

interface Props {
  item: SkylineItem;
  name: string;
  look: ScreenLook;
  chosen: boolean;
  /** Size of the strip in metres. */
  room: { length: number; height: number };
  choosable: boolean;
}

const outline = (look: ScreenLook, chosen: boolean): string => {
  if (look.feed === 'lost') return 'outline-dashed outline-2 outline-(--coral)';
  if (chosen) return 'outline-2 outline-(--firefly)';
  return look.feed === 'none' ? 'outline-dotted outline-1 outline-(--quiet)' : 'outline-1 outline-(--line)';
};

/** A cross from corner to corner: broken, readable without colour. */
const Cross = () => (
  <svg
    viewBox="0 0 20 20"
    className="absolute inset-0 m-auto size-6 max-h-full max-w-full"
    aria-hidden="true"
  >
    <path d="M4 4 16 16M16 4 4 16" stroke="var(--coral)" strokeWidth="2.5" strokeLinecap="round" />
  </svg>
);

/** One screen of the skyline, at its true place and size, filled with what it really drew. */
export const SkylineScreen = ({ item, name, look, chosen, room, choosable }: Props) => {
  const words = lookWords(look);
  const age = ageLabel(look);
  const lost = look.feed === 'lost';
  const place = {
    left: `${(item.x / room.length) * 100}%`,
    bottom: `${(item.y / room.height) * 100}%`,
    width: `${(item.width / room.length) * 100}%`,
    height: `${(item.height / room.height) * 100}%`,
  };
  const picture = (
    <>
      {look.picture ? (
        <img
          src={look.picture}
          alt=""
          draggable={false}
          className={`size-full object-fill ${look.light === 'stale' || lost ? 'opacity-35 grayscale' : ''}`}
        />
      ) : null}
      {lost ? <Cross /> : null}
      {age && !lost ? (
        <span className="absolute right-0 bottom-0 max-w-full bg-black/75 px-1 font-mono text-[11px] text-(--amber)">
          {age}
        </span>
      ) : null}
    </>
  );
  const look_ = `absolute overflow-hidden bg-black outline-offset-2 ${outline(look, chosen)}`;
  const label = words ? `${name}: ${words}` : name;
  if (!choosable)
    return (
      <div role="img" aria-label={label} data-screen={item.screenId} className={look_} style={place}>
        {picture}
      </div>
    );
  return (
    <button
      type="button"
      aria-pressed={chosen}
      aria-label={label}
      data-screen={item.screenId}
      data-feed={look.feed}
      className={`${look_} focus-visible:outline-4 focus-visible:outline-white`}
      style={place}
    >
      {picture}
    </button>
  );
};
