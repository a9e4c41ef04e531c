import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Display } from '#shared/api/displays';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Hold } from '@/components/Hold';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

interface Props {
  display: Display;
  onReload: () => void;
}

/** Rename, reload and forget a display. */
export const DisplayTools = ({ display, onReload }: Props) => {
  const client = useQueryClient();
  const [name, setName] = useState(display.name);
  const fresh = () => client.invalidateQueries({ queryKey: queryKeys.displays(display.showId) });
  const rename = useMutation({
    mutationFn: () => api.patch<Display>(`/api/displays/${display.id}`, { name }),
    onSuccess: fresh,
  });
  const forget = useMutation({
    mutationFn: () => api.delete(`/api/displays/${display.id}`),
    onSuccess: fresh,
  });
  const problem = rename.error ?? forget.error;
  return (
    <section className="flex flex-col gap-3 rounded-xl bg-(--raised) p-4">
      <h2 className="font-bold">This display</h2>
      <form
        className="flex items-end gap-2"
        onSubmit={(event) => {
          event.preventDefault();
          rename.mutate();
        }}
      >
        <Field label="Name" value={name} maxLength={40} onChange={(event) => setName(event.target.value)} />
        <Button
          variant="quiet"
          type="submit"
          disabled={!name.trim() || name === display.name || rename.isPending}
        >
          Rename
        </Button>
      </form>
      <div className="flex flex-wrap gap-2">
        <Button variant="quiet" onClick={onReload}>
          Reload it
        </Button>
        <Hold label="Hold to forget" ms={600} onHeld={() => forget.mutate()} />
      </div>
      {problem && <Problem problem={problem} />}
    </section>
  );
};
