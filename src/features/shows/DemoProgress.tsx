import type { DemoProgress as Progress } from '#shared/api/demo';
import { Problem } from '@/components/Problem';

/** How far the demo night is. */
export const DemoProgress = ({ progress }: { progress: Progress }) => {
  if (progress.state === 'failed')
    return (
      <Problem problem={{ detail: progress.words, mend: 'You can bring it again from the page of shows.' }} />
    );
  const share = Math.round(progress.progress * 100);
  return (
    <div className="flex flex-col gap-2" role="status">
      <p>
        {progress.words || 'Getting ready'} · <span className="font-mono">{share} %</span>
      </p>
      <progress
        className="h-2 w-full accent-(--firefly)"
        max={100}
        value={share}
        aria-label="Demo night made so far"
      />
    </div>
  );
};
