import { afterEach, beforeEach, expect, vi } from 'vitest';

/**
 * What a program prints while it's tested is a claim too: a warning that nobody expected fails the test. A test that
 * means it calls `expectConsole(/pattern/)` first.
 */
const expected: RegExp[] = [];
const unexpected: string[] = [];

/** Allows console lines that match, for the running test only. */
export function expectConsole(pattern: RegExp): void {
  expected.push(pattern);
}

beforeEach(() => {
  expected.length = 0;
  unexpected.length = 0;
  for (const level of ['error', 'warn'] as const)
    vi.spyOn(console, level).mockImplementation((...parts: unknown[]) => {
      const line = parts.map(String).join(' ');
      if (!expected.some((pattern) => pattern.test(line))) unexpected.push(`console.${level}: ${line}`);
    });
});

afterEach(() => {
  expect(unexpected).toEqual([]);
});
