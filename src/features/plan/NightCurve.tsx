import { useId } from 'react';
import type { Phase } from '#shared/api/shows';
import { count } from '@/lib/words';
import { energyPath, nightSpans } from './nightShape';

interface Props {
  phases: readonly Phase[];
  /** Scenes by phase id. */
  scenes: Readonly<Record<string, number>>;
}

const box = { width: 1000, height: 180 };
const percent = (share: number) => `${(share * 100).toFixed(3)}%`;

/** The night as one line of energy over its phases. */
export const NightCurve = ({ phases, scenes }: Props) => {
  const id = useId();
  const spans = nightSpans(phases);
  const path = energyPath(spans, box.width, box.height);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a strip that scrolls sideways must be reachable by keys
    <section tabIndex={0} aria-label="The night’s energy, phase by phase" className="overflow-x-auto">
      <div className="relative min-w-[44rem]">
        <ol className="relative h-7">
          {spans.map(({ phase, from }) => (
            <li
              key={phase.id}
              className="absolute pl-3 font-bold whitespace-nowrap"
              style={{ left: percent(from) }}
            >
              {phase.name}
              <span className="sr-only">
                {`, from ${phase.startsAt}, energy ${phase.energy} of 10, ${count(scenes[phase.id] ?? 0, 'scene')}`}
              </span>
            </li>
          ))}
        </ol>
        <div className="relative h-44 overflow-hidden rounded-lg bg-(--ground)" aria-hidden="true">
          <svg
            viewBox={`0 0 ${box.width} ${box.height}`}
            preserveAspectRatio="none"
            aria-hidden="true"
            className="absolute inset-0 h-full w-full"
          >
            <defs>
              <linearGradient id={id} x1="0" x2="1" y1="0" y2="0">
                {spans.map(({ phase, from, to }) => (
                  <stop key={phase.id} offset={(from + to) / 2} stopColor={phase.colour} />
                ))}
              </linearGradient>
            </defs>
            <path d={`${path}V${box.height}H0Z`} fill={`url(#${id})`} opacity="0.3" />
            <path
              d={path}
              fill="none"
              stroke={`url(#${id})`}
              strokeWidth="4"
              vectorEffect="non-scaling-stroke"
            />
          </svg>
          {spans.map(({ phase, from }) => (
            <span
              key={phase.id}
              className="absolute inset-y-0 border-l border-(--line) pt-2 pl-3 text-sm whitespace-nowrap text-(--quiet)"
              style={{ left: percent(from) }}
            >
              {count(scenes[phase.id] ?? 0, 'scene')}
            </span>
          ))}
        </div>
        <div className="relative h-7 pt-1" aria-hidden="true">
          {spans.map(({ phase, from }) => (
            <span
              key={phase.id}
              className="absolute pl-1 font-mono text-(--quiet)"
              style={{ left: percent(from) }}
            >
              {phase.startsAt}
            </span>
          ))}
        </div>
      </div>
    </section>
  );
};
