import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import { Button } from '@/components/Button';
import { Hold } from '@/components/Hold';
import { Problem } from '@/components/Problem';
import { Segmented } from '@/components/Segmented';
import { paths } from '@/lib/paths';
import { bytesWords, lengthWords } from './bytesWords';

interface Props {
  asset: Asset;
  mayEdit: boolean;
  problem: Error | null;
  onRename: (name: string) => void;
  onKind: (kind: Asset['kind']) => void;
  onRemove: () => void;
}

const factsOf = ({ width, height, durationS, fps, bytes, kind }: Asset): string =>
  [
    kind,
    width && height ? `${width}×${height}` : null,
    durationS ? lengthWords(durationS) : null,
    fps ? `${Math.round(fps * 100) / 100} fps` : null,
    bytesWords(bytes),
  ]
    .filter(Boolean)
    .join(' · ');

const Face = ({ asset }: { asset: Asset }) => {
  if (asset.state === 'ready' && asset.posterUrl)
    return (
      <img src={asset.posterUrl} alt="" loading="lazy" className="max-h-full max-w-full object-contain" />
    );
  if (asset.state === 'failed') return <span className="text-(--coral)">✕ could not be used</span>;
  return (
    <span className="flex w-3/4 flex-col gap-2 text-center text-(--quiet)">
      {asset.state === 'waiting' ? 'waits its turn' : `converting, ${Math.round(asset.progress * 100)} %`}
      <progress className="w-full" value={asset.progress} max={1} aria-label={`${asset.name} converted`} />
    </span>
  );
};

/** One file: what it looks like, what it is, where it is shown. */
export const AssetCard = ({ asset, mayEdit, problem, onRename, onKind, onRemove }: Props) => {
  const [name, setName] = useState<string | null>(null);
  const finish = () => {
    const next = name?.trim();
    if (next && next !== asset.name) onRename(next);
    setName(null);
  };
  return (
    <li
      className="flex min-w-0 flex-col gap-2 rounded-2xl bg-(--raised) p-3"
      data-asset={asset.id}
      data-state={asset.state}
    >
      <div
        className={`grid aspect-video place-items-center overflow-hidden rounded-xl ${asset.state === 'ready' ? 'bg-black' : 'bg-(--raised-2)'}`}
      >
        <Face asset={asset} />
      </div>
      {mayEdit ? (
        <input
          aria-label={`Name of ${asset.name}`}
          value={name ?? asset.name}
          maxLength={120}
          onChange={(event) => setName(event.target.value)}
          onBlur={finish}
          onKeyDown={(event) => {
            if (event.key === 'Enter') event.currentTarget.blur();
            if (event.key === 'Escape') setName(null);
          }}
          className="h-11 w-full truncate rounded-lg border border-transparent bg-transparent px-2 font-bold hover:border-(--line) focus:border-(--line)"
        />
      ) : (
        <p className="truncate px-2 font-bold">{asset.name}</p>
      )}
      <p className="sr-only">{asset.name}</p>
      <p className="px-2 font-mono text-sm text-(--quiet)">{factsOf(asset)}</p>
      {asset.fault && <p className="px-2 text-(--coral)">{asset.fault}</p>}
      {asset.uses.length > 0 && (
        <p className="px-2 text-sm">
          <span className="text-(--quiet)">shown in </span>
          {asset.uses.map(({ sceneId, sceneName, showId }, index) => (
            <span key={sceneId}>
              {index > 0 && ', '}
              <Link
                className="inline-flex min-h-11 min-w-11 items-center underline"
                to={paths.scene(showId, sceneId)}
              >
                {sceneName}
              </Link>
            </span>
          ))}
        </p>
      )}
      {problem && <Problem problem={problem} />}
      {mayEdit && (
        <div className="mt-auto flex flex-wrap items-center justify-between gap-2">
          {asset.kind !== 'clip' ? (
            <Segmented
              label={`What ${asset.name} is`}
              value={asset.kind}
              options={[
                { value: 'still', label: 'still' },
                { value: 'mark', label: 'mark' },
              ]}
              onChange={onKind}
            />
          ) : (
            <span />
          )}
          {asset.uses.length > 0 ? (
            <Button disabled title="Take it out of its scenes first">
              In use
            </Button>
          ) : (
            <Hold label="Hold to remove" onHeld={onRemove} />
          )}
        </div>
      )}
    </li>
  );
};
