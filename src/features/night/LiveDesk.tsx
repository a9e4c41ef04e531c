import { type ReactNode, useState } from 'react';
import { useWakeLock } from '@/hooks/useWakeLock';
import { Bands } from './Bands';
import { BeatTools } from './BeatTools';
import { bandsOf } from './bands';
import { Dials } from './Dials';
import { Dimmer } from './Dimmer';
import { KeyHelp } from './KeyHelp';
import { LandsOnChoice } from './LandsOnChoice';
import { NightHeader } from './NightHeader';
import { NoticeLine } from './NoticeLine';
import { PhaseRail } from './PhaseRail';
import { SceneTiles } from './SceneTiles';
import { ScreenChips } from './ScreenChips';
import { SwitchButton } from './Switches';
import { TempoDisc } from './TempoDisc';
import type { Night } from './useNight';
import { useNightKeys } from './useNightKeys';

/** The right hand side: time and light. */
const Deck = ({ night, onHelp }: { night: Night; onHelp: () => void }) => (
  <aside aria-label="Time and light" className="flex min-w-0 shrink-0 flex-col gap-3 lg:w-90">
    <div className="flex gap-3">
      <TempoDisc night={night} className="h-29 w-36 shrink-0" />
      <div className="grid flex-1 grid-cols-1 gap-2">
        <SwitchButton night={night} name="freeze" className="min-h-13" cap="F" />
        <SwitchButton night={night} name="calm" className="min-h-13" cap="C" />
      </div>
      <Dimmer night={night} className="w-19" />
    </div>
    <SwitchButton night={night} name="blackout" className="h-20 shrink-0" cap="B" />
    <LandsOnChoice night={night} />
    <BeatTools night={night} caps />
    <div className="min-h-0 flex-1 overflow-y-auto rounded-2xl bg-(--raised) p-3">
      <Dials night={night} />
    </div>
    <button
      type="button"
      onClick={onHelp}
      className="h-12 shrink-0 rounded-xl bg-(--raised) text-(--quiet) text-[18px]"
    >
      <kbd className="font-mono">?</kbd> shows the keys
    </button>
  </aside>
);

/** The same night on a laptop: the walls large, everything else at a key's reach. */
export const LiveDesk = ({ night, skyline }: { night: Night; skyline: ReactNode }) => {
  const [help, setHelp] = useState(false);
  const wake = useWakeLock();
  useNightKeys(night, (wanted) => setHelp((open) => wanted === 'toggle' && !open));
  return (
    <div className="relative flex select-none flex-col gap-4 lg:h-[calc(100dvh-5.5rem)] lg:min-h-150 lg:flex-row">
      <div className="relative flex min-w-0 flex-1 flex-col gap-3">
        <NightHeader night={night} />
        <Bands bands={bandsOf(night.snapshot, wake, performance.now())} />
        <div className="rounded-2xl bg-(--raised) px-4 pt-2">{skyline}</div>
        <ScreenChips night={night} wrap />
        <PhaseRail night={night} across />
        <SceneTiles
          night={night}
          digits
          grid="auto-rows-[minmax(9rem,auto)] grid-cols-[repeat(auto-fill,minmax(12rem,1fr))]"
        />
        <NoticeLine notice={night.notice} />
        {help ? <KeyHelp onClose={() => setHelp(false)} /> : null}
      </div>
      <Deck night={night} onHelp={() => setHelp((open) => !open)} />
    </div>
  );
};
