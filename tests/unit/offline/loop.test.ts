/** When a phone asks again: soon after an edit, more and more seldom where nothing answers, at once on a signal. */
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { pauseAfter, SyncLoop } from '@/lib/offline/loop';
import type { SyncOutcome } from '@/lib/offline/sync';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

describe('pauses between tries', () => {
  it('double up to half a minute, and spread so that many phones do not come at once', () => {
    expect([1, 2, 3, 4, 5, 9].map((failures) => pauseAfter(failures, 0.5))).toEqual([
      2_000, 4_000, 8_000, 16_000, 30_000, 30_000,
    ]);
    expect(pauseAfter(3, 0)).toBe(6_400);
    expect(pauseAfter(3, 1)).toBe(9_600);
    expect(pauseAfter(0, 1)).toBe(30_000);
  });
});

describe('the loop', () => {
  const make = (outcomes: SyncOutcome[]) => {
    const runs: { at: number; pull: boolean }[] = [];
    const told: SyncOutcome[] = [];
    const begun = Date.now();
    const loop = new SyncLoop(
      (pull) => {
        runs.push({ at: Date.now() - begun, pull });
        return Promise.resolve(outcomes[runs.length - 1] ?? 'nothing');
      },
      (outcome) => void told.push(outcome),
    );
    return { loop, runs, told };
  };

  it('backs off while there is no network, and is at its steady pace once there is', async () => {
    vi.spyOn(Math, 'random').mockReturnValue(0.5);
    const { loop, runs, told } = make(['offline', 'offline', 'offline', 'nothing']);
    loop.hurry();
    await vi.advanceTimersByTimeAsync(60_000);
    loop.stop();
    expect(runs.map(({ at }) => at)).toEqual([0, 2_000, 6_000, 14_000, 44_000]);
    expect(told).toEqual(['offline', 'offline', 'offline', 'nothing', 'nothing']);
  });

  it('sends soon after an edit, once for many keys, and does not ask for news then', async () => {
    const { loop, runs } = make([]);
    loop.hurry();
    await vi.advanceTimersByTimeAsync(5_000);
    for (let key = 0; key < 5; key++) {
      loop.nudge();
      await vi.advanceTimersByTimeAsync(100);
    }
    await vi.advanceTimersByTimeAsync(2_000);
    loop.stop();
    expect(runs).toEqual([
      { at: 0, pull: true },
      { at: 6_100, pull: false },
    ]);
  });

  it('what is typed while an exchange is on its way is sent right after it', async () => {
    const ends: ((outcome: SyncOutcome) => void)[] = [];
    const loop = new SyncLoop(
      () => new Promise((resolve) => ends.push(resolve)),
      () => undefined,
    );
    loop.hurry();
    await vi.advanceTimersByTimeAsync(1_000);
    loop.nudge();
    await vi.advanceTimersByTimeAsync(2_000);
    expect(ends).toHaveLength(1);
    ends[0]?.('nothing');
    await vi.advanceTimersByTimeAsync(1_000);
    loop.stop();
    expect(ends).toHaveLength(2);
  });

  it('who types without a pause hears of the others all the same, twice a minute', async () => {
    const { loop, runs } = make([]);
    loop.hurry();
    for (let second = 0; second < 65; second++) {
      loop.nudge();
      await vi.advanceTimersByTimeAsync(1_000);
    }
    loop.stop();
    expect(runs.filter(({ pull }) => pull)).toHaveLength(3);
    expect(runs.length).toBeGreaterThan(50);
  });

  it('does not press a server in trouble for every key, but does where only the signal was gone', async () => {
    vi.spyOn(Math, 'random').mockReturnValue(0.5);
    const troubled = make(['failed']);
    troubled.loop.hurry();
    await vi.advanceTimersByTimeAsync(100);
    troubled.loop.nudge();
    await vi.advanceTimersByTimeAsync(1_500);
    expect(troubled.runs).toHaveLength(1);
    troubled.loop.stop();
    const away = make(['offline']);
    away.loop.hurry();
    await vi.advanceTimersByTimeAsync(100);
    away.loop.nudge();
    await vi.advanceTimersByTimeAsync(1_500);
    expect(away.runs).toHaveLength(2);
    away.loop.stop();
  });

  it('goes on after a run that threw, and does nothing any more once stopped', async () => {
    let runs = 0;
    const told: SyncOutcome[] = [];
    const loop = new SyncLoop(
      () => {
        runs++;
        throw new Error('closed');
      },
      (outcome) => void told.push(outcome),
    );
    loop.hurry();
    await vi.advanceTimersByTimeAsync(3_000);
    expect(told).toEqual(['failed', 'failed']);
    loop.stop();
    await vi.advanceTimersByTimeAsync(120_000);
    expect(runs).toBe(2);
  });
});
