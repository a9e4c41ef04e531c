import type { Night } from './useNight';

/** Nudge, halve, double, and “this is the one”: for a beat that is nearly right. */
export const BeatTools = ({ night, caps = false }: { night: Night; caps?: boolean }) => {
  const tool = (words: string, label: string, act: () => void, cap: string, wide = '') => (
    <button
      type="button"
      aria-label={label}
      onClick={act}
      className={`relative h-15 rounded-2xl bg-(--raised-2) font-semibold text-[18px] active:bg-(--raised-3) ${wide}`}
    >
      {words}
      {caps && cap ? (
        <kbd className="absolute top-1 right-2 font-mono text-[13px] text-(--quiet)">{cap}</kbd>
      ) : null}
    </button>
  );
  return (
    <fieldset aria-label="Beat" className="grid grid-cols-4 gap-2">
      {tool('−10 ms', 'Beat 10 ms earlier', () => night.nudge(-10), '[')}
      {tool('+10 ms', 'Beat 10 ms later', () => night.nudge(10), ']')}
      {tool('÷2', 'Half the tempo', () => night.scale(0.5), '')}
      {tool('×2', 'Twice the tempo', () => night.scale(2), '')}
      {tool('This is the one', 'This is the one', night.theOne, 'Enter', 'col-span-4')}
    </fieldset>
  );
};
