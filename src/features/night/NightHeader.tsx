import { slowLinkMs } from './bands';
import { CrossMark, Disc } from './marks';
import type { Night } from './useNight';

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hour12: false });

/** How the link is: a disc with its round trip, or a cross. */
export const LinkState = ({ night }: { night: Night }) => {
  const { status, linkMs } = night.snapshot;
  if (status !== 'on')
    return (
      <span className="flex items-center gap-1.5 text-(--coral)">
        <CrossMark /> no link
      </span>
    );
  const slow = linkMs !== null && linkMs > slowLinkMs;
  return (
    <span className={`flex items-center gap-1.5 font-mono ${slow ? 'text-(--amber)' : 'text-(--quiet)'}`}>
      <span className="text-(--firefly)">
        <Disc />
      </span>
      {linkMs === null ? '– ms' : `${Math.round(linkMs)} ms`}
    </span>
  );
};

/** Name of the show, state of the link, time of day. */
export const NightHeader = ({ night }: { night: Night }) => (
  <header className="flex h-9 items-center gap-3 text-[18px]">
    <h1 className="min-w-0 flex-1 truncate font-bold">
      {night.show.name}
      {night.room === 'rehearsal' ? <span className="ml-2 text-(--amber)">rehearsal</span> : null}
    </h1>
    <LinkState night={night} />
    <time className="font-mono">{clock.format(night.now)}</time>
  </header>
);
