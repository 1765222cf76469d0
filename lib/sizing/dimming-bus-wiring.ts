/** How the conductors of a control pair are told apart, and kept apart from the mains. */
import type { Finding } from '@/lib/engine/contract';
import { caution, hardStop, note } from '@/lib/engine/finding';
import type { DimmingBusInput } from './dimming-bus-input';
import { COLOURS_BASIS, DALI_INSULATION_BASIS, SEPARATION_BASIS } from './tables/dimming';

function separation({ wiring }: DimmingBusInput): Finding[] {
  switch (wiring) {
    case 'class-2-separate':
      return [];
    case 'class-2-with-power':
      return [
        hardStop(
          'control-with-power',
          'A Class 2 control pair must not share a raceway, cable or box with power conductors: keep it apart, or reclassify it and wire it as Class 1 throughout.',
          {},
          SEPARATION_BASIS,
        ),
      ];
    case 'class-1':
      return [
        note(
          'control-as-class-1',
          'Reclassified as Class 1: wiring methods, insulation and boxes of Class 1 along the whole pair, and the Class 2 marking taken off the equipment.',
          {},
          SEPARATION_BASIS,
        ),
      ];
    case undefined:
      return [
        caution(
          'control-separation',
          'Keep a Class 2 control pair apart from power conductors, or reclassify it and wire it as Class 1 throughout.',
          {},
          SEPARATION_BASIS,
        ),
      ];
  }
}

/** DALI is told of on both bases; a 1-10 V input of IEC gear is often no better insulated. */
function insulation({ bus, basis }: DimmingBusInput): Finding[] {
  if (bus !== 'dali' && basis === 'us') return [];
  return [
    caution(
      'bus-not-selv',
      'Unless the sheet of every device says otherwise, the pair has basic insulation from the mains only: FELV, not SELV. Insulate and enclose it as mains wiring.',
      { bus },
      bus === 'dali' ? DALI_INSULATION_BASIS : 'datasheet',
    ),
  ];
}

export function wiringFindings(input: DimmingBusInput): Finding[] {
  const us = input.basis === 'us';
  const colours = us && input.bus !== 'dali';
  return [
    ...(colours
      ? [
          caution(
            'control-pair-colours',
            'The negative of a 0-10 V pair is gray in old stock and pink in new, and gray can be a 277 V neutral: test, do not guess.',
            {},
            COLOURS_BASIS,
          ),
        ]
      : []),
    ...(us ? separation(input) : []),
    ...insulation(input),
  ];
}
