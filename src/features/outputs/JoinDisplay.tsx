import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Display } from '#shared/api/displays';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { queryKeys } from '@/lib/queryKeys';

interface Waiting {
  code: string;
  raster: [number, number];
  address: string;
  browser: string;
}

/** Joins the display whose code was read off the wall: first shows what waits there, then takes it. */
export const JoinDisplay = ({ showId, nextName }: { showId: string; nextName: string }) => {
  const client = useQueryClient();
  const [code, setCode] = useState('');
  const [name, setName] = useState('');
  const lookUp = useMutation({ mutationFn: () => api.post<Waiting>('/api/displays/look-up', { code }) });
  const join = useMutation({
    mutationFn: () => api.post<Display>('/api/displays/join', { code, showId, name: name || nextName }),
    onSuccess: async () => {
      setCode('');
      setName('');
      lookUp.reset();
      await client.invalidateQueries({ queryKey: queryKeys.displays(showId) });
    },
  });
  const found = lookUp.data;
  return (
    <section className="rounded-xl border border-dashed border-(--line) p-4">
      <h2 className="font-bold">Join a display</h2>
      <p className="mt-1 text-sm text-(--quiet)">
        Open <code className="font-mono">/display</code> on the machine behind the projector and type its code
        here.
      </p>
      <form
        className="mt-3 flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (found) join.mutate();
          else lookUp.mutate();
        }}
      >
        <Field
          label="Code"
          value={code}
          placeholder="MOTH 2741"
          autoCapitalize="characters"
          autoComplete="off"
          spellCheck={false}
          onChange={(event) => {
            setCode(event.target.value);
            lookUp.reset();
            join.reset();
          }}
        />
        {found && (
          <>
            <p className="text-sm">
              Waits there: <span className="font-mono">{found.raster.join('×')}</span>, {found.browser}, at{' '}
              <span className="font-mono">{found.address}</span>.
            </p>
            <Field
              label="Name it"
              value={name}
              placeholder={nextName}
              maxLength={40}
              onChange={(event) => setName(event.target.value)}
            />
          </>
        )}
        {(lookUp.error ?? join.error) && <Problem problem={lookUp.error ?? join.error} />}
        <Button variant="primary" type="submit" disabled={!code.trim() || lookUp.isPending || join.isPending}>
          {found ? 'Join it' : 'Look it up'}
        </Button>
      </form>
    </section>
  );
};
