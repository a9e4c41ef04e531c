import { describe, expect, it } from 'vitest';
import { makeDoor } from '#server/hub/limits';
import { makeTurns } from '#server/hub/turns';

const gate = () => {
  let open = () => {};
  const opened = new Promise<void>((resolve) => {
    open = resolve;
  });
  return { open, opened };
};

describe('works in turn', () => {
  it('of one key never overtake each other, also after one has failed', async () => {
    const failed: unknown[] = [];
    const inTurn = makeTurns((error) => failed.push(error));
    const done: string[] = [];
    const [slow, end] = [gate(), gate()];
    inTurn('a', async () => {
      await slow.opened;
      done.push('first');
      throw new Error('first');
    });
    inTurn('a', async () => {
      done.push('second');
      end.open();
    });
    inTurn('b', async () => {
      done.push('other');
      slow.open();
    });
    await end.opened;
    expect(done).toEqual(['other', 'first', 'second']);
    expect(failed).toHaveLength(1);
  });
});

describe('the count at the door', () => {
  it('holds an address and all together to their limits, and lets in again who has left', () => {
    const door = makeDoor(3, 2);
    expect(['a', 'a', 'a', 'b', 'c'].map(door.enter)).toEqual([true, true, false, true, false]);
    door.leave('a');
    expect(door.enter('a')).toBe(true);
  });
});
