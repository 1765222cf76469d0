import { describe, expect, it } from 'vitest';
import { canBeSigned, type DocumentEventKind, stateOf } from '@/lib/documents/schema';

const state = (kinds: DocumentEventKind[], until: string | null = null, today = '2026-12-01') =>
  stateOf(
    kinds.map((kind) => ({ kind })),
    until,
    today,
  );

describe('a document’s state', () => {
  it.each<[DocumentEventKind[], string]>([
    [[], 'draft'],
    [['sent'], 'sent'],
    [['sent', 'opened'], 'opened'],
    [['sent', 'opened', 'resent'], 'sent'],
    [['sent', 'opened', 'declined'], 'declined'],
    [['sent', 'declined', 'opened'], 'declined'],
    [['sent', 'declined', 'resent'], 'sent'],
    [['sent', 'opened', 'accepted'], 'accepted'],
    [['sent', 'superseded', 'opened'], 'superseded'],
    [['sent', 'withdrawn'], 'withdrawn'],
  ])('of %j is %s', (kinds, expected) => expect(state(kinds)).toBe(expected));

  it('ends with its date only where it still waits for an answer', () => {
    expect(state(['sent'], '2026-12-01')).toBe('sent');
    expect(state(['sent'], '2026-11-30')).toBe('expired');
    expect(state(['sent', 'opened'], '2026-11-30')).toBe('expired');
    expect(state(['sent', 'accepted'], '2026-11-30')).toBe('accepted');
    expect(state(['sent', 'declined'], '2026-11-30')).toBe('declined');
  });

  it('can be signed while it is sent or opened, and not otherwise', () => {
    expect((['sent', 'opened'] as const).every(canBeSigned)).toBe(true);
    const closed = ['draft', 'accepted', 'declined', 'superseded', 'withdrawn', 'expired'] as const;
    expect(closed.some(canBeSigned)).toBe(false);
  });
});
