/** From an area's survey to the lumen method's input; the figures worked by hand in the comments. */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { lumenMethodCalculation } from '@/lib/lighting/lumen-method';
import { NO_AREA_DETAILS } from '@/lib/surveys/schema/details';
import { lightOf } from '@/lib/surveys/schema/light';

const AREA = { lengthMetres: 10, widthMetres: 6, heightMetres: 3 };
const PART = { lumens: 4000, watts: 35 };
const details = (light: object, more: object = {}) => ({
  ...NO_AREA_DETAILS,
  ...more,
  light: { ...NO_AREA_DETAILS.light, ...light },
});

describe('lightOf', () => {
  it('asks the lumen method for as many as the target needs', () => {
    const light = lightOf(AREA, details({ targetLux: 500, utilisationFactor: 0.6 }), PART);
    if ('missing' in light) throw new Error(light.missing.join());
    const { result } = runCalculation(lumenMethodCalculation, light.input);
    // 500 lx * 60 m2 / (4,000 lm * 0.6 * 0.8) = 15.6: sixteen give 16 * 4,000 * 0.6 * 0.8 / 60 = 512 lx.
    expect(result.quantityExact).toBeCloseTo(15.625, 9);
    expect(result.quantity).toBe(16);
    expect(result.lux).toBeCloseTo(512, 9);
    expect(result.wattsPerSquareMetre).toBeCloseTo((16 * 35) / 60, 9);
    expect(light.utilisationSource).toBe('typed here');
  });

  it('takes a generic factor by the room and its surfaces where none is typed', () => {
    const of = (more: object) => {
      const light = lightOf(AREA, details({ quantity: 12, targetLux: 300 }, more), PART);
      if ('missing' in light) throw new Error(light.missing.join());
      return { ...light, result: runCalculation(lumenMethodCalculation, light.input).result };
    };
    // 3 m less a plane of 0.76 m: room index 60 / (2.24 * 16) = 1.674; bright surfaces 0.60 at 1.5 and 0.66 at 2.
    const bright = of({ ceilingReflectance: 0.7, wallReflectance: 0.5 });
    expect(bright.result.roomIndex).toBeCloseTo(60 / (2.24 * 16), 9);
    expect(bright.result.utilisationFactor).toBeGreaterThan(0.6);
    expect(bright.result.utilisationFactor).toBeLessThan(0.66);
    expect(of({}).result.utilisationFactor).toBe(bright.result.utilisationFactor);
    const dark = of({ ceilingReflectance: 0.3, wallReflectance: 0.1 });
    expect(dark.result.utilisationFactor).toBeLessThan(bright.result.utilisationFactor ?? 0);
    expect(dark.utilisationSource).toContain('ceiling 30 %, walls 10 %');
  });

  it('says in words what is still missing', () => {
    const nothing = lightOf(
      { lengthMetres: null, widthMetres: 4, heightMetres: null },
      NO_AREA_DETAILS,
      null,
    );
    expect(nothing).toEqual({
      missing: [
        'the area’s length and width',
        'its height, or that of the luminaires',
        'a luminaire with its lumens',
        'a target, or how many',
      ],
    });
    const low = lightOf({ ...AREA, heightMetres: 0.7 }, details({ targetLux: 100 }), PART);
    expect(low).toEqual({ missing: ['luminaires above the work plane'] });
  });
});
