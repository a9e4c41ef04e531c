import { CrossMark, Triangle } from './marks';
import type { Notice } from './useNotice';

const looks: Record<Notice['kind'], string> = {
  refused: 'border-(--amber) text-(--amber)',
  'not-sent': 'border-(--coral) border-dashed text-(--coral)',
};

/** The answer to a tap that did nothing, near the thumb: five words. */
export const NoticeLine = ({ notice }: { notice: Notice | null }) => (
  <div role="alert" className="pointer-events-none absolute inset-x-0 bottom-2 z-20 flex justify-center">
    {notice ? (
      <p
        key={notice.turn}
        data-notice={notice.kind}
        className={`flex items-center gap-2 rounded-2xl border-2 bg-(--ground) px-4 py-3 font-bold text-[20px] shadow-[0_0_24px_8px_var(--ground)] ${looks[notice.kind]}`}
      >
        {notice.kind === 'refused' ? <Triangle /> : <CrossMark />}
        {notice.words}
      </p>
    ) : null}
  </div>
);
