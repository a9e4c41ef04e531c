import { useState } from 'react';
import type { Display } from '#shared/api/displays';
import type { Screen } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import type { MapEditor } from './useMapEditor';

interface Props {
  display: Display;
  editor: MapEditor;
  screens: readonly Screen[];
  lineUp: boolean;
  saving: boolean;
  onAdd: (screen: Screen) => void;
  onLineUp: (on: boolean) => void;
  onIdentify: () => void;
  onSave: (note: string) => void;
}

/** What can be done with the whole map of a display. */
export const EditorBar = ({
  display,
  editor,
  screens,
  lineUp,
  saving,
  onAdd,
  onLineUp,
  onIdentify,
  onSave,
}: Props) => {
  const [note, setNote] = useState('');
  return (
    <div className="flex flex-wrap items-center gap-2 p-3">
      <div className="mr-auto min-w-0">
        <h2 className="font-bold">{display.name}</h2>
        <p className="text-sm text-(--quiet)">
          what it puts out, <span className="font-mono">{editor.map.raster.join('×')}</span>
        </p>
      </div>
      <label className="sr-only" htmlFor="add-region">
        Add a region of
      </label>
      <select
        id="add-region"
        value=""
        onChange={(event) => {
          const screen = screens.find((one) => one.id === event.target.value);
          if (screen) onAdd(screen);
        }}
        className="h-11 rounded-lg bg-(--raised-2) px-3 text-(--text)"
      >
        <option value="">Add region of…</option>
        {screens.map((screen) => (
          <option key={screen.id} value={screen.id}>
            {screen.name}
          </option>
        ))}
      </select>
      <Button variant="quiet" onClick={editor.undo} disabled={!editor.canUndo} title="Ctrl+Z">
        Undo
      </Button>
      <Button variant="quiet" onClick={editor.redo} disabled={!editor.canRedo} title="Ctrl+Shift+Z">
        Redo
      </Button>
      <Button variant="quiet" aria-pressed={lineUp} onClick={() => onLineUp(!lineUp)}>
        {lineUp ? 'Grid off' : 'Line-up grid'}
      </Button>
      <Button variant="quiet" onClick={onIdentify}>
        Show its name
      </Button>
      <form
        className="flex items-center gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          onSave(note);
          setNote('');
        }}
      >
        <input
          aria-label="Note for this version"
          value={note}
          placeholder="note"
          maxLength={120}
          onChange={(event) => setNote(event.target.value)}
          className="h-11 w-28 rounded-lg border border-(--line) bg-transparent px-3 text-(--text)"
        />
        <Button variant="primary" type="submit" disabled={!editor.unsaved || saving}>
          {saving ? 'Saving' : 'Save version'}
        </Button>
      </form>
    </div>
  );
};
