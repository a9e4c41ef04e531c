import { useEffect, useRef, useState } from 'react';
import type { Asset } from '#shared/api/assets';
import type { SceneBody } from '#shared/scene/schema';
import type { Screen } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { NumberField } from '@/components/NumberField';
import { Select } from '@/components/Select';
import type { PreviewInput } from './preview';

interface Props {
  body: SceneBody;
  assets: readonly Asset[];
  screens: readonly Screen[];
}

/** Before a venue is measured: 16 m by 9 m. */
const plain = { width: 16, height: 9 };

/** The scene as displays would draw it, in the shape of any screen of the venue. */
export const LivePicture = ({ body, assets, screens }: Props) => {
  const holder = useRef<HTMLDivElement>(null);
  const [screenId, setScreenId] = useState('');
  const [bpm, setBpm] = useState(124);
  const [playing, setPlaying] = useState(true);
  const [trouble, setTrouble] = useState<string | null>(null);
  const size = screens.find((screen) => screen.id === screenId) ?? screens[0] ?? plain;
  const input = useRef<PreviewInput>({ body, assets, bpm, playing, size });
  input.current = { body, assets, bpm, playing, size };
  useEffect(() => {
    // A canvas of its own each time: a lost or disposed context can't be had again from the same one.
    const canvas = document.createElement('canvas');
    canvas.className = 'max-h-full max-w-full';
    canvas.setAttribute('role', 'img');
    canvas.setAttribute('aria-label', 'Live picture of the scene');
    holder.current?.append(canvas);
    let stop: (() => void) | null = null;
    let gone = false;
    import('./preview')
      .then(({ startPreview }) => {
        if (!gone) stop = startPreview(canvas, () => input.current);
      })
      .catch((error: unknown) => setTrouble(error instanceof Error ? error.message : 'No picture'));
    return () => {
      gone = true;
      stop?.();
      canvas.remove();
    };
  }, []);
  return (
    <section aria-label="Live picture" className="flex min-w-0 flex-col gap-3">
      <div
        ref={holder}
        className="grid h-[40vh] min-h-56 place-items-center overflow-hidden rounded-2xl bg-black lg:h-[58vh]"
      >
        {trouble && <p className="text-(--coral)">✕ This browser cannot draw it: {trouble}</p>}
      </div>
      <div className="flex flex-wrap items-end gap-3">
        <Button aria-pressed={playing} onClick={() => setPlaying(!playing)}>
          {playing ? 'Pause' : 'Play'}
        </Button>
        <div className="w-32">
          <NumberField
            label="Tempo"
            unit="bpm"
            min={20}
            max={300}
            value={bpm}
            onChange={(next) => Number.isFinite(next) && setBpm(next)}
          />
        </div>
        {screens.length > 0 && (
          <Select
            label="Seen on"
            value={screenId || screens[0]?.id}
            options={screens.map((screen) => ({
              value: screen.id,
              label: `${screen.name} · ${screen.width} × ${screen.height} m`,
            }))}
            onChange={(event) => setScreenId(event.target.value)}
          />
        )}
        <p className="ml-auto self-center text-(--quiet)">Flash: not checked yet</p>
      </div>
    </section>
  );
};
