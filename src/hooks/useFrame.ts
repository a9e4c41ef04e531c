import { useEffect, useRef } from 'react';

/** Calls `draw` with each frame's time (`performance.now()` base) while mounted; browsers stop it when hidden. */
export const useFrame = (draw: (performanceMs: number) => void): void => {
  const latest = useRef(draw);
  latest.current = draw;
  useEffect(() => {
    let handle = requestAnimationFrame(function step(at) {
      latest.current(at);
      handle = requestAnimationFrame(step);
    });
    return () => cancelAnimationFrame(handle);
  }, []);
};
