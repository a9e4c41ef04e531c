import type { Badge } from './tileWords';

/** Shapes that carry a state together with its colour, so that neither stands alone. 16 × 16, currentColor. */
const Shape = ({ children, spin }: { children: React.ReactNode; spin?: boolean }) => (
  <svg viewBox="0 0 16 16" className={`size-4 shrink-0 ${spin ? 'opacity-70' : ''}`} aria-hidden="true">
    {children}
  </svg>
);

/** On the wall now. */
export const Disc = () => (
  <Shape>
    <circle cx="8" cy="8" r="5" fill="currentColor" />
  </Shape>
);

/** Sent: a ring that fills as the beats run out. @param share 0..1 */
export const Ring = ({ share }: { share: number }) => {
  const length = 2 * Math.PI * 3;
  return (
    <Shape>
      <circle cx="8" cy="8" r="6.5" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <circle
        cx="8"
        cy="8"
        r="3"
        fill="none"
        stroke="currentColor"
        strokeWidth="6"
        strokeDasharray={`${length * share} ${length}`}
        transform="rotate(-90 8 8)"
      />
    </Shape>
  );
};

/** Asked, not taken yet: an empty ring of dots. */
export const DottedRing = () => (
  <Shape spin>
    <circle cx="8" cy="8" r="6" fill="none" stroke="currentColor" strokeWidth="2" strokeDasharray="2 2.7" />
  </Shape>
);

/** Look at this. */
export const Triangle = () => (
  <Shape>
    <path d="M8 2 15 14H1Z" fill="none" stroke="currentColor" strokeWidth="1.7" strokeLinejoin="round" />
    <path d="M8 6.5v3.5M8 11.6v.6" stroke="currentColor" strokeWidth="1.7" strokeLinecap="round" />
  </Shape>
);

/** Broken. */
export const CrossMark = () => (
  <Shape>
    <path d="M3 3 13 13M13 3 3 13" stroke="currentColor" strokeWidth="2.4" strokeLinecap="round" />
  </Shape>
);

const colours: Record<Badge['kind'], string> = {
  asking: 'text-(--text)',
  sent: 'text-(--moonlight)',
  landing: 'text-(--moonlight)',
  on: 'text-(--firefly)',
  look: 'text-(--amber)',
};

const shapes: Record<Badge['kind'], (badge: Badge) => React.ReactNode> = {
  asking: () => <DottedRing />,
  sent: ({ share }) => <Ring share={share ?? 0} />,
  landing: () => <Ring share={1} />,
  on: () => <Disc />,
  look: () => <Triangle />,
};

/** One state of a tile: shape, colour and words. */
export const StateBadge = ({ badge }: { badge: Badge }) => (
  <span
    data-badge={badge.kind}
    className={`flex w-fit items-center gap-1.5 rounded-lg bg-black/80 px-2 py-0.5 font-semibold text-[18px] leading-6 ${colours[badge.kind]}`}
  >
    {shapes[badge.kind](badge)}
    {badge.words}
  </span>
);
