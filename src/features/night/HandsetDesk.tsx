import { type ReactNode, useState } from 'react';
import { useWakeLock } from '@/hooks/useWakeLock';
import { Bands } from './Bands';
import { bandsOf } from './bands';
import { Dimmer } from './Dimmer';
import { LandsOnChoice } from './LandsOnChoice';
import { MoreSheet } from './MoreSheet';
import { NightHeader } from './NightHeader';
import { NoticeLine } from './NoticeLine';
import { PhaseRail } from './PhaseRail';
import { SceneTiles } from './SceneTiles';
import { ScreenChips } from './ScreenChips';
import { SwitchButton } from './Switches';
import { TempoDisc } from './TempoDisc';
import type { Night } from './useNight';
import './handset.css';

interface Props {
  night: Night;
  /** The skyline, or what stands in its place. */
  skyline: ReactNode;
  /** The way out of the night. */
  leave: ReactNode;
}

/** What lies under the thumb; calm and blackout are here whatever else is open. */
const Deck = ({ night, more, onMore }: { night: Night; more: boolean; onMore: () => void }) => (
  <div className="handset-deck">
    <div className="[grid-area:lands]">
      <LandsOnChoice night={night} />
    </div>
    <TempoDisc night={night} className="min-h-20 w-full self-center [grid-area:disc]" />
    <button
      type="button"
      aria-expanded={more}
      onClick={onMore}
      className="rounded-2xl bg-(--raised-2) font-semibold text-[18px] [grid-area:more] active:bg-(--raised-3)"
    >
      {more ? 'Close' : 'More'}
    </button>
    <SwitchButton night={night} name="freeze" className="[grid-area:freeze]" />
    <SwitchButton night={night} name="calm" className="[grid-area:calm]" />
    <SwitchButton night={night} name="blackout" className="[grid-area:black]" />
    <Dimmer night={night} className="[grid-area:dim]" />
  </div>
);

/** The phone page that runs the night, for one thumb of either hand. */
export const HandsetDesk = ({ night, skyline, leave }: Props) => {
  const [more, setMore] = useState(false);
  const wake = useWakeLock();
  return (
    <div
      className={`handset bg-(--ground) text-(--text) ${night.room === 'rehearsal' ? 'rehearsal-frame' : ''}`}
      data-light="night"
      data-hand={night.choices.hand}
    >
      <div className="handset-head flex flex-col gap-1">
        <NightHeader night={night} />
        <Bands bands={bandsOf(night.snapshot, wake, performance.now())} />
      </div>
      <div className="handset-sky">{skyline}</div>
      <div className="handset-chips">
        <ScreenChips night={night} />
      </div>
      <div className="handset-tiles">
        <PhaseRail night={night} />
        <SceneTiles night={night} grid="auto-rows-[minmax(7rem,auto)] grid-cols-2" />
        {more ? <MoreSheet night={night} leave={leave} onClose={() => setMore(false)} /> : null}
        <NoticeLine notice={night.notice} />
      </div>
      <Deck night={night} more={more} onMore={() => setMore((open) => !open)} />
    </div>
  );
};
