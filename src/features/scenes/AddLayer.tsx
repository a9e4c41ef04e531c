import { newLayer } from '#shared/scene/defaults';
import type { Layer, SourceKind } from '#shared/scene/schema';
import { Dialog } from '@/components/Dialog';
import { newId } from '@/lib/newId';
import { kindWords } from './layerWords';

interface Props {
  open: boolean;
  onClose: () => void;
  onAdd: (layer: Layer) => void;
}

/** Chooses what a new layer shows. */
export const AddLayer = ({ open, onClose, onAdd }: Props) => (
  <Dialog title="Add a layer" open={open} onClose={onClose}>
    <ul className="grid gap-2 sm:grid-cols-2">
      {(Object.keys(kindWords) as SourceKind[]).map((kind) => (
        <li key={kind}>
          <button
            type="button"
            onClick={() => onAdd(newLayer(kind, newId()))}
            className="h-full min-h-20 w-full rounded-xl bg-(--raised-2) p-4 text-left hover:bg-(--raised-3)"
          >
            <span className="block font-bold">{kindWords[kind].title}</span>
            <span className="text-(--quiet)">{kindWords[kind].text}</span>
          </button>
        </li>
      ))}
    </ul>
  </Dialog>
);
