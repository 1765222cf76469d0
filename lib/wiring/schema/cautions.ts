/** Which cautions stand before a sheet's first step, in the order in which they are read. */

export interface SiteFacts {
  /** Hazards said yes to, or not known. */
  hazards: ReadonlySet<string>;
  actions: ReadonlySet<string>;
  /** The electrical facts of the existing luminaires. */
  existing: readonly Record<string, unknown>[];
}

const ALWAYS = [
  'crew.caution.advice',
  'crew.caution.dead.title',
  'crew.caution.dead.find',
  'crew.caution.dead.neutral',
  'crew.caution.dead.prove',
  'crew.caution.live.title',
  'crew.caution.live.how',
  'crew.caution.live.string',
  'crew.caution.live.mains',
];

const REWIRED = ['relamp', 'bypass', 'external-driver', 'listed-kit'];

/** Dead work and live readings always; the others where the site or the work gives reason to. */
export function cautionsFor({ hazards, actions, existing }: SiteFacts): string[] {
  const some = (field: string, free: readonly string[]) =>
    existing.some((one) => !free.includes(String(one[field] ?? 'unknown')));
  const when: [boolean, string][] = [
    [REWIRED.some((action) => actions.has(action)), 'crew.caution.lampholder'],
    [hazards.has('suspectBallasts') || some('ballast', ['none']), 'crew.caution.ballast'],
    [existing.length > 0, 'crew.caution.lamps'],
    [hazards.has('suspectCeiling'), 'crew.caution.ceiling'],
    [some('emergency', ['none']), 'crew.caution.emergency'],
    [some('dimmer', ['none', 'phase-forward', 'phase-reverse', 'dali']), 'crew.caution.control-pair'],
  ];
  return [...ALWAYS, ...when.flatMap(([asked, key]) => (asked ? [key] : []))];
}
