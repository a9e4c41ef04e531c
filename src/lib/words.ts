const day = new Intl.DateTimeFormat('en-GB', {
  weekday: 'short',
  day: 'numeric',
  month: 'short',
  timeZone: 'UTC',
});
const moment = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  hour: '2-digit',
  minute: '2-digit',
});

/** A show's date (YYYY-MM-DD) as people say it: “Sat 12 Dec”. The text itself when it is no date. */
export const dayWords = (date: string): string => {
  const at = new Date(`${date}T00:00:00Z`);
  return Number.isNaN(at.getTime()) ? date : day.format(at);
};

/** A moment (ISO time) in this browser's own time zone; a dash for none. */
export const momentWords = (iso: string | null): string => (iso ? moment.format(new Date(iso)) : '–');

/** A count with its noun: “1 scene”, “3 scenes”. */
export const count = (n: number, noun: string, many = `${noun}s`): string => `${n} ${n === 1 ? noun : many}`;

/** A date of this browser's calendar as YYYY-MM-DD. */
export const localDate = (at: Date): string =>
  [at.getFullYear(), at.getMonth() + 1, at.getDate()].map((part) => String(part).padStart(2, '0')).join('-');
