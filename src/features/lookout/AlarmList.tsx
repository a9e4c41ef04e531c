import { Button } from '@/components/Button';
import type { Alarm } from './alarms';

interface Props {
  alarms: readonly Alarm[];
  /** Acts that help; null where the reader's role has none. */
  onIdentify: (displayId: string) => void;
  onReload: ((displayId: string) => void) | null;
}

const looks = {
  broken: { box: 'border-(--coral) bg-[#2a1412] border-dashed', text: 'text-(--coral)', sign: '✕' },
  look: { box: 'border-(--amber) bg-[#221a0b]', text: 'text-(--amber)', sign: '▲' },
} as const;

/** What is wrong, worst first, each with one line of what to do. */
export const AlarmList = ({ alarms, onIdentify, onReload }: Props) => (
  <ul aria-live="polite" aria-label="Alarms" className="flex flex-col gap-2">
    {alarms.map((alarm) => {
      const look = looks[alarm.severity];
      const { displayId } = alarm;
      return (
        <li key={alarm.key} className={`flex flex-wrap items-center gap-3 rounded-xl border p-4 ${look.box}`}>
          <span aria-hidden="true" className={`text-xl ${look.text}`}>
            {look.sign}
          </span>
          <div className="min-w-0 flex-1 basis-60">
            <p className={`text-lg font-bold ${look.text}`}>{alarm.what}</p>
            <p className="text-(--text)">{alarm.mend}</p>
          </div>
          {displayId && (
            <div className="flex gap-2">
              <Button variant="quiet" onClick={() => onIdentify(displayId)}>
                Show its name
              </Button>
              {onReload && (
                <Button variant="quiet" onClick={() => onReload(displayId)}>
                  Reload it
                </Button>
              )}
            </div>
          )}
        </li>
      );
    })}
  </ul>
);
