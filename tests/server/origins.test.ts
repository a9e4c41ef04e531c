import { describe, expect, it } from 'vitest';
import { hostRule, originAllowed } from '#server/origins';

const rule = hostRule(() => 4646, null);
const behindProxy = hostRule(() => 4646, 'https://show.example');

describe('names we go by', () => {
  it.each(['127.0.0.1:4646', 'localhost:4646', 'LOCALHOST:4646', '[::1]:4646'])('knows %s', (host) => {
    expect(rule.knows(host)).toBe(true);
  });

  // DNS rebinding (CWE-350): a foreign name that leads to this machine.
  it.each(['evil.example:4646', '127.0.0.1:4647', '127.0.0.1', 'localhost.evil.example:4646', '', undefined])(
    'does not know %s',
    (host) => {
      expect(rule.knows(host)).toBe(false);
    },
  );

  it('knows the public address when there is one', () => {
    expect(behindProxy.knows('show.example')).toBe(true);
    expect(rule.knows('show.example')).toBe(false);
  });
});

describe('origins of writes', () => {
  it('takes our own pages', () => {
    expect(originAllowed(rule, 'http://127.0.0.1:4646')).toBe(true);
    expect(originAllowed(behindProxy, 'https://show.example')).toBe(true);
  });

  it.each([
    undefined,
    'null',
    'http://evil.example',
    'http://127.0.0.1:4646.evil.example',
    'http://evil.example/?http://127.0.0.1:4646',
    'http://127.0.0.1:9999',
    'file://',
    'ftp://127.0.0.1:4646',
    'http://user@127.0.0.1:4646',
    'http://127.0.0.1:4646/',
  ])('refuses %s', (origin) => {
    expect(originAllowed(rule, origin)).toBe(false);
  });
});
