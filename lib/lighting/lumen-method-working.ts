/** How the figures of the lumen method came about. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Room } from './lumen-method';
import { ZONAL_CAVITY_SOURCE } from './tables/zonal-cavity';

const LUMEN_METHOD = 'lumen method (CIBSE guides, IES Lighting Handbook), read in course notes';

const of = (name: string, value: number | null, unit = ''): WorkingInput => ({ name, value, unit });

function roomSteps({ input, result }: Room): WorkingStep[] {
  const room = [
    of('L', input.lengthMetres, 'm'),
    of('W', input.widthMetres, 'm'),
    of('Hm', input.mountingMetres, 'm'),
  ];
  return [
    {
      key: 'lumen-room-index',
      name: 'Room index',
      formula: 'L * W / (Hm * (L + W))',
      inputs: room,
      value: result.roomIndex,
      unit: '',
      basis: LUMEN_METHOD,
    },
    {
      key: 'lumen-room-cavity-ratio',
      name: 'Room cavity ratio',
      formula: '5 * Hm * (L + W) / (L * W)',
      inputs: room,
      value: result.roomCavityRatio,
      unit: '',
      basis: LUMEN_METHOD,
    },
  ];
}

function utilisationSteps({ input, utilisation, result }: Room): WorkingStep[] {
  if (input.utilisationTable)
    return [
      {
        key: 'lumen-utilisation-table',
        name: 'Utilisation factor from the table',
        formula: 'on a line between the entries about the room index',
        inputs: [of('room index', result.roomIndex)],
        value: result.utilisationFactor,
        unit: '',
        basis: 'datasheet',
      },
    ];
  if (!utilisation) return [];
  const { effective, downShare, upShare, directRatio } = utilisation;
  return [
    {
      key: 'lumen-direct-ratio',
      name: 'Share of the downward light that arrives directly',
      formula: 'sum over zones of lumens * exp(-a * RCR^b) / downward lumens',
      inputs: [of('RCR', result.roomCavityRatio)],
      value: directRatio,
      unit: '',
      basis: ZONAL_CAVITY_SOURCE,
    },
    {
      key: 'lumen-utilisation',
      name: 'Utilisation factor',
      formula: 'light exchanged between ceiling cavity, walls and floor cavity (C1, C2, C3, C0)',
      inputs: [
        of('direct ratio', directRatio),
        of('down', downShare),
        of('up', upShare),
        of('ceiling cavity', effective.ceiling),
        of('walls', effective.walls),
        of('floor cavity', effective.floor),
        of('RCR', result.roomCavityRatio),
      ],
      value: utilisation.factor,
      unit: '',
      basis: ZONAL_CAVITY_SOURCE,
    },
  ];
}

function lightSteps({ input, area, wantedLux, result }: Room): WorkingStep[] {
  const factors = [
    of('lumens', input.lumensPerLuminaire, 'lm'),
    of('UF', result.utilisationFactor),
    of('LLF', input.lightLossFactor),
    of('area', area, 'm2'),
  ];
  return [
    {
      key: 'lumen-quantity-exact',
      name: 'Luminaires, exact',
      formula: 'lux * area / (lumens * UF * LLF)',
      inputs: [of('lux', wantedLux, 'lx'), ...factors],
      value: result.quantityExact,
      unit: '',
      basis: LUMEN_METHOD,
    },
    {
      key: 'lumen-lux',
      name: 'Maintained illuminance',
      formula: 'n * lumens * UF * LLF / area',
      inputs: [of('n', result.quantity), ...factors],
      value: result.lux,
      unit: 'lx',
      basis: LUMEN_METHOD,
    },
    {
      key: 'lumen-power-density',
      name: 'Watts a square metre',
      formula: 'n * watts / area',
      inputs: [
        of('n', result.quantity),
        of('watts', input.wattsPerLuminaire ?? null, 'W'),
        of('area', area, 'm2'),
      ],
      value: result.wattsPerSquareMetre,
      unit: 'W/m2',
      basis: LUMEN_METHOD,
    },
    {
      key: 'lumen-max-spacing',
      name: 'Largest spacing',
      formula: 'spacing ratio * Hm',
      inputs: [of('spacing ratio', input.spacingRatioMax ?? null), of('Hm', input.mountingMetres, 'm')],
      value: result.maxSpacingMetres,
      unit: 'm',
      basis: 'datasheet',
    },
  ];
}

export const workingOf = (room: Room): WorkingStep[] => [
  ...roomSteps(room),
  ...utilisationSteps(room),
  ...lightSteps(room),
];
