/** Share of the luminaires' lumens that reaches the working plane: the zonal-cavity method. */
import { refuse } from '@/lib/engine/contract';
import type { LightSource } from './point-illuminance-source';
import { FLAT, formFactor, ZONAL_MULTIPLIER, ZONE_DEGREES } from './tables/zonal-cavity';

const RADIANS = Math.PI / 180;
/** Zones are added up in steps of half a degree down and five degrees round. */
const DOWN_DEGREES = 0.5;
const ROUND_DEGREES = 5;

export interface Reflectances {
  ceiling: number;
  walls: number;
  floor: number;
}

export interface Utilisation {
  factor: number;
  /** Share of the downward light that reaches the plane before any reflection. */
  directRatio: number;
  downShare: number;
  upShare: number;
  /** Of ceiling cavity and floor cavity as seen from the room between them. */
  effective: Reflectances;
}

/** Lumens in each zone of ten degrees, from straight down to straight up. */
export function zoneLumens({ intensity }: Pick<LightSource, 'intensity'>): number[] {
  const perZone = ZONE_DEGREES / DOWN_DEGREES;
  const planes = 360 / ROUND_DEGREES;
  return Array.from({ length: 180 / ZONE_DEGREES }, (_, zone) => {
    let lumens = 0;
    for (let k = 0; k < perZone; k++) {
      const low = (zone * ZONE_DEGREES + k * DOWN_DEGREES) * RADIANS;
      const ring = 2 * Math.PI * (Math.cos(low) - Math.cos(low + DOWN_DEGREES * RADIANS));
      let candela = 0;
      for (let plane = 0; plane < planes; plane++)
        candela += intensity(plane * ROUND_DEGREES, low / RADIANS + DOWN_DEGREES / 2);
      lumens += (candela / planes) * ring;
    }
    return lumens;
  });
}

/**
 * What a cavity sends back through its opening, of the light that enters it: its base and its walls exchange light until
 * it has left or is gone.
 * @param cavityRatio 5 * height * (length + width) / (length * width)
 */
export function effectiveReflectance(base: number, walls: number, cavityRatio: number): number {
  if (cavityRatio < FLAT) return base;
  const f = formFactor(cavityRatio);
  /** From the walls to the base, and as much to the opening: their area is 0.4 * cavity ratio times the base's. */
  const out = (1 - f) / (0.4 * cavityRatio);
  const among = 1 - walls * (1 - 2 * out);
  // onWalls = (1 - f) + base * onBase * (1 - f) + walls * onWalls * (1 - 2 out); onBase = f + walls * onWalls * out
  const onWalls = ((1 - f) * (1 + base * f)) / (among - base * walls * out * (1 - f));
  const onBase = f + walls * onWalls * out;
  return base * onBase * f + walls * onWalls * out;
}

/**
 * Coefficient of utilization by the closed form of the zonal-cavity method.
 * @param ratio the room cavity ratio
 * @param direct share of the downward light that reaches the plane directly
 */
export function utilisationOf(
  ratio: number,
  { ceiling, walls, floor }: Reflectances,
  direct: number,
  down: number,
  up: number,
): number {
  if (ratio < FLAT) return (down + ceiling * up) / (1 - ceiling * floor);
  const f = formFactor(ratio);
  const c1 = ((1 - walls) * (1 - f * f) * ratio) / (2.5 * walls * (1 - f * f) + ratio * f * (1 - walls));
  const c2 = ((1 - ceiling) * (1 + f)) / (1 + ceiling * f);
  const c3 = ((1 - floor) * (1 + f)) / (1 + floor * f);
  const c0 = c1 + c2 + c3;
  const byWalls = (2.5 * walls * c1 * c3 * (1 - direct) * down) / (ratio * (1 - walls) * (1 - floor) * c0);
  const byCeiling = (ceiling * c2 * c3 * up) / ((1 - ceiling) * (1 - floor) * c0);
  const byPlane = ((1 - (floor * c3 * (c1 + c2)) / ((1 - floor) * c0)) * direct * down) / (1 - floor);
  return byWalls + byCeiling + byPlane;
}

/**
 * Utilisation factor of a distribution in a room, on the luminaire's own lumens; null where it gives no light.
 * Source: IES LM-57 and ANSI/IES LS-6-20, read in public programs.
 */
export function utilisation(
  source: LightSource,
  reflectances: Reflectances,
  ratios: { room: number; ceiling: number; floor: number },
): Utilisation | null {
  const zones = zoneLumens(source);
  const total = zones.reduce((sum, lumens) => sum + lumens, 0);
  if (!(total > 0)) return null;
  const downZones = zones.slice(0, ZONAL_MULTIPLIER.length);
  const down = downZones.reduce((sum, lumens) => sum + lumens, 0);
  const reached = downZones.reduce((sum, lumens, zone) => {
    const { a, b } = ZONAL_MULTIPLIER[zone] ?? { a: 0, b: 0 };
    return sum + lumens * Math.exp(-a * ratios.room ** b);
  }, 0);
  const directRatio = down > 0 ? reached / down : 0;
  const effective = {
    ceiling: effectiveReflectance(reflectances.ceiling, reflectances.walls, ratios.ceiling),
    walls: reflectances.walls,
    floor: effectiveReflectance(reflectances.floor, reflectances.walls, ratios.floor),
  };
  const [downShare, upShare] = [down / total, 1 - down / total];
  const factor = utilisationOf(ratios.room, effective, directRatio, downShare, upShare);
  return { factor, directRatio, downShare, upShare, effective };
}

/**
 * A maker's table of utilisation factors by room index, read on a line between its entries.
 * @throws {EngineError} `invalid-input` on `utilisationTable…`: lengths differ, not ascending, room index beyond it
 */
export function fromTable(
  { roomIndex, factor }: { roomIndex: readonly number[]; factor: readonly number[] },
  at: number,
): number {
  if (roomIndex.length !== factor.length)
    refuse('utilisationTable.factor', `needs a factor for each of ${roomIndex.length} room indices`);
  const back = roomIndex.findIndex((one, k) => k > 0 && one <= (roomIndex[k - 1] ?? 0));
  if (back > 0) refuse(`utilisationTable.roomIndex.${back}`, 'must be greater than the one before');
  const [first = NaN, last = NaN] = [roomIndex[0], roomIndex.at(-1)];
  if (at < first * (1 - 1e-9))
    refuse('utilisationTable.roomIndex', `begins at ${first}: the room has ${at.toPrecision(3)}`);
  // Beyond its end a table grows no more: its last factor is the cautious one.
  if (at >= last) return factor.at(-1) ?? NaN;
  const k = Math.max(
    1,
    roomIndex.findIndex((one) => one >= at),
  );
  const [low = NaN, high = NaN] = [roomIndex[k - 1], roomIndex[k]];
  const [from = NaN, to = NaN] = [factor[k - 1], factor[k]];
  return from + ((to - from) * Math.max(0, at - low)) / (high - low);
}
