/** How the figures of a photometric file came about. */
import type { WorkingStep } from '@/lib/engine/contract';
import type { Photometry } from './photometric-file';

const ZONAL = 'zonal constants, IES Lighting Handbook (from memory); solid angles by geometry';

function scaleStep({ read: { header } }: Photometry): WorkingStep {
  const ldt = header.format === 'eulumdat';
  const factor = (name: string, value: number) => ({ name, value, unit: '' });
  return {
    key: 'photometry-scale',
    name: 'Factor on the listed intensities',
    formula: ldt
      ? 'k = conversion factor * lamp flux / 1000'
      : 'k = multiplier * ballast factor * ballast-lamp factor',
    inputs: ldt
      ? [factor('k', header.multiplier)]
      : [
          factor('multiplier', header.multiplier),
          factor('ballast factor', header.ballastFactor),
          factor('ballast-lamp factor', header.ballastLampFactor),
        ],
    value: header.multiplier * header.ballastFactor * header.ballastLampFactor,
    unit: '',
    basis: ldt ? 'EULUMDAT (1990), read in copies' : 'ANSI/IESNA LM-63-02 (fields from memory)',
  };
}

export function workingOf(photometry: Photometry): WorkingStep[] {
  const { result, flux, peak, distribution } = photometry;
  return [
    scaleStep(photometry),
    {
      key: 'photometry-lumens',
      name: 'Lumens by zones',
      formula: 'sum of (I1 + I2)/2 * 2*pi * (cos t1 - cos t2), I averaged over the planes',
      inputs: [
        { name: 'zones', value: distribution.vertical.length - 1, unit: '' },
        { name: 'planes', value: distribution.horizontal.length - 1, unit: '' },
      ],
      value: result.totalLumens,
      unit: 'lm',
      basis: ZONAL,
    },
    {
      key: 'photometry-uplight',
      name: 'Share of the light above the horizontal',
      formula: 'lumens from 90 to 180 degrees / all lumens',
      inputs: [
        { name: 'up', value: flux.upLumens, unit: 'lm' },
        { name: 'all', value: flux.totalLumens, unit: 'lm' },
      ],
      value: result.uplightFraction,
      unit: '',
      basis: ZONAL,
    },
    {
      key: 'photometry-beam',
      name: 'Beam angle',
      formula: 'angle between the directions with Imax / 2',
      inputs: [
        { name: 'Imax', value: peak.candela, unit: 'cd' },
        { name: 'C', value: peak.horizontal, unit: 'deg' },
        { name: 'gamma', value: peak.vertical, unit: 'deg' },
      ],
      value: result.beamAngleDegrees,
      unit: 'deg',
      basis: 'IEC TR 61341 (from memory), of the highest intensity',
    },
    {
      key: 'photometry-efficacy',
      name: 'Efficacy',
      formula: 'lumens / watts',
      inputs: [
        { name: 'lumens', value: result.totalLumens, unit: 'lm' },
        { name: 'watts', value: result.wattsInput, unit: 'W' },
      ],
      value: result.efficacy,
      unit: 'lm/W',
      basis: 'definition',
    },
  ];
}
