import { monitorEventLoopDelay } from 'node:perf_hooks';
import bcrypt from 'bcryptjs';
import { describe, expect, it } from 'vitest';
import { checkPassword, hashPassword } from '#server/services/passwords';

const words = 'salt static and otters';

describe('passwords', () => {
  it('are kept as bcrypt of cost 12, with a salt each', async () => {
    const [one, two] = await Promise.all([hashPassword(words), hashPassword(words)]);
    expect(bcrypt.getRounds(one)).toBe(12);
    expect(one).not.toBe(two);
    expect(await checkPassword(words, one)).toBe(true);
    expect(await checkPassword(`${words}!`, one)).toBe(false);
  });

  it('do not fit by their first 72 bytes alone', async () => {
    const longest = 'é'.repeat(36);
    const hash = await hashPassword(longest);
    expect(await checkPassword(longest, hash)).toBe(true);
    expect(await checkPassword(`${longest}more`, hash)).toBe(false);
  });

  it('take as long for nobody as for somebody', async () => {
    const hash = await hashPassword(words);
    const time = async (whose: string | null) => {
      const from = performance.now();
      expect(await checkPassword('not these words', whose)).toBe(false);
      return performance.now() - from;
    };
    const somebody: number[] = [];
    const nobody: number[] = [];
    for (let one = 0; one < 5; one += 1) {
      somebody.push(await time(hash));
      nobody.push(await time(null));
    }
    // The least of five: whatever else runs on this machine only adds.
    expect(Math.min(...nobody) / Math.min(...somebody)).toBeGreaterThan(0.5);
    expect(Math.min(...nobody) / Math.min(...somebody)).toBeLessThan(2);
  });

  it('are worked on beside the loop: beats go on meanwhile', async () => {
    const delay = monitorEventLoopDelay({ resolution: 5 });
    delay.enable();
    await Promise.all([hashPassword(words), hashPassword(words), hashPassword(words)]);
    delay.disable();
    // On the loop itself bcryptjs lets go each 100 ms only.
    expect(delay.percentile(50) / 1e6).toBeLessThan(50);
  });
});
