import type { SceneBody } from '#shared/scene/schema';
import { Button } from '@/components/Button';
import { Field } from '@/components/Field';
import { Slider } from '@/components/Slider';
import { most, removeDial } from './bodyEdits';

interface Props {
  body: SceneBody;
  onBody: (body: SceneBody, tag: string | null) => void;
}

/** Up to four dials, each with a name and the value it starts from. */
export const DialRows = ({ body, onBody }: Props) => {
  const edit = (index: number, change: Partial<SceneBody['dials'][number]>, tag: string) =>
    onBody(
      { ...body, dials: body.dials.map((dial, at) => (at === index ? { ...dial, ...change } : dial)) },
      tag,
    );
  const rows = body.dials.map((dial, index) => ({ dial, index, key: `dial ${index}` }));
  return (
    <section aria-label="Dials" className="rounded-2xl bg-(--raised) p-4">
      <div className="mb-2 flex items-center justify-between gap-3">
        <h2 className="font-bold">Dials</h2>
        <Button
          disabled={body.dials.length >= most.dials}
          onClick={() =>
            onBody(
              { ...body, dials: [...body.dials, { name: `Dial ${body.dials.length + 1}`, value: 1 }] },
              null,
            )
          }
        >
          Add a dial
        </Button>
      </div>
      {rows.length === 0 && (
        <p className="text-(--quiet)">
          A dial moves the strength of the layers that are on it, from the handset.
        </p>
      )}
      <ul className="grid gap-3 md:grid-cols-2">
        {rows.map(({ dial, index, key }) => (
          <li key={key} className="flex flex-col gap-1">
            <div className="flex items-end gap-2">
              <Field
                label={`Dial ${index + 1}`}
                value={dial.name}
                maxLength={24}
                onChange={(event) => edit(index, { name: event.target.value }, `dial name ${index}`)}
              />
              <Button
                aria-label={`Remove the dial ${dial.name}`}
                onClick={() => onBody(removeDial(body, index), null)}
              >
                Remove
              </Button>
            </div>
            <Slider
              label="Starts at"
              value={dial.value}
              min={0}
              max={1}
              step={0.01}
              onChange={(value) => edit(index, { value }, `dial value ${index}`)}
            />
          </li>
        ))}
      </ul>
    </section>
  );
};
