import type { Phase } from '#shared/api/shows';
import { transitionKinds } from '#shared/scene/schema';
import { Field } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { Select } from '@/components/Select';
import type { Draft } from './useSceneEditor';

interface Props {
  draft: Draft;
  phases: readonly Phase[];
  onDraft: (draft: Draft, tag: string | null) => void;
}

/** The scene as a whole: name, phase, energy, ground, how it arrives. */
export const SceneFields = ({ draft, phases, onDraft }: Props) => {
  const { body } = draft;
  return (
    <section
      aria-label="Scene"
      className="grid grid-cols-2 items-end gap-3 rounded-2xl bg-(--raised) p-4 md:grid-cols-3"
    >
      <Field
        label="Scene"
        value={draft.name}
        maxLength={60}
        error={draft.name.trim() ? null : 'A scene needs a name.'}
        className="col-span-2 md:col-span-1"
        onChange={(event) => onDraft({ ...draft, name: event.target.value }, 'name of scene')}
      />
      <Select
        label="Phase"
        value={draft.phaseId ?? ''}
        options={[
          { value: '', label: 'none' },
          ...phases.map((phase) => ({ value: phase.id, label: phase.name })),
        ]}
        onChange={(event) => onDraft({ ...draft, phaseId: event.target.value || null }, null)}
      />
      <NumberField
        label="Energy"
        unit={'of\u00a010'}
        value={draft.energy}
        min={1}
        max={10}
        onChange={(energy) => Number.isInteger(energy) && onDraft({ ...draft, energy }, 'energy')}
      />
      <Field
        label="Ground"
        type="color"
        value={body.ground}
        onChange={(event) => onDraft({ ...draft, body: { ...body, ground: event.target.value } }, 'ground')}
      />
      <Select
        label="Arrives by"
        value={body.transition.kind}
        options={transitionKinds.map((kind) => ({ value: kind, label: kind }))}
        onChange={(event) =>
          onDraft(
            {
              ...draft,
              body: {
                ...body,
                transition: {
                  ...body.transition,
                  kind: event.target.value as (typeof transitionKinds)[number],
                },
              },
            },
            null,
          )
        }
      />
      {body.transition.kind !== 'cut' && (
        <NumberField
          label="Over"
          unit="beats"
          value={body.transition.beats}
          min={0}
          max={32}
          step={0.5}
          onChange={(beats) =>
            Number.isFinite(beats) &&
            onDraft({ ...draft, body: { ...body, transition: { ...body.transition, beats } } }, 'beats')
          }
        />
      )}
    </section>
  );
};
