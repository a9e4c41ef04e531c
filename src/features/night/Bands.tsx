import type { Band } from './bands';
import { CrossMark, Triangle } from './marks';

const looks: Record<Band['kind'], string> = {
  broken: 'border-2 border-dashed border-(--coral) bg-(--coral)/15 text-(--coral)',
  look: 'bg-(--raised) text-(--amber)',
};

/** Lines about what is wrong, each with its shape. */
export const Bands = ({ bands }: { bands: readonly Band[] }) => (
  <div role="status" className="flex flex-col gap-1">
    {bands.map(({ kind, words }) => (
      <p
        key={words.replace(/\d+/g, '')}
        data-band={kind}
        className={`flex items-center gap-2 rounded-xl px-3 py-1.5 font-semibold text-[18px] leading-6 ${looks[kind]}`}
      >
        {kind === 'broken' ? <CrossMark /> : <Triangle />}
        {words}
      </p>
    ))}
  </div>
);
