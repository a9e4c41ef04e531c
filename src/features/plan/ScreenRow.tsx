import type { Screen } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { Select } from '@/components/Select';

interface Props {
  screen: Screen;
  onChange: (screen: Screen) => void;
  onRemove: () => void;
}

const kinds = [
  { value: 'projection', label: 'projection' },
  { value: 'led', label: 'LED wall' },
  { value: 'tv', label: 'TV' },
];
const axes = [
  { axis: 0, label: 'To house right' },
  { axis: 1, label: 'Up, middle' },
  { axis: 2, label: 'From back wall' },
] as const;
const turns = [
  { key: 'yaw', label: 'Turned' },
  { key: 'tilt', label: 'Tilted' },
  { key: 'roll', label: 'Rolled' },
] as const;

/** One screen's measures: size and middle in metres, turns in degrees. */
export const ScreenRow = ({ screen, onChange, onRemove }: Props) => (
  <li className="flex flex-col gap-2 border-b border-(--line) pb-4">
    <div className="flex flex-wrap items-end gap-2">
      <Field
        label="Screen"
        value={screen.name}
        maxLength={40}
        className="min-w-40"
        onChange={(event) => onChange({ ...screen, name: event.target.value })}
      />
      <Select
        label="Kind"
        value={screen.kind}
        options={kinds}
        onChange={(event) => onChange({ ...screen, kind: event.target.value as Screen['kind'] })}
      />
      <Button onClick={onRemove} aria-label={`Remove the screen ${screen.name}`}>
        Remove
      </Button>
    </div>
    <div className="grid grid-cols-2 gap-2 sm:grid-cols-4">
      {(['width', 'height'] as const).map((side) => (
        <NumberField
          key={side}
          label={side === 'width' ? 'Width' : 'Height'}
          unit="m"
          value={screen[side]}
          min={0.05}
          max={200}
          step={0.01}
          onChange={(value) => onChange({ ...screen, [side]: value })}
        />
      ))}
      {axes.map(({ axis, label }) => (
        <NumberField
          key={axis}
          label={label}
          unit="m"
          value={screen.centre[axis]}
          min={-500}
          max={500}
          step={0.05}
          onChange={(value) => {
            const centre: Screen['centre'] = [...screen.centre];
            centre[axis] = value;
            onChange({ ...screen, centre });
          }}
        />
      ))}
      {turns.map(({ key, label }) => (
        <NumberField
          key={key}
          label={label}
          unit="°"
          value={screen[key]}
          min={-360}
          max={360}
          onChange={(value) => onChange({ ...screen, [key]: value })}
        />
      ))}
    </div>
  </li>
);
