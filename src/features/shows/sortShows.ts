import type { Show } from '#shared/api/shows';

export interface ShowsByTime {
  tonight: Show[];
  coming: Show[];
  past: Show[];
}

/**
 * Shows as tonight, coming (soonest first) and past (latest first). A show that is live is tonight's whatever its date.
 * @param today YYYY-MM-DD of the night: before 06:00 the night still belongs to the day before
 */
export const sortShows = (shows: readonly Show[], today: string): ShowsByTime => {
  const byDate = [...shows].sort((a, b) => a.date.localeCompare(b.date) || a.name.localeCompare(b.name));
  const tonight = byDate.filter((show) => show.mode === 'live' || show.date === today);
  const rest = byDate.filter((show) => !tonight.includes(show));
  return {
    tonight,
    coming: rest.filter((show) => show.date > today),
    past: rest.filter((show) => show.date < today).reverse(),
  };
};

/** Hours after midnight that still belong to the night before (a show belongs to the date on which it began). */
export const nightEndsHour = 6;
