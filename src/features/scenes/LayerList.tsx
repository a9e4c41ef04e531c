import { type DragEvent, type KeyboardEvent, useState } from 'react';
import type { Asset } from '#shared/api/assets';
import type { SceneBody } from '#shared/scene/schema';
import { moveLayer } from './bodyEdits';
import { sourceWords } from './layerWords';

interface Props {
  body: SceneBody;
  assets: ReadonlyMap<string, Asset>;
  chosen: string | null;
  onChoose: (id: string) => void;
  /** Null for those who only look. */
  onBody: ((body: SceneBody) => void) | null;
}

const small =
  'grid h-11 w-11 shrink-0 place-items-center rounded-lg hover:bg-(--raised-3) disabled:opacity-30';

/** Layers front to back: drag one, or move it with Alt and the arrow keys. */
export const LayerList = ({ body, assets, chosen, onChoose, onBody }: Props) => {
  const [dragged, setDragged] = useState<string | null>(null);
  const layers = body.layers.map((layer, index) => ({ layer, index })).reverse();
  const keys = (event: KeyboardEvent, id: string, index: number) => {
    const step = { ArrowUp: 1, ArrowDown: -1 }[event.key];
    if (!onBody || !step || !event.altKey) return;
    event.preventDefault();
    onBody(moveLayer(body, id, index + step));
  };
  const drop = (event: DragEvent, index: number) => {
    event.preventDefault();
    if (dragged) onBody?.(moveLayer(body, dragged, index));
    setDragged(null);
  };
  return (
    <ol aria-label="Layers, front to back" className="flex flex-col gap-2">
      {layers.map(({ layer, index }) => (
        <li
          key={layer.id}
          draggable={onBody !== null}
          onDragStart={() => setDragged(layer.id)}
          onDragOver={(event) => event.preventDefault()}
          onDrop={(event) => drop(event, index)}
          onDragEnd={() => setDragged(null)}
          className={`flex items-center rounded-xl border-2 bg-(--raised-2) ${chosen === layer.id ? 'border-(--text)' : 'border-transparent'} ${layer.on ? '' : 'opacity-60'}`}
        >
          <button
            type="button"
            aria-pressed={chosen === layer.id}
            onClick={() => onChoose(layer.id)}
            onKeyDown={(event) => keys(event, layer.id, index)}
            className="min-h-15 min-w-0 flex-1 px-3 py-2 text-left"
          >
            <span className="block truncate font-bold">
              {layer.name} {!layer.on && <span className="font-normal">· off</span>}
            </span>
            <span className="block truncate text-sm text-(--quiet)">{sourceWords(layer.source, assets)}</span>
          </button>
          <span className="hidden rounded-full bg-(--raised-3) px-3 py-1 text-sm sm:block">
            {layer.blend}
          </span>
          {onBody && (
            <>
              <button
                type="button"
                className={small}
                aria-label={`Bring ${layer.name} forward`}
                disabled={index === body.layers.length - 1}
                onClick={() => onBody(moveLayer(body, layer.id, index + 1))}
              >
                ↑
              </button>
              <button
                type="button"
                className={small}
                aria-label={`Send ${layer.name} back`}
                disabled={index === 0}
                onClick={() => onBody(moveLayer(body, layer.id, index - 1))}
              >
                ↓
              </button>
            </>
          )}
        </li>
      ))}
    </ol>
  );
};
