/**
 * Runs works of the same key one after the other, in the order they were asked for, so that an older look at the
 * database never ends up over a newer one. Works of different keys do not wait for each other.
 * @param onFail told of a work that failed; the next one runs all the same
 */
export function makeTurns(
  onFail: (error: unknown, key: string) => void,
): (key: string, work: () => Promise<void>) => void {
  const last = new Map<string, Promise<void>>();
  return (key, work) => {
    const turn = (last.get(key) ?? Promise.resolve())
      .then(work)
      .catch((error: unknown) => onFail(error, key))
      .finally(() => {
        if (last.get(key) === turn) last.delete(key);
      });
    last.set(key, turn);
  };
}
