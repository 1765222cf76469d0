/** When to exchange with the server: soon after an edit, again and again meanwhile, more and more seldom where it fails. */
import type { SyncOutcome } from './sync';

const AFTER_EDIT_MS = 700;
const STEADY_MS = 30_000;
const FIRST_RETRY_MS = 2_000;

/** @param failures in a row; @param chance 0 to 1, so that many phones do not come back in the same instant */
export function pauseAfter(failures: number, chance: number): number {
  if (failures === 0) return STEADY_MS;
  const pause = Math.min(STEADY_MS, FIRST_RETRY_MS * 2 ** (failures - 1));
  return Math.round(pause * (0.8 + 0.4 * chance));
}

export class SyncLoop {
  private timer: ReturnType<typeof setTimeout> | null = null;
  private running = false;
  /** What came up while an exchange was on its way. */
  private again: 'send' | 'pull' | null = null;
  private pulledAt = -Infinity;
  private stopped = false;
  private failures = 0;
  private last: SyncOutcome | null = null;

  constructor(
    private readonly run: (pull: boolean) => Promise<SyncOutcome>,
    private readonly told: (outcome: SyncOutcome) => void,
  ) {}

  /** A signal came back, or somebody looks at the screen again. */
  hurry(): void {
    this.failures = 0;
    void this.turn(true);
  }

  /** Something was typed. A server in trouble is not asked more often for it. */
  nudge(): void {
    if (this.running) this.again ??= 'send';
    else if (this.last !== 'failed') this.plan(AFTER_EDIT_MS, false);
  }

  stop(): void {
    this.stopped = true;
    if (this.timer) clearTimeout(this.timer);
  }

  private plan(pause: number, pull: boolean): void {
    if (this.timer) clearTimeout(this.timer);
    if (!this.stopped) this.timer = setTimeout(() => void this.turn(pull), pause);
  }

  private async turn(asked: boolean): Promise<void> {
    if (this.stopped) return;
    if (this.running) {
      if (asked) this.again = 'pull';
      return;
    }
    this.running = true;
    // Who types without a pause hears of the others all the same.
    const pull = asked || Date.now() - this.pulledAt >= STEADY_MS;
    if (pull) this.pulledAt = Date.now();
    const outcome = await this.outcome(pull);
    this.running = false;
    if (this.stopped) return;
    this.last = outcome;
    this.failures = outcome === 'nothing' ? 0 : this.failures + 1;
    this.told(outcome);
    const { again } = this;
    this.again = null;
    if (again && outcome !== 'failed') this.plan(AFTER_EDIT_MS, again === 'pull');
    else this.plan(pauseAfter(this.failures, Math.random()), true);
  }

  /** A store that was closed under it (sign-out in another tab) ends the page, not the loop. */
  private async outcome(pull: boolean): Promise<SyncOutcome> {
    try {
      return await this.run(pull);
    } catch {
      return 'failed';
    }
  }
}
