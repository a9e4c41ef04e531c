import type { Display } from '#shared/api/displays';
import type { DisplayStatus } from '#shared/protocol/messages';
import { StateTag } from '@/components/StateTag';

interface Props {
  displays: readonly Display[];
  statuses: readonly DisplayStatus[];
  chosen: string | null;
  onChoose: (id: string) => void;
}

const regions = (count: number): string => (count === 1 ? '1 region' : `${count} regions`);

/** Joined displays, each with what it is and how it does. */
export const DisplayList = ({ displays, statuses, chosen, onChoose }: Props) => (
  <ul className="flex gap-2 overflow-x-auto lg:flex-col lg:overflow-visible">
    {displays.map((display) => {
      const status = statuses.find((one) => one.displayId === display.id);
      const raster = status?.vitals?.raster ?? display.raster;
      return (
        <li key={display.id} className="shrink-0">
          <button
            type="button"
            aria-pressed={chosen === display.id}
            onClick={() => onChoose(display.id)}
            className={`w-full min-w-44 rounded-xl border-l-4 px-3 py-3 text-left ${
              chosen === display.id
                ? 'border-(--firefly) bg-(--raised-2)'
                : 'border-transparent hover:bg-(--raised-2)'
            }`}
          >
            <span className="flex items-baseline justify-between gap-3">
              <span className="font-bold">{display.name}</span>
              {status?.connected ? (
                <span className="font-mono text-sm text-(--quiet)">
                  {Math.round(status.vitals?.fps ?? 0)} fps
                </span>
              ) : (
                <StateTag state="broken">no link</StateTag>
              )}
            </span>
            <span className="mt-1 block text-sm text-(--quiet)">
              <span className="font-mono">{raster ? raster.join('×') : 'size unknown'}</span> ·{' '}
              {regions(display.map.regions.length)}
            </span>
          </button>
        </li>
      );
    })}
  </ul>
);
