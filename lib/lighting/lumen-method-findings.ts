/** What a reader of the lumen method must know. */
import { atLeast, atMost, ceilWithin, type Finding } from '@/lib/engine/contract';
import { caution, note, softStop } from '@/lib/engine/finding';
import type { Room } from './lumen-method';
import { LARGEST_CAVITY_RATIO, ZONAL_CAVITY_SOURCE } from './tables/zonal-cavity';

const PRACTICE = 'common practice';
const LOSSES =
  'The Lighting Handbook, 2013 (0.5 in very dirty rooms) and a highway illumination manual (LED 0.7 to 0.9), read in copies';

/** More than this over the target is energy that nobody asked for. */
const TOO_MUCH = 1.5;
const LEAST_LOSS_FACTOR = 0.5;
const MOST_LOSS_FACTOR = 0.9;
/** Lumens typed and lumens of the file: another colour or wattage of one family differs by more. */
const SAME_LUMENS = 0.05;
/** More than all lumens reach the plane only where bright surfaces send them there again. */
const ALL_LUMENS = 1;

function ofTheLight({ input, wantedLux, result }: Room): Finding[] {
  const { lux, utilisationFactor } = result;
  if (utilisationFactor === null || lux === null || lux === 0)
    return [
      softStop(
        'lumen-no-light',
        'No light reaches the working plane: nothing can be figured.',
        { utilisationFactor },
        PRACTICE,
      ),
    ];
  if (wantedLux === null) return [];
  if (!atLeast(lux, wantedLux))
    return [
      caution(
        'lumen-under-target',
        'This number of luminaires does not reach the light that is wanted.',
        { lux, wantedLux, quantity: result.quantity, neededQuantity: ceilWithin(result.quantityExact ?? 0) },
        PRACTICE,
      ),
    ];
  if (!atMost(lux, TOO_MUCH * wantedLux))
    return [
      caution(
        'lumen-over-target',
        'Far more light than is wanted.',
        { lux, wantedLux, quantity: result.quantity, lumens: input.lumensPerLuminaire },
        PRACTICE,
      ),
    ];
  return [];
}

function ofTheLayout({ input, result }: Room): Finding[] {
  const { maxSpacingMetres: most, quantity } = result;
  const { layout, lengthMetres, widthMetres } = input;
  const found: Finding[] = [];
  if (layout && quantity !== null && layout.rows * layout.columns !== quantity)
    found.push(
      caution(
        'lumen-layout-other-quantity',
        'The layout holds another number of luminaires than is figured.',
        { inLayout: layout.rows * layout.columns, quantity },
        PRACTICE,
      ),
    );
  if (most === null) return found;
  if (layout) {
    const spacingMetres = Math.max(lengthMetres / layout.columns, widthMetres / layout.rows);
    if (!atMost(spacingMetres, most))
      found.push(
        caution(
          'lumen-spacing-too-wide',
          'The luminaires of the layout hang further apart than their beam covers.',
          { spacingMetres, mostMetres: most },
          'datasheet',
        ),
      );
    return found;
  }
  const needed = ceilWithin(lengthMetres / most) * ceilWithin(widthMetres / most);
  if (quantity !== null && needed > quantity)
    found.push(
      caution(
        'lumen-too-few-to-space',
        'So few luminaires can not be spread evenly enough: it takes more, weaker ones.',
        { quantity, neededQuantity: needed, mostMetres: most },
        'datasheet',
      ),
    );
  return found;
}

function ofTheFactors({ input, sourceLumens, utilisation, result }: Room): Finding[] {
  const found: Finding[] = [];
  const { lightLossFactor, lumensPerLuminaire } = input;
  if (!atLeast(lightLossFactor, LEAST_LOSS_FACTOR) || !atMost(lightLossFactor, MOST_LOSS_FACTOR))
    found.push(
      caution(
        'lumen-loss-factor-unusual',
        'The light loss factor lies outside what is usual.',
        { lightLossFactor, least: LEAST_LOSS_FACTOR, most: MOST_LOSS_FACTOR },
        LOSSES,
      ),
    );
  if (!utilisation && result.utilisationFactor !== null && !atMost(result.utilisationFactor, ALL_LUMENS))
    found.push(
      caution(
        'lumen-utilisation-over-one',
        'More than the luminaires’ light is taken to reach the plane.',
        { utilisationFactor: result.utilisationFactor },
        PRACTICE,
      ),
    );
  if (utilisation && !atMost(result.roomCavityRatio, LARGEST_CAVITY_RATIO))
    found.push(
      caution(
        'lumen-cavity-beyond-tables',
        'The room is narrower and higher than the method’s tables reach.',
        { roomCavityRatio: result.roomCavityRatio, most: LARGEST_CAVITY_RATIO },
        ZONAL_CAVITY_SOURCE,
      ),
    );
  if (
    sourceLumens !== null &&
    sourceLumens > 0 &&
    !atMost(Math.abs(sourceLumens - lumensPerLuminaire), SAME_LUMENS * lumensPerLuminaire)
  )
    found.push(
      note(
        'lumen-file-other-lumens',
        'The photometry gives other lumens than the luminaire; only its shape is used.',
        { fileLumens: sourceLumens, lumensPerLuminaire },
        'datasheet',
      ),
    );
  return found;
}

function ofThePower({ input: { allowance }, result: { wattsPerSquareMetre } }: Room): Finding[] {
  if (!allowance || wattsPerSquareMetre === null) return [];
  if (atMost(wattsPerSquareMetre, allowance.wattsPerSquareMetre)) return [];
  return [
    caution(
      'lumen-power-over-allowance',
      'The luminaires take more power than the energy code allows for this space.',
      { wattsPerSquareMetre, allowed: allowance.wattsPerSquareMetre },
      allowance.basis,
    ),
  ];
}

export const findingsOf = (room: Room): Finding[] => [
  ...ofTheLight(room),
  ...ofTheLayout(room),
  ...ofTheFactors(room),
  ...ofThePower(room),
  ...room.sourceFindings,
];
