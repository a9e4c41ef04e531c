import { useEffect, useState } from 'react';
import { keepAwake, type WakeState } from '@/inputs/wakeLock';

/** Keeps the screen on while mounted and says whether that works. */
export const useWakeLock = (): WakeState => {
  const [state, setState] = useState<WakeState>('asking');
  useEffect(() => keepAwake(setState), []);
  return state;
};
