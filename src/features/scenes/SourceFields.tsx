import type { ReactNode } from 'react';
import type { Asset } from '#shared/api/assets';
import { type Source, type SourceKind, takeNames } from '#shared/scene/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { Select } from '@/components/Select';
import { Slider } from '@/components/Slider';
import { DrawingFields } from './DrawingFields';
import { FilePicker } from './FilePicker';

interface FieldsProps<S extends Source> {
  source: S;
  assets: readonly Asset[];
  onSource: (source: S, tag: string | null) => void;
}
type Of<K extends SourceKind> = Extract<Source, { kind: K }>;

const nameOf = (assets: readonly Asset[], id: string) =>
  assets.find((asset) => asset.id === id)?.name ?? 'file is gone';

const ClipFields = ({ source, assets, onSource }: FieldsProps<Of<'clip'>>) => (
  <>
    <div className="flex flex-wrap items-center gap-3">
      <FilePicker
        label={source.assetId ? 'Change the clip' : 'Choose a clip'}
        kinds={['clip']}
        assets={assets}
        chosen={source.assetId ? [source.assetId] : []}
        onPick={(assetId) => onSource({ ...source, assetId }, null)}
      />
      {source.assetId && <span className="min-w-0 truncate">{nameOf(assets, source.assetId)}</span>}
    </div>
    <Select
      label="Moves with"
      value={source.fitBars ?? ''}
      options={[
        { value: '', label: 'its own speed' },
        ...[1, 2, 4, 8, 16, 32].map((bars) => ({
          value: String(bars),
          label: `the beat: whole clip on ${bars} ${bars === 1 ? 'bar' : 'bars'}`,
        })),
      ]}
      onChange={(event) => onSource({ ...source, fitBars: Number(event.target.value) || null }, null)}
    />
    {source.fitBars === null && (
      <Slider
        label="Speed"
        unit="×"
        value={source.rate}
        min={0.1}
        max={4}
        step={0.05}
        onChange={(rate) => onSource({ ...source, rate }, 'rate')}
      />
    )}
  </>
);

const StillsFields = ({ source, assets, onSource }: FieldsProps<Of<'stills'>>) => (
  <>
    <ul className="flex flex-col gap-1">
      {source.assetIds.map((id) => (
        <li key={id} className="flex items-center justify-between gap-2">
          <span className="min-w-0 truncate">{nameOf(assets, id)}</span>
          <Button
            aria-label={`Take ${nameOf(assets, id)} out`}
            onClick={() =>
              onSource({ ...source, assetIds: source.assetIds.filter((one) => one !== id) }, null)
            }
          >
            Take out
          </Button>
        </li>
      ))}
    </ul>
    <FilePicker
      label="Add a still"
      kinds={['still', 'mark']}
      assets={assets}
      chosen={source.assetIds}
      onPick={(id) => {
        if (!source.assetIds.includes(id)) onSource({ ...source, assetIds: [...source.assetIds, id] }, null);
      }}
    />
    <Select
      label="Changes"
      value={source.everyBeats}
      options={[1, 2, 4, 8, 16, 32, 64].map((beats) => ({
        value: String(beats),
        label: beats === 1 ? 'each beat' : `each ${beats} beats`,
      }))}
      onChange={(event) => onSource({ ...source, everyBeats: Number(event.target.value) }, null)}
    />
  </>
);

const MarkFields = ({ source, assets, onSource }: FieldsProps<Of<'mark'>>) => (
  <>
    <div className="flex flex-wrap items-center gap-3">
      <FilePicker
        label={source.assetId ? 'Change the mark' : 'Choose a mark'}
        kinds={['mark', 'still']}
        assets={assets}
        chosen={source.assetId ? [source.assetId] : []}
        onPick={(assetId) => onSource({ ...source, assetId }, null)}
      />
      {source.assetId && <span className="min-w-0 truncate">{nameOf(assets, source.assetId)}</span>}
    </div>
    <fieldset className="flex flex-wrap gap-2">
      <legend className="mb-1 text-sm text-(--quiet)">Take</legend>
      {takeNames.map((take) => (
        <Button
          key={take}
          aria-pressed={source.take === take}
          onClick={() => onSource({ ...source, take }, null)}
        >
          {take}
        </Button>
      ))}
    </fieldset>
    <Slider
      label="How much"
      value={source.amount}
      min={0}
      max={1}
      step={0.01}
      onChange={(amount) => onSource({ ...source, amount }, 'amount')}
    />
  </>
);

const WordsFields = ({ source, onSource }: FieldsProps<Of<'words'>>) => (
  <>
    <Field
      label="Words"
      value={source.text}
      maxLength={200}
      onChange={(event) => onSource({ ...source, text: event.target.value }, 'text')}
    />
    <div className="flex flex-wrap items-end gap-3">
      <Field
        label="Colour"
        type="color"
        value={source.colour}
        className="max-w-20"
        onChange={(event) => onSource({ ...source, colour: event.target.value }, 'colour')}
      />
      <NumberField
        label="Weight"
        value={source.weight}
        min={200}
        max={800}
        step={50}
        onChange={(weight) => Number.isInteger(weight) && onSource({ ...source, weight }, 'weight')}
      />
      <Button aria-pressed={source.mono} onClick={() => onSource({ ...source, mono: !source.mono }, null)}>
        Even widths
      </Button>
    </div>
  </>
);

type Table = { [K in SourceKind]: (props: FieldsProps<Of<K>>) => ReactNode };

const fields: Table = {
  clip: (props) => <ClipFields {...props} />,
  stills: (props) => <StillsFields {...props} />,
  mark: (props) => <MarkFields {...props} />,
  words: (props) => <WordsFields {...props} />,
  drawing: ({ source, onSource }) => <DrawingFields source={source} onSource={onSource} />,
};

/** What is special about a layer's source. */
export const SourceFields = (props: FieldsProps<Source>) => {
  const draw = fields[props.source.kind] as (props: FieldsProps<Source>) => ReactNode;
  return <div className="flex flex-col gap-3">{draw(props)}</div>;
};
