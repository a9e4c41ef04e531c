import { describe, expect, it } from 'vitest';
import * as ws from 'ws';
import { bucket } from '#server/hub/limits';
import { encode } from '#server/hub/seat';
import type { FromHub } from '#shared/protocol/messages';

/** The library's parser, which its types leave out. */
interface Parser {
  on(event: 'message', hear: (data: Buffer, isBinary: boolean) => void): void;
  on(event: 'error', hear: (error: Error) => void): void;
  write(bytes: Buffer): void;
}
const { Receiver } = ws as unknown as { Receiver: new (options: object) => Parser };

/** What the library's own parser makes of a frame of ours. */
const read = (frame: Buffer): Promise<string> =>
  new Promise((resolve, reject) => {
    const receiver = new Receiver({ isServer: false, maxPayload: 10_000_000 });
    receiver.on('message', (data, isBinary) => resolve(`${isBinary} ${data}`));
    receiver.on('error', reject);
    receiver.write(frame);
  });

describe('a frame of the hub', () => {
  // Lengths on both sides of each step of RFC 6455 section 5.2, in bytes of UTF-8.
  it.each([0, 40, 200, 65_000, 65_700, 300_000])(
    'with %d more letters is read as it was meant',
    async (letters) => {
      const message: FromHub = {
        type: 'refused',
        commandId: 'c',
        code: 'expired',
        words: `é“${'x'.repeat(letters)}`,
      };
      expect(await read(encode(message))).toBe(`false ${JSON.stringify(message)}`);
    },
  );

  it('steps from 125 to 126 and from 65 535 to 65 536 bytes without a slip', async () => {
    const base = Buffer.byteLength(
      JSON.stringify({ type: 'refused', commandId: 'c', code: 'expired', words: '' }),
    );
    for (const bytes of [125, 126, 127, 65_535, 65_536]) {
      const words = 'x'.repeat(bytes - base);
      const message: FromHub = { type: 'refused', commandId: 'c', code: 'expired', words };
      expect((await read(encode(message))).length).toBe(bytes + 'false '.length);
    }
  });
});

describe('a token bucket', () => {
  it('lets twice a second’s worth through at once, and then its rate', () => {
    const within = bucket(10);
    expect(Array.from({ length: 30 }, () => within(0)).filter(Boolean).length).toBe(20);
    expect(within(99)).toBe(false);
    expect(within(200)).toBe(true);
  });
});
