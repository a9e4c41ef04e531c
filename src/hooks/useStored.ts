import { useCallback, useState } from 'react';

const read = <T>(key: string, fallback: T, isValid: (value: unknown) => value is T): T => {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    return isValid(value) ? value : fallback;
  } catch {
    return fallback;
  }
};

/** State that survives a reload, in localStorage. What was stored is checked; a full or forbidden store is no fault. */
export const useStored = <T>(
  key: string,
  fallback: T,
  isValid: (value: unknown) => value is T,
): [T, (value: T) => void] => {
  const [value, setValue] = useState(() => read(key, fallback, isValid));
  const store = useCallback(
    (next: T) => {
      setValue(next);
      try {
        localStorage.setItem(key, JSON.stringify(next));
      } catch {
        // Private windows may refuse; the choice then lasts as long as the page.
      }
    },
    [key],
  );
  return [value, store];
};
