/** Colour bands read, written, and refused. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { colourBands, resistorCodeCalculation } from '@/lib/sizing/resistor-code';
import { E_SERIES, E_SERIES_NAMES } from '@/lib/sizing/tables/e-series';

const ask = (input: object) => runCalculation(resistorCodeCalculation, input);
const codes = (input: object) => ask(input).findings.map(({ code }) => code);

describe('resistor-code', () => {
  it('reads what it writes, over every series, decade and tolerance that has a colour', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...E_SERIES_NAMES),
        fc.nat(200),
        fc.integer({ min: -1, max: 7 }),
        fc.constantFrom(10, 5, 2, 1, 0.5, 0.25, 0.1),
        (series, pick, decade, tolerancePct) => {
          const listed = E_SERIES[series];
          const mantissa = listed[pick % listed.length] ?? 10;
          const ohms = Number(`${mantissa}e${decade}`);
          const bands = colourBands(ohms, tolerancePct);
          expect(bands).not.toBeNull();
          const { result, findings } = ask({ bands });
          expect(result.ohms / ohms).toBeCloseTo(1, 12);
          expect(result.tolerancePct).toBe(tolerancePct);
          expect(result.series).toContain(series);
          expect(findings).toEqual([]);
          expect(result.ohmsMax - result.ohmsMin).toBeCloseTo((ohms * tolerancePct) / 50, 6);
        },
      ),
    );
  });

  it('says that a value is none that is made, and what the other end would say', () => {
    // 3.1 kilohm is none; from the other end the same bands are brown red brown orange: 120 ohm.
    const answer = ask({ bands: ['orange', 'brown', 'red', 'brown'] });
    expect(answer.result.ohms).toBe(3100);
    expect(answer.findings).toMatchObject([{ code: 'not-preferred-value', values: { turnedOhms: 120 } }]);
    expect(codes({ bands: ['red', 'violet', 'brown', 'red'] })).toEqual([]);
    expect(codes({ ohms: 298, tolerancePct: 1 })).toEqual(['not-preferred-value']);
    expect(codes({ ohms: 300, tolerancePct: 5 })).toEqual([]);
  });

  it.each([
    [{ bands: ['gold', 'black', 'red'] }, 'bands.0'],
    [{ bands: ['black', 'brown', 'red'] }, 'bands.0'],
    [{ bands: ['brown', 'black', 'red', 'black'] }, 'bands.3'],
    [{ bands: ['brown', 'black'] }, 'bands'],
    [{ bands: ['brown', 'black', 'mauve'] }, 'bands.2'],
    [{ bands: ['brown', 'black', 'red'], ohms: 5 }, 'ohms'],
    [{ bands: ['brown', 'black', 'red'], tolerancePct: 5 }, 'tolerancePct'],
    [{ ohms: 1234, tolerancePct: 1 }, 'ohms'],
    [{ ohms: 1e13, tolerancePct: 1 }, 'ohms'],
    [{ ohms: 123, tolerancePct: 20 }, 'ohms'],
    [{ ohms: 100, tolerancePct: 3 }, 'tolerancePct'],
    [{ ohms: 100 }, 'tolerancePct'],
    [{}, 'bands'],
  ])('%j is refused at %s', (input, path) => {
    expect(() => ask(input)).toThrow(
      expect.objectContaining({ issues: [expect.objectContaining({ path })] }),
    );
  });
});
