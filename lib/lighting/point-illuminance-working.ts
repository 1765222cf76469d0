/** How illuminance at points came about. */
import type { WorkingStep } from '@/lib/engine/contract';
import type { Points } from './point-illuminance';

const EN_12464 = 'EN 12464-1:2011, read in copies';

export function workingOf({ input, grid, result }: Points): WorkingStep[] {
  const metres = (name: string, value: number) => ({ name, value, unit: 'm' });
  return [
    {
      key: 'point-grid-step',
      name: 'Largest step of the grid',
      formula: input.gridMetres === undefined ? 'p = 0.2 * 5^log10(d), 10 m at most' : 'p as given',
      inputs: [metres('area along x', grid.x.metres), metres('area along y', grid.y.metres)],
      value: grid.mostStepMetres,
      unit: 'm',
      basis: EN_12464,
    },
    {
      key: 'point-grid-points',
      name: 'Points',
      formula: 'columns * rows',
      inputs: [
        { name: 'columns', value: grid.columns, unit: '' },
        { name: 'rows', value: grid.rows, unit: '' },
      ],
      value: result.points,
      unit: '',
      basis: EN_12464,
    },
    {
      key: 'point-brightest',
      name: 'Illuminance at the brightest point',
      formula: 'E = sum of I(C, gamma) * cos^3(gamma) / h^2 * light loss factor',
      inputs: [
        { name: 'luminaires', value: result.luminaires.length, unit: '' },
        metres('h', input.mountingMetres),
        { name: 'light loss factor', value: input.lightLossFactor, unit: '' },
      ],
      value: result.maximum,
      unit: 'lx',
      basis: 'inverse-square and cosine law',
    },
    {
      key: 'point-average',
      name: 'Average illuminance',
      formula: 'sum of E / points',
      inputs: [{ name: 'points', value: result.points, unit: '' }],
      value: result.average,
      unit: 'lx',
      basis: EN_12464,
    },
    {
      key: 'point-uniformity',
      name: 'Uniformity',
      formula: 'Emin / Eaverage',
      inputs: [
        { name: 'Emin', value: result.minimum, unit: 'lx' },
        { name: 'Eaverage', value: result.average, unit: 'lx' },
      ],
      value: result.uniformity,
      unit: '',
      basis: EN_12464,
    },
  ];
}
