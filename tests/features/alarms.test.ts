import { describe, expect, it } from 'vitest';
import type { DisplayStatus, Vitals } from '#shared/protocol/messages';
import { screenSchema } from '#shared/venue/schema';
import { alarmsOf } from '@/features/lookout/alarms';

const now = 1_000_000;
const vitals: Vitals = {
  displayId: 'd1',
  fps: 60,
  longestMs: 18,
  clockErrorMs: 0.4,
  linkMs: 3,
  filesOnBoard: 4,
  filesWanted: 4,
  raster: [1920, 1080],
  visible: true,
  fullscreen: true,
  awake: true,
  still: false,
  changes: 9,
  upS: 100,
  trouble: null,
};
const fine: DisplayStatus = {
  displayId: 'd1',
  connected: true,
  lastSeenAt: now - 400,
  vitals,
  changedAt: now - 900,
  simulated: false,
};
const screen = (id: string, width: number) =>
  screenSchema.parse({
    id,
    name: id,
    kind: 'projection',
    width,
    height: 1,
    centre: [0, 2, 0],
    yaw: 0,
    tilt: 0,
    roll: 0,
  });
const region = (screenId: string) => ({
  id: screenId,
  screenId,
  name: screenId,
  source: { x: 0, y: 0, w: 1, h: 1 },
  corners: [
    [0, 0],
    [1, 0],
    [1, 1],
    [0, 1],
  ] as [[number, number], [number, number], [number, number], [number, number]],
  brightness: 1,
});
const map = (...ids: string[]) => ({ raster: [1920, 1080] as [number, number], regions: ids.map(region) });
const of = (
  displays: DisplayStatus[],
  screens = [screen('back', 6)],
  maps = { d1: map('back') } as Record<string, ReturnType<typeof map>>,
) => alarmsOf({ displays, names: { d1: 'Back left', d2: 'Stairs' }, maps, screens, now });

describe('alarms of the lookout', () => {
  it('says nothing while every display draws', () => {
    expect(of([fine])).toEqual([]);
  });

  it('names a display that is gone and for how long', () => {
    const [alarm] = of([{ ...fine, connected: false, lastSeenAt: now - 14_200 }]);
    expect(alarm).toMatchObject({
      what: 'Back left has no link for 14 s',
      severity: 'broken',
      displayId: 'd1',
    });
  });

  it('finds a display that talks but stands still', () => {
    const [alarm] = of([{ ...fine, changedAt: now - 4000 }]);
    expect(alarm?.what).toBe('Back left stands still for 4 s');
  });

  it('keeps quiet about a declared still', () => {
    expect(of([{ ...fine, vitals: { ...vitals, still: true }, changedAt: now - 60_000 }])).toEqual([]);
  });

  it('finds a display whose loop has stopped while its socket lives', () => {
    expect(of([{ ...fine, vitals: { ...vitals, fps: 0 } }])[0]?.what).toBe(
      'Back left hardly draws: 0 frames a second',
    );
  });

  it('puts broken before slow, and the wall that more people see first', () => {
    const displays: DisplayStatus[] = [
      { ...fine, vitals: { ...vitals, fps: 20 } },
      { ...fine, displayId: 'd2', connected: false, lastSeenAt: now - 5000 },
    ];
    const keys = of(displays, [screen('back', 6), screen('stairs', 1), screen('bar', 2)], {
      d1: map('back'),
      d2: map('stairs'),
    }).map((alarm) => alarm.key);
    expect(keys).toEqual(['lost d2', 'slow d1', 'bare bar']);
  });

  it('leaves simulated displays out', () => {
    expect(of([{ ...fine, simulated: true, connected: false }])).toEqual([]);
  });
});
