import { drawingSource } from '#shared/scene/defaults';
import { drawingFacts } from '#shared/scene/drawingFacts';
import { type DrawingName, drawingNames, type Source } from '#shared/scene/schema';
import { NumberField } from '@/components/NumberField';
import { Select } from '@/components/Select';
import { Slider } from '@/components/Slider';

type Drawing = Extract<Source, { kind: 'drawing' }>;

interface Props {
  source: Drawing;
  onSource: (source: Drawing, tag: string | null) => void;
}

const colours = ['Ground', 'Deep', 'Main', 'Bright'] as const;

/** Which drawing, its seed, its four colours and what its two numbers mean. */
export const DrawingFields = ({ source, onSource }: Props) => {
  const facts = drawingFacts[source.drawing];
  const choose = (drawing: DrawingName) => {
    const made = drawingSource(drawing, source.seed);
    if (made.kind === 'drawing') onSource(made, null);
  };
  return (
    <>
      <div className="flex flex-wrap items-end gap-3">
        <Select
          label="Drawing"
          value={source.drawing}
          options={drawingNames.map((name) => ({ value: name, label: drawingFacts[name].title }))}
          onChange={(event) => choose(event.target.value as DrawingName)}
        />
        <div className="w-32">
          <NumberField
            label="Seed"
            value={source.seed}
            min={0}
            max={0xffff_ffff}
            onChange={(seed) => Number.isInteger(seed) && onSource({ ...source, seed }, 'seed')}
          />
        </div>
      </div>
      {(['a', 'b'] as const).map((key) => (
        <Slider
          key={key}
          label={facts[key]}
          value={source[key]}
          min={0}
          max={1}
          step={0.01}
          onChange={(value) => onSource({ ...source, [key]: value }, key)}
        />
      ))}
      <fieldset className="flex flex-wrap gap-3">
        <legend className="mb-1 text-sm text-(--quiet)">Colours</legend>
        {colours.map((name, index) => (
          <label key={name} className="flex items-center gap-2 text-sm">
            <input
              type="color"
              value={source.palette[index] ?? '#000000'}
              className="h-11 w-12 rounded-lg border border-(--line) bg-(--raised)"
              onChange={(event) =>
                onSource(
                  {
                    ...source,
                    palette: source.palette.map((colour, at) => (at === index ? event.target.value : colour)),
                  },
                  `colour ${index}`,
                )
              }
            />
            {name}
          </label>
        ))}
      </fieldset>
    </>
  );
};
