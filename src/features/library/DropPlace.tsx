import { type DragEvent, useRef, useState } from 'react';
import { Button } from '@/components/Button';

/** Where files are dropped or chosen; on a phone, the camera roll. */
export const DropPlace = ({ onFiles }: { onFiles: (files: File[]) => void }) => {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    onFiles([...event.dataTransfer.files]);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is a way beside the button inside, for the mouse only
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={`flex flex-wrap items-center gap-4 rounded-2xl border-2 border-dashed p-6 ${over ? 'border-(--firefly) bg-(--raised-2)' : 'border-(--line)'}`}
    >
      <div className="min-w-52 flex-1">
        <h2 className="text-lg font-bold">Drop clips and pictures here</h2>
        <p className="text-(--quiet)">
          Video of any kind up to 2 GB, PNG, JPEG, WebP, AVIF or SVG up to 25 MB. Several at once.
        </p>
      </div>
      <input
        ref={input}
        type="file"
        multiple
        accept="image/*,video/*,.svg,.mov,.mkv,.webm"
        aria-label="Files to upload"
        className="sr-only"
        onChange={(event) => {
          onFiles([...(event.target.files ?? [])]);
          event.target.value = '';
        }}
      />
      <Button variant="primary" onClick={() => input.current?.click()}>
        Choose files
      </Button>
    </div>
  );
};
