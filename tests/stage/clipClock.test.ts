import { describe, expect, it } from 'vitest';
import { correction, loopError } from '@/stage/clipClock';
import { linesFor } from '@/stage/wordsLines';

describe('holding a clip to the clock', () => {
  it.each([
    // Half a frame at 30 a second is 16.7 ms.
    [0.015, { seek: false, speed: 1 }],
    [-0.015, { seek: false, speed: 1 }],
    [0.02, { seek: false, speed: 1.05 }],
    [-0.2, { seek: false, speed: 0.95 }],
    [0.25, { seek: true, speed: 1 }],
    [-3, { seek: true, speed: 1 }],
  ])('answers an error of %f s', (error, wanted) => {
    expect(correction(error, 30)).toEqual(wanted);
  });

  it('takes the short way round the loop', () => {
    expect(loopError(0.1, 1.9, 2)).toBeCloseTo(0.2, 12);
    expect(loopError(1.9, 0.1, 2)).toBeCloseTo(-0.2, 12);
    expect(loopError(1, 1, 2)).toBe(0);
  });

  it('closes a gap of 200 ms within five seconds, in a clip that obeys', () => {
    let [target, at, seconds] = [0.2, 0, 0];
    while (Math.abs(target - at) > 0.5 / 30 && seconds < 10) {
      at += correction(target - at, 30).speed / 60;
      target += 1 / 60;
      seconds += 1 / 60;
    }
    expect(seconds).toBeLessThan(5);
  });
});

describe('lines of words', () => {
  const width = (text: string): number => text.length * 50;

  it('breaks a long line where it stands largest in its box', () => {
    expect(linesFor('Boathouse 4 welcomes the night swimmers', 16 / 9, width)).toEqual([
      'Boathouse 4',
      'welcomes the',
      'night swimmers',
    ]);
    expect(linesFor('Salt & Static', 6, width)).toEqual(['Salt & Static']);
  });

  it('keeps the breaks of the writer', () => {
    expect(linesFor('Doors\n at nine tonight', 16 / 9, width)).toEqual(['Doors', 'at nine tonight']);
  });

  it('loses no word', () => {
    const text = 'one two three four five six seven eight nine ten eleven twelve';
    expect(linesFor(text, 1, width).join(' ')).toBe(text);
  });
});
