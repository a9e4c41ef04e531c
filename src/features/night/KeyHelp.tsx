import { keyTable } from './keys';

/** The keys of Live, from the one table. */
export const KeyHelp = ({ onClose }: { onClose: () => void }) => (
  <section
    aria-label="Keys"
    className="absolute inset-0 z-30 overflow-y-auto rounded-2xl border border-(--line) bg-(--raised) p-6"
  >
    <div className="mb-4 flex items-center justify-between">
      <h2 className="font-bold text-[22px]">Keys</h2>
      <button type="button" onClick={onClose} className="h-12 rounded-xl bg-(--raised-2) px-5 font-semibold">
        Close
      </button>
    </div>
    <dl className="grid grid-cols-[repeat(auto-fill,minmax(20rem,1fr))] gap-x-8 gap-y-2 text-[18px]">
      <div className="flex gap-4">
        <dt className="w-20 font-mono">1 … 9 0</dt>
        <dd>Fire that scene; again takes it back</dd>
      </div>
      {keyTable.map(({ key, cap, words }) => (
        <div key={key} className="flex gap-4">
          <dt className="w-20 font-mono">{cap}</dt>
          <dd>{words}</dd>
        </div>
      ))}
    </dl>
  </section>
);
