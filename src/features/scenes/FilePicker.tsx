import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { Asset } from '#shared/api/assets';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { paths } from '@/lib/paths';

interface Props {
  label: string;
  kinds: readonly Asset['kind'][];
  assets: readonly Asset[];
  /** Ids in use. */
  chosen: readonly string[];
  onPick: (id: string) => void;
}

/** Chooses a file of the library that is ready to play. */
export const FilePicker = ({ label, kinds, assets, chosen, onPick }: Props) => {
  const [open, setOpen] = useState(false);
  const fit = assets.filter((asset) => kinds.includes(asset.kind) && asset.state === 'ready');
  return (
    <>
      <Button onClick={() => setOpen(true)}>{label}</Button>
      <Dialog title={label} open={open} onClose={() => setOpen(false)}>
        {fit.length === 0 ? (
          <p>
            The library has none that is ready.{' '}
            <Link to={paths.library()} className="underline">
              Go to the library
            </Link>
          </p>
        ) : (
          <ul className="grid grid-cols-2 gap-2 sm:grid-cols-3">
            {fit.map((asset) => (
              <li key={asset.id}>
                <button
                  type="button"
                  aria-pressed={chosen.includes(asset.id)}
                  onClick={() => {
                    onPick(asset.id);
                    setOpen(false);
                  }}
                  className="w-full rounded-xl border-2 border-transparent bg-(--raised-2) p-2 text-left aria-pressed:border-(--text)"
                >
                  <span className="grid aspect-video place-items-center overflow-hidden rounded-lg bg-black">
                    {(asset.posterUrl ?? asset.url) && (
                      <img
                        src={asset.posterUrl ?? asset.url ?? undefined}
                        alt=""
                        className="max-h-full max-w-full object-contain"
                      />
                    )}
                  </span>
                  <span className="mt-1 block truncate">{asset.name}</span>
                </button>
              </li>
            ))}
          </ul>
        )}
      </Dialog>
    </>
  );
};
