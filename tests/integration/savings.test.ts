/** A job's saving, from its change lines, its hours and what is assumed; worked by hand in the comments. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/lib/platform/db';
import { saveSaving } from '@/lib/savings/commands';
import { loadSaving } from '@/lib/savings/queries';
import { ASSUMPTION_KEYS, savingForm, type SavingForm } from '@/lib/savings/schema';
import { addParts, bakery } from '@/seeders/demo';
import { releasedSheet } from '../support/released-sheet';
import { makeShop, type TestShop } from '../support/shop';

let shop: TestShop;
let job = '';
beforeAll(async () => {
  shop = await makeShop();
  job = await bakery(shop.actors.owner, await addParts(shop.actors.owner));
});
afterAll(closeDatabase);

/** What the form sends for what the page shows, with some of it changed. */
async function typed(change: Partial<SavingForm> = {}): Promise<SavingForm> {
  const { assumptions, version } = await loadSaving(shop.shopId, job);
  const figures = Object.fromEntries(
    ASSUMPTION_KEYS.map((key) => [
      key,
      {
        value: assumptions[key].value === null ? '' : String(assumptions[key].value),
        source: assumptions[key].source,
      },
    ]),
  );
  return { jobId: job, baseVersion: version, rateIsBlended: false, ...figures, ...change } as SavingForm;
}
const save = async (change: Partial<SavingForm>) =>
  saveSaving(shop.actors.estimator, savingForm.parse(await typed(change)));

describe('a job’s saving', () => {
  it('takes its energy from change lines and hours, and no money without a rate', async () => {
    const { figured, changes } = await loadSaving(shop.shopId, job);
    expect(changes).toBeGreaterThan(0);
    expect(figured.payback).toBeNull();
    const { result } = figured.energy;
    // The bakery's back room: 12 fixtures of 112 W give way to 12 of 35 W, 78 h a week all year = 78 * 365 / 7 h.
    const hours = (78 * 365) / 7;
    expect(figured.areas).toMatchObject([{ area: 'Back room' }]);
    expect(figured.areas[0]?.kilowattHoursBefore).toBeCloseTo((12 * 112 * hours) / 1000, 6);
    expect(figured.areas[0]?.kilowattHoursAfter).toBeCloseTo((12 * 35 * hours) / 1000, 6);
    expect(figured.areas.reduce((sum, one) => sum + one.kilowattHoursBefore, 0)).toBeCloseTo(
      result.kilowattHoursBefore,
      6,
    );
    expect(figured.areas.reduce((sum, one) => sum + one.kilowattHoursAfter, 0)).toBeCloseTo(
      result.kilowattHoursAfter,
      6,
    );
  });

  it('is worth what the rates say, and pays back on the quote’s total before tax', async () => {
    await releasedSheet(shop, job);
    await save({
      energyRate: { value: '0.15', source: 'bill of March' },
      interactionPct: { value: '110', source: 'warm place' },
      discountPct: { value: '0', source: 'as asked' },
      years: { value: '10', source: 'as asked' },
      incentive: { value: '0', source: 'none' },
    });
    const { figured, quoted, assumptions } = await loadSaving(shop.shopId, job);
    const { result } = figured.energy;
    const saved = (result.kilowattHoursBefore - result.kilowattHoursAfter) * 1.1 * 0.15;
    expect(result.costSaved).toBeCloseTo(saved, 6);
    expect(assumptions.energyRate).toEqual({ value: 0.15, source: 'bill of March' });
    const pays = figured.payback?.result;
    expect(pays?.netCost).toBe(quoted?.value);
    expect(saved).toBeGreaterThan(0);
    expect(pays?.simplePaybackYears).toBeCloseTo((quoted?.value ?? 0) / saved, 6);
    // No discount: what is left after ten years is ten savings less the cost.
    expect(pays?.netPresentValue).toBeCloseTo(10 * saved - (quoted?.value ?? 0), 4);
  });

  it('shows both when two people change it, and names a field that is not read', async () => {
    const first = await typed({ maintenance: { value: '40', source: 'A' } });
    await saveSaving(shop.actors.owner, savingForm.parse(first));
    await expect(
      saveSaving(
        shop.actors.estimator,
        savingForm.parse({ ...first, maintenance: { value: '50', source: 'B' } }),
      ),
    ).rejects.toMatchObject({ code: 'conflict', current: { assumptions: { maintenance: { value: 40 } } } });
    for (const [key, value] of [
      ['energyRate', 'cheap'],
      ['coincidencePct', '101'],
      ['years', '2.5'],
      ['cost', '-1'],
    ] as const) {
      const wrong = savingForm.safeParse(await typed({ [key]: { value, source: '' } }));
      expect(wrong.success ? [] : wrong.error.issues.map(({ path }) => path.join('.'))).toEqual([
        `${key}.value`,
      ]);
    }
  });

  it('is nobody else’s', async () => {
    const stranger = await makeShop();
    await expect(loadSaving(stranger.shopId, job)).rejects.toMatchObject({ code: 'not-found' });
    const form = savingForm.parse(await typed());
    await expect(saveSaving(stranger.actors.owner, form)).rejects.toMatchObject({ code: 'not-found' });
  });
});
