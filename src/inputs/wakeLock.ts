/** `awake`: the screen stays on. `may sleep`: refused or not available, so the crew must be told. */
export type WakeState = 'asking' | 'awake' | 'may sleep';

/**
 * Keeps the screen on while the page is visible, by the Screen Wake Lock API. The lock is lost whenever the page is
 * hidden and is taken again when it comes back. A playing silent video would hold some phones that lack the API, but
 * it drains the battery and pauses other sound, so it is left out and the state says `may sleep`.
 * @returns what stops it
 */
export const keepAwake = (onState: (state: WakeState) => void): (() => void) => {
  let stopped = false;
  let lock: WakeLockSentinel | null = null;

  const take = async (): Promise<void> => {
    if (stopped || lock || document.hidden) return;
    try {
      const taken = await navigator.wakeLock.request('screen');
      if (stopped) return void taken.release();
      lock = taken;
      taken.addEventListener('release', () => {
        lock = null;
        if (!stopped && !document.hidden) onState('may sleep');
      });
      onState('awake');
    } catch {
      // Not available (plain http, old phone) or refused (low power mode).
      if (!stopped) onState('may sleep');
    }
  };
  const again = () => void take();

  onState('asking');
  again();
  document.addEventListener('visibilitychange', again);
  // Some phones refuse until the page has been touched.
  document.addEventListener('pointerup', again);
  return () => {
    stopped = true;
    document.removeEventListener('visibilitychange', again);
    document.removeEventListener('pointerup', again);
    void lock?.release();
  };
};
