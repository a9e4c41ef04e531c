import { describe, expect, it } from 'vitest';
import { type GateParts, gateTimes, passGate, pauseAfter } from '@/link/reconnect';

const socket = {} as WebSocket;

/** A gate whose world is a list of answers to the HTTP question; every step it takes is written down. */
function gate(answers: ('up' | 'refused' | 'silent')[], change: Partial<GateParts> = {}) {
  const steps: string[] = [];
  const parts: GateParts = {
    probe: async (limitMs) => {
      steps.push(`probe ${limitMs}`);
      return answers.shift() ?? 'up';
    },
    open: async (limitMs) => {
      steps.push(`open ${limitMs}`);
      return socket;
    },
    whyNot: async () => {
      steps.push('why');
      return null;
    },
    wait: async () => void steps.push('wait'),
    stopped: () => false,
    ...change,
  };
  return { steps, passed: passGate(parts) };
}

describe('the gate before a socket', () => {
  it('opens one only after the hub has answered a plain question', async () => {
    const { steps, passed } = gate(['refused', 'refused', 'up']);
    expect(await passed).toBe(socket);
    expect(steps).toEqual(['probe 800', 'wait', 'probe 800', 'wait', 'probe 800', 'open 6000']);
  });

  it('tries a socket anyhow when no answer comes at all', async () => {
    const { steps, passed } = gate(['silent']);
    expect(await passed).toBe(socket);
    expect(steps).toEqual(['probe 800', 'open 6000']);
  });

  it('asks why only a hub that is up and refuses', async () => {
    let left = 2;
    const opens = async () => (left-- > 0 ? null : socket);
    const { steps, passed } = gate(['silent', 'up', 'up'], { open: opens });
    expect(await passed).toBe(socket);
    expect(steps).toEqual(['probe 800', 'wait', 'probe 800', 'why', 'wait', 'probe 800']);
  });

  it('ends with the words of a hub that lets the page in no more', async () => {
    const { passed } = gate([], { open: async () => null, whyNot: async () => 'This show is gone.' });
    expect(await passed).toEqual({ refused: 'This show is gone.' });
  });

  it('ends without a socket once it is not wanted', async () => {
    let wanted = true;
    const wait = async () => {
      wanted = false;
    };
    const { passed } = gate(['refused'], { stopped: () => !wanted, wait });
    expect(await passed).toBeNull();
  });

  it('waits twice as long after each refused socket, two seconds at the most', () => {
    for (const [failures, least] of [
      [0, 200],
      [1, 200],
      [2, 400],
      [3, 800],
      [5, gateTimes.longest],
      [40, gateTimes.longest],
    ] as const) {
      const pause = pauseAfter(failures);
      expect(pause).toBeGreaterThanOrEqual(least);
      expect(pause).toBeLessThanOrEqual(least * 1.5);
      expect(pause).toBeLessThanOrEqual(2000);
    }
  });
});
