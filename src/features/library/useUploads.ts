import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { newId } from '@/lib/newId';
import { queryKeys } from '@/lib/queryKeys';
import { makeUploads, type Upload } from './uploads';

/** Uploads of this page. The tab asks before it closes while one is on its way. */
export const useUploads = () => {
  const client = useQueryClient();
  const [list, setList] = useState<readonly Upload[]>([]);
  const held = useRef<ReturnType<typeof makeUploads> | null>(null);
  held.current ??= makeUploads({
    makeRequest: () => new XMLHttpRequest(),
    newId,
    onChange: setList,
    onAsset: () => void client.invalidateQueries({ queryKey: queryKeys.assets }),
  });
  const uploads = held.current;
  useEffect(() => {
    const warn = (event: BeforeUnloadEvent) => {
      if (uploads.busy()) event.preventDefault();
    };
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [uploads]);
  // What went well is in the library below: its line is no news any more.
  const shown = list.filter(({ state }) => state !== 'done');
  return { list: shown, add: uploads.add, stop: uploads.stop, again: uploads.again, forget: uploads.forget };
};
