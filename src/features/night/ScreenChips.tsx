import { toggleScreens } from './choices';
import type { Night } from './useNight';

interface Chip {
  id: string;
  name: string;
  screenIds: readonly string[];
}

/** Groups first, then the screens one by one. */
const chipsOf = (night: Night): Chip[] => [
  ...night.show.groups,
  ...night.manifest.screens.map(({ id, name }) => ({ id, name, screenIds: [id] })),
];

/** Where a tap fires: everything, groups, or single screens; several at once. */
export const ScreenChips = ({ night, wrap = false }: { night: Night; wrap?: boolean }) => {
  const { choices, chosen } = night;
  const all = night.manifest.screens.map(({ id }) => id);
  const isAll = chosen.length === all.length;
  const choose = (screenIds: readonly string[] | null) => night.setChoices({ ...choices, screenIds });
  const chip = (key: string, name: string, on: boolean, onClick: () => void) => (
    <button
      key={key}
      type="button"
      aria-pressed={on}
      onClick={onClick}
      className={`${wrap ? 'h-12' : 'h-15'} min-w-15 shrink-0 whitespace-nowrap rounded-full px-4 font-semibold text-[18px] -outline-offset-2 outline-[3px] ${
        on
          ? 'bg-(--raised) text-(--text) outline-(--firefly)'
          : 'bg-(--raised-2) text-(--quiet) outline-transparent'
      }`}
    >
      {name}
    </button>
  );
  return (
    <fieldset
      aria-label="Fire on"
      className={`flex gap-2 ${wrap ? 'flex-wrap' : 'overflow-x-auto overscroll-contain [scrollbar-width:none]'}`}
    >
      {chip('all', 'All', isAll, () => choose(null))}
      {chipsOf(night).map(({ id, name, screenIds }) =>
        chip(id, name, !isAll && screenIds.every((screenId) => chosen.includes(screenId)), () =>
          choose(toggleScreens(choices.screenIds, screenIds, all)),
        ),
      )}
    </fieldset>
  );
};
