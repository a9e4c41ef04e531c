import type { Asset } from '#shared/api/assets';
import { blendModes, type Fit, fits, type Layer, type SceneBody } from '#shared/scene/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { Segmented } from '@/components/Segmented';
import { Select } from '@/components/Select';
import { Slider } from '@/components/Slider';
import { PulseFields } from './PulseFields';
import { SourceFields } from './SourceFields';

interface Props {
  layer: Layer;
  dials: SceneBody['dials'];
  assets: readonly Asset[];
  /** Changes in a row with the same tag are one step of undo. */
  onLayer: (layer: Layer, tag: string | null) => void;
  onRemove: () => void;
}

const places = [
  { key: 'x', label: 'Right', unit: '%', factor: 100, min: -2, max: 2 },
  { key: 'y', label: 'Down', unit: '%', factor: 100, min: -2, max: 2 },
  { key: 'scale', label: 'Size', unit: '×', factor: 1, min: 0.01, max: 10 },
  { key: 'turn', label: 'Turn', unit: '°', factor: 1, min: -360, max: 360 },
] as const;

/** Everything about one layer. */
export const LayerPanel = ({ layer, dials, assets, onLayer, onRemove }: Props) => (
  <section
    aria-label={`Layer ${layer.name}`}
    className="flex min-w-0 flex-col gap-4 rounded-2xl bg-(--raised) p-4"
  >
    <div className="flex flex-wrap items-end gap-2">
      <Field
        label="Layer"
        value={layer.name}
        maxLength={60}
        className="min-w-32"
        onChange={(event) => onLayer({ ...layer, name: event.target.value }, 'name')}
      />
      <Button aria-pressed={layer.on} onClick={() => onLayer({ ...layer, on: !layer.on }, null)}>
        {layer.on ? 'On' : 'Off'}
      </Button>
      <Button onClick={onRemove} aria-label={`Remove the layer ${layer.name}`}>
        Remove
      </Button>
    </div>
    <SourceFields
      key={layer.source.kind}
      source={layer.source}
      assets={assets}
      onSource={(source, tag) => onLayer({ ...layer, source }, tag)}
    />
    <Slider
      label="Strength"
      value={layer.opacity}
      min={0}
      max={1}
      step={0.01}
      onChange={(opacity) => onLayer({ ...layer, opacity }, 'opacity')}
    />
    <div className="grid grid-cols-2 gap-2">
      <Select
        label="Blend"
        value={layer.blend}
        options={blendModes.map((mode) => ({ value: mode, label: mode }))}
        onChange={(event) => onLayer({ ...layer, blend: event.target.value as Layer['blend'] }, null)}
      />
      <Select
        label="Dial for strength"
        value={layer.dial ?? ''}
        options={[
          { value: '', label: 'none' },
          ...dials.map((dial, index) => ({ value: String(index), label: dial.name })),
        ]}
        onChange={(event) =>
          onLayer({ ...layer, dial: event.target.value === '' ? null : Number(event.target.value) }, null)
        }
      />
    </div>
    <Segmented
      label="Fit"
      value={layer.fit}
      options={fits.map((fit) => ({ value: fit, label: fit }))}
      onChange={(fit: Fit) => onLayer({ ...layer, fit }, null)}
    />
    <div className="grid grid-cols-2 gap-2 sm:grid-cols-4">
      {places.map(({ key, label, unit, factor, min, max }) => (
        <NumberField
          key={key}
          label={label}
          unit={unit}
          value={layer.place[key] * factor}
          min={min * factor}
          max={max * factor}
          step={key === 'scale' ? 0.05 : 1}
          onChange={(value) =>
            Number.isFinite(value) &&
            onLayer({ ...layer, place: { ...layer.place, [key]: value / factor } }, `place ${key}`)
          }
        />
      ))}
    </div>
    <PulseFields pulse={layer.pulse} onPulse={(pulse, tag) => onLayer({ ...layer, pulse }, tag)} />
  </section>
);
