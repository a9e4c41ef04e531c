import type { Phase } from '#shared/api/shows';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { NumberField } from '@/components/NumberField';

interface Props {
  phase: Phase;
  onChange: (phase: Phase) => void;
  /** null: the last one cannot go. */
  onRemove: (() => void) | null;
}

/** One phase: name, start, energy, and the ceilings that keep guests safe. */
export const PhaseRow = ({ phase, onChange, onRemove }: Props) => (
  <li className="grid grid-cols-2 items-end gap-2 border-b border-(--line) pb-3 md:grid-cols-[auto_2fr_repeat(4,minmax(0,1fr))_auto]">
    <div className="flex flex-col gap-1">
      <label htmlFor={`colour-${phase.id}`} className="text-sm text-(--quiet)">
        Colour
      </label>
      <input
        id={`colour-${phase.id}`}
        type="color"
        value={phase.colour}
        className="h-11 w-14 rounded-lg border border-(--line) bg-(--raised)"
        onChange={(event) => onChange({ ...phase, colour: event.target.value })}
      />
    </div>
    <Field
      label="Name"
      value={phase.name}
      maxLength={24}
      onChange={(event) => onChange({ ...phase, name: event.target.value })}
    />
    <Field
      label="Starts"
      type="time"
      value={phase.startsAt}
      onChange={(event) => onChange({ ...phase, startsAt: event.target.value })}
    />
    <NumberField
      label="Energy"
      unit="of 10"
      value={phase.energy}
      min={1}
      max={10}
      onChange={(energy) => onChange({ ...phase, energy })}
    />
    <NumberField
      label="Light, at most"
      unit="%"
      value={phase.brightness * 100}
      min={0}
      max={100}
      step={5}
      onChange={(share) => onChange({ ...phase, brightness: share / 100 })}
    />
    <NumberField
      label="Flashes, at most"
      unit="/ s"
      value={phase.flashes}
      min={0}
      max={3}
      step={0.5}
      onChange={(flashes) => onChange({ ...phase, flashes })}
    />
    <Button disabled={!onRemove} onClick={() => onRemove?.()} aria-label={`Remove the phase ${phase.name}`}>
      Remove
    </Button>
  </li>
);
