import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { type Phase, phasesSchema } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Problem } from '@/components/Problem';
import { api } from '@/lib/api';
import { newId } from '@/lib/newId';
import { queryKeys } from '@/lib/queryKeys';
import { inOrder } from './nightShape';
import { PhaseRow } from './PhaseRow';
import { addPhase, renumber } from './phaseEdits';

interface Props {
  showId: string;
  phases: readonly Phase[];
  onDone: () => void;
  /** Called at each change, so that the curve can follow. */
  onDraft: (phases: Phase[]) => void;
}

/** Every phase as a row; saved as a whole. */
export const PhaseTable = ({ showId, phases, onDone, onDraft }: Props) => {
  const client = useQueryClient();
  const [rows, setRows] = useState<Phase[]>([...phases]);
  const [fault, setFault] = useState<string | null>(null);
  const save = useMutation({
    mutationFn: (body: Phase[]) => api.put(`/api/shows/${showId}/phases`, body),
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: queryKeys.show(showId) });
      onDone();
    },
  });
  const change = (next: Phase[]) => {
    setRows(next);
    setFault(null);
    const read = phasesSchema.safeParse(next);
    if (read.success) onDraft(read.data);
  };
  const submit = () => {
    const read = phasesSchema.safeParse(rows);
    if (!read.success) {
      const issue = read.error.issues[0];
      const row = rows[Number(issue?.path[0] ?? -1)];
      setFault(
        `${row?.name || 'A phase'}: ${String(issue?.path[1] ?? 'phases')} is off. ${issue?.message ?? ''}`,
      );
    } else if (!inOrder(read.data)) setFault('Two phases start at the same time or out of order.');
    else save.mutate(read.data);
  };
  return (
    <form
      noValidate
      className="mt-4 flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <ul className="flex flex-col gap-3">
        {rows.map((row) => (
          <PhaseRow
            key={row.id}
            phase={row}
            onChange={(next) => change(rows.map((one) => (one.id === next.id ? next : one)))}
            onRemove={
              rows.length > 1 ? () => change(renumber(rows.filter((one) => one.id !== row.id))) : null
            }
          />
        ))}
      </ul>
      {fault && (
        <p role="alert" className="text-(--coral)">
          ✕ {fault}
        </p>
      )}
      {save.error && <Problem problem={save.error} />}
      <div className="flex flex-wrap gap-2">
        <Button disabled={rows.length >= 12} onClick={() => change(addPhase(rows, newId()))}>
          Add a phase
        </Button>
        <span className="flex-1" />
        <Button onClick={onDone}>Leave as it was</Button>
        <Button variant="primary" type="submit" disabled={save.isPending}>
          Save the phases
        </Button>
      </div>
    </form>
  );
};
