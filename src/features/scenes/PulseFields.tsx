import type { Layer } from '#shared/scene/schema';
import { Select } from '@/components/Select';
import { Slider } from '@/components/Slider';

type Pulse = NonNullable<Layer['pulse']>;

interface Props {
  pulse: Layer['pulse'];
  onPulse: (pulse: Layer['pulse'], tag: string | null) => void;
}

const beats = [1, 2, 4, 8] as const;
const still: Pulse = { of: 'scale', amount: 0.1, beats: 4 };
const key = (pulse: Layer['pulse']) => (pulse ? `${pulse.of} ${pulse.beats}` : '');
const choices = (['scale', 'opacity'] as const).flatMap((of) =>
  beats.map((length) => ({ of, beats: length, amount: still.amount })),
);
const words = ({ of, beats: length }: Pulse) =>
  `${of === 'scale' ? 'size' : 'strength'}, each ${length === 1 ? 'beat' : `${length} beats`}`;

/** How a layer moves softly with the beat: never faster than once a beat. */
export const PulseFields = ({ pulse, onPulse }: Props) => (
  <div className="flex flex-col gap-2">
    <Select
      label="Breathes with the beat"
      value={key(pulse)}
      options={[
        { value: '', label: 'no' },
        ...choices.map((choice) => ({ value: key(choice), label: words(choice) })),
      ]}
      onChange={(event) => {
        const chosen = choices.find((choice) => key(choice) === event.target.value);
        onPulse(chosen ? { ...chosen, amount: pulse?.amount ?? still.amount } : null, null);
      }}
    />
    {pulse && (
      <Slider
        label="How much"
        value={pulse.amount}
        min={0}
        max={1}
        step={0.01}
        onChange={(amount) => onPulse({ ...pulse, amount }, 'pulse amount')}
      />
    )}
  </div>
);
