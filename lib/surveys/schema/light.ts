/** An area's light from what the survey knows of it: the lumen method's input, or what it still lacks. Pure. */
import type { LumenMethodInput } from '@/lib/lighting/lumen-method';
import { GENERIC_ROOM_INDEX, GENERIC_SOURCE, GENERIC_UTILISATION } from '@/lib/lighting/tables/utilisation';
import type { Area } from '../schema';
import type { AreaDetails } from './details';

/** Desks and counters, over the floor: EN 12464-1 and common practice put the plane between 0.7 and 0.85 m. */
const WORKPLANE_METRES = 0.76;
/** Typical of a light, clean room; the survey's own reflectances stand above these. */
const TYPICAL = { ceiling: 0.7, walls: 0.5 };

export interface LightPart {
  lumens: number | null;
  watts: number | null;
}

export interface LightFigures {
  input: LumenMethodInput;
  /** Where the utilisation factor comes from, in words. */
  utilisationSource: string;
}

/** The row of the generic table whose surfaces are nearest to the area's. */
function nearestRow(ceiling: number, walls: number) {
  const away = (row: { ceiling: number; walls: number }) =>
    Math.abs(row.ceiling - ceiling) + Math.abs(row.walls - walls);
  return GENERIC_UTILISATION.reduce((best, row) => (away(row) < away(best) ? row : best));
}

function utilisationOf({ light, ceilingReflectance, wallReflectance }: AreaDetails) {
  if (light.utilisationFactor !== null)
    return { given: { utilisationFactor: light.utilisationFactor }, source: 'typed here' };
  const row = nearestRow(ceilingReflectance ?? TYPICAL.ceiling, wallReflectance ?? TYPICAL.walls);
  const table = { roomIndex: [...GENERIC_ROOM_INDEX], factor: [...row.factor] };
  const surfaces = `ceiling ${row.ceiling * 100} %, walls ${row.walls * 100} %`;
  return { given: { utilisationTable: table }, source: `generic: ${GENERIC_SOURCE}; ${surfaces}` };
}

/** @returns the engine's input, or what is missing for it, in words */
export function lightOf(
  area: Pick<Area, 'lengthMetres' | 'widthMetres' | 'heightMetres'>,
  details: AreaDetails,
  part: LightPart | null,
): LightFigures | { missing: string[] } {
  const { light } = details;
  const mounting = details.mountingMetres ?? area.heightMetres;
  const plane = details.workplaneMetres ?? WORKPLANE_METRES;
  const missing = [
    ...(area.lengthMetres === null || area.widthMetres === null ? ['the area’s length and width'] : []),
    ...(mounting === null ? ['its height, or that of the luminaires'] : []),
    ...(mounting !== null && mounting <= plane ? ['luminaires above the work plane'] : []),
    ...(part?.lumens ? [] : ['a luminaire with its lumens']),
    ...(light.targetLux === null && light.quantity === null ? ['a target, or how many'] : []),
  ];
  if (missing.length > 0 || !part?.lumens) return { missing };
  const { given, source } = utilisationOf(details);
  const input: LumenMethodInput = {
    lengthMetres: area.lengthMetres ?? 0,
    widthMetres: area.widthMetres ?? 0,
    mountingMetres: (mounting ?? 0) - plane,
    ...given,
    lumensPerLuminaire: part.lumens,
    lightLossFactor: light.lossFactor,
    ...(part.watts === null ? {} : { wattsPerLuminaire: part.watts }),
    ...(light.quantity === null
      ? { targetLux: light.targetLux ?? 0 }
      : {
          quantity: light.quantity,
          ...(light.targetLux === null ? {} : { requiredLux: light.targetLux }),
        }),
  };
  return { input, utilisationSource: source };
}
