import { Button } from '@/components/Button';
import { bytesWords } from './bytesWords';
import type { Upload } from './uploads';

interface Props {
  uploads: readonly Upload[];
  onStop: (id: string) => void;
  onAgain: (id: string) => void;
  onForget: (id: string) => void;
}

const words: Record<Upload['state'], string> = {
  waiting: 'waits its turn',
  sending: 'on its way',
  done: 'there',
  failed: 'not taken',
  stopped: 'stopped',
};

/** Files on their way, and those that did not get there, with the reason. */
export const UploadList = ({ uploads, onStop, onAgain, onForget }: Props) => (
  <ul aria-label="Uploads" className="mt-3 flex flex-col gap-2">
    {uploads.map(({ id, name, bytes, state, share, fault }) => {
      const moving = state === 'sending' || state === 'waiting';
      return (
        <li key={id} className="rounded-xl bg-(--raised) p-3">
          <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
            <span className="min-w-0 flex-1 truncate font-bold">{name}</span>
            <span className={state === 'failed' ? 'text-(--coral)' : 'text-(--quiet)'}>
              {state === 'failed' && '✕ '}
              {words[state]} · <span className="font-mono">{bytesWords(bytes)}</span>
              {state === 'sending' && <span className="font-mono"> · {Math.round(share * 100)} %</span>}
            </span>
            {moving ? (
              <Button onClick={() => onStop(id)} aria-label={`Stop ${name}`}>
                Stop
              </Button>
            ) : (
              <>
                <Button onClick={() => onAgain(id)} aria-label={`Try ${name} again`}>
                  Try again
                </Button>
                <Button onClick={() => onForget(id)} aria-label={`Take ${name} off the list`}>
                  Dismiss
                </Button>
              </>
            )}
          </div>
          {state === 'sending' && (
            <progress className="mt-2 h-1.5 w-full" value={share} max={1} aria-label={`${name} sent`} />
          )}
          {fault && (
            <p role="alert" className="mt-1 text-(--coral)">
              {fault}
            </p>
          )}
        </li>
      );
    })}
  </ul>
);
