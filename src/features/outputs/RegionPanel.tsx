import { useId } from 'react';
import { wholeRaster } from '#shared/mapping/rectangle';
import type { OutputMap, Region } from '#shared/mapping/schema';
import type { Screen } from '#shared/venue/schema';
import { Button } from '@/components/Button';
import { Slider } from '@/components/Slider';
import { NumberBox } from './NumberBox';
import { cornerNames, inShape, withCorner } from './regionEdits';

interface Props {
  region: Region;
  screen: Screen | undefined;
  raster: OutputMap['raster'];
  corner: number | null;
  onEdit: (make: (region: Region) => Region, grip?: string) => void;
  onRemove: () => void;
}

const sourceParts = [
  { part: 'x', label: 'From left' },
  { part: 'y', label: 'From top' },
  { part: 'w', label: 'Width' },
  { part: 'h', label: 'Height' },
] as const;

/** Keeps the rectangle inside the screen's picture. Shares 0..1. */
const inside = (source: Region['source']): Region['source'] => {
  const w = Math.min(1, Math.max(0.01, source.w));
  const h = Math.min(1, Math.max(0.01, source.h));
  return { w, h, x: Math.min(1 - w, Math.max(0, source.x)), y: Math.min(1 - h, Math.max(0, source.y)) };
};

/** Which part of the screen's picture a region takes. */
const SourceFields = ({ region, onEdit }: Pick<Props, 'region' | 'onEdit'>) => (
  <fieldset className="grid grid-cols-2 gap-2">
    <legend className="mb-1 text-sm text-(--quiet)">Takes this part of the screen’s picture</legend>
    {sourceParts.map(({ part, label }) => (
      <NumberBox
        key={part}
        label={label}
        unit="%"
        value={region.source[part] * 100}
        min={0}
        max={100}
        step={1}
        onChange={(value) =>
          onEdit(
            (old) => ({ ...old, source: inside({ ...old.source, [part]: value / 100 }) }),
            `source ${part}`,
          )
        }
      />
    ))}
  </fieldset>
);

/** Everything about one region that is set by number. */
export const RegionPanel = ({ region, screen, raster, corner, onEdit, onRemove }: Props) => {
  const name = useId();
  return (
    <section className="flex flex-col gap-4">
      <label htmlFor={name} className="flex flex-col gap-1 text-sm text-(--quiet)">
        Region of {screen?.name ?? 'a screen that is gone'}
        <input
          id={name}
          value={region.name}
          maxLength={60}
          onChange={(event) => {
            const text = event.target.value;
            if (text) onEdit((old) => ({ ...old, name: text }), 'name');
          }}
          className="h-11 rounded-lg border border-(--line) bg-(--raised-2) px-3 text-base text-(--text)"
        />
      </label>
      {region.corners.map(([x, y], i) => (
        <div
          key={cornerNames[i]}
          className={`grid grid-cols-2 gap-2 ${corner === i ? 'text-(--firefly)' : ''}`}
        >
          <NumberBox
            label={`${cornerNames[i]} x`}
            unit="px"
            value={x}
            step={1}
            onChange={(value) =>
              onEdit((old) => withCorner(old, i, [value, old.corners[i]?.[1] ?? 0]), `x ${i}`)
            }
          />
          <NumberBox
            label="y"
            unit="px"
            value={y}
            step={1}
            onChange={(value) =>
              onEdit((old) => withCorner(old, i, [old.corners[i]?.[0] ?? 0, value]), `y ${i}`)
            }
          />
        </div>
      ))}
      <div className="flex flex-wrap gap-2">
        <Button variant="quiet" onClick={() => onEdit((old) => ({ ...old, corners: wholeRaster(raster) }))}>
          Whole raster
        </Button>
        {screen && (
          <Button
            variant="quiet"
            onClick={() => onEdit((old) => ({ ...old, corners: inShape(raster, screen) }))}
          >
            True shape
          </Button>
        )}
      </div>
      <SourceFields region={region} onEdit={onEdit} />
      <Slider
        label="Brightness"
        unit="%"
        min={0}
        max={100}
        step={1}
        value={Math.round(region.brightness * 100)}
        onChange={(value) => onEdit((old) => ({ ...old, brightness: value / 100 }), 'brightness')}
      />
      <Button variant="danger" onClick={onRemove}>
        Remove region
      </Button>
    </section>
  );
};
