/** 17. Illuminance at points of a plane under luminaires: what reaches it directly. */
import * as z from 'zod/mini';
import { defineCalculation, EngineError, type Limits, type Outcome, refuse } from '@/lib/engine/contract';
import { fraction, positive } from '@/lib/sizing/inputs';
import { findingsOf } from './point-illuminance-findings';
import { type Grid, gridOf, middles, WALL_BAND_METRES } from './point-illuminance-grid';
import { type LightSource, lightSource, photometry } from './point-illuminance-source';
import { workingOf } from './point-illuminance-working';

const DEGREES = 180 / Math.PI;
/** Pairs of a point and a luminaire for each cut that the caller may ask for. */
const PAIRS_PER_CUT = 200;

const room = z
  .number()
  .check(z.positive('must be greater than zero'), z.maximum(2000, 'must be at most 2000'));
const height = z
  .number()
  .check(z.minimum(0.05, 'must be at least 0.05'), z.maximum(200, 'must be at most 200'));
const turn = z
  .number()
  .check(z.minimum(-360, 'must be at least -360'), z.maximum(360, 'must be at most 360'));
const inLine = z
  .number()
  .check(
    z.int('must be a whole number'),
    z.minimum(1, 'must be at least 1'),
    z.maximum(1000, 'must be at most 1000'),
  );

const schema = z.strictObject({
  /** The room: x along its length, y along its width, from one corner. */
  lengthMetres: room,
  widthMetres: room,
  /** Over the plane. */
  mountingMetres: height,
  photometry,
  /** Where the luminaires hang. This, or `layout`. */
  luminaires: z.optional(
    z
      .array(
        z.strictObject({
          xMetres: z.number(),
          yMetres: z.number(),
          /** Over the plane, where it differs. */
          mountingMetres: z.optional(height),
          /** From x towards y, of the luminaire's plane C0; along x unless given. */
          rotationDegrees: z.optional(turn),
        }),
      )
      .check(z.minLength(1, 'needs at least one luminaire')),
  ),
  /** Evenly spread, half a spacing from the walls: columns along the length, rows along the width. */
  layout: z.optional(z.strictObject({ rows: inLine, columns: inLine, rotationDegrees: z.optional(turn) })),
  lightLossFactor: fraction,
  /** Largest step of the grid, in place of EN 12464-1's. */
  gridMetres: z.optional(positive),
  /** Along the walls, left out; 0.5 m unless given. */
  wallBandMetres: z.optional(
    z.number().check(z.nonnegative('must not be negative'), z.maximum(10, 'must be at most 10')),
  ),
  /** What is wanted: figures under it are findings. */
  targetLux: z.optional(positive),
  minimumLux: z.optional(positive),
  minimumUniformity: z.optional(fraction),
});

export type PointIlluminanceInput = z.infer<typeof schema>;

export interface Hung {
  xMetres: number;
  yMetres: number;
  mountingMetres: number;
  rotationDegrees: number;
}

export interface PointIlluminance {
  /** Maintained, direct: one row per y, one figure per x. */
  lux: number[][];
  /** Metres from the corner. */
  xs: number[];
  ys: number[];
  average: number;
  minimum: number;
  maximum: number;
  /** Minimum over average; null without light. */
  uniformity: number | null;
  points: number;
  /** Steps of the grid. */
  stepMetres: { x: number; y: number };
  /** Of all luminaires when new. */
  installedLumens: number;
  /** Share of the lumens, after losses, that reaches the calculated area directly; null without light. */
  directUtilisation: number | null;
  luminaires: Hung[];
}

/** A calculation with what its findings and working read. */
export interface Points {
  input: PointIlluminanceInput;
  grid: Grid;
  source: LightSource;
  result: PointIlluminance;
}

function hangAll(input: PointIlluminanceInput): Hung[] {
  const { luminaires, layout, lengthMetres, widthMetres, mountingMetres } = input;
  if (luminaires !== undefined && layout !== undefined)
    refuse('layout', 'must not stand beside luminaires: give one of the two');
  if (luminaires === undefined && layout === undefined) refuse('luminaires', 'is missing; or give a layout');
  luminaires?.forEach(({ xMetres, yMetres }, k) => {
    if (xMetres < 0 || xMetres > lengthMetres)
      refuse(`luminaires.${k}.xMetres`, `must lie in the room, from 0 to ${lengthMetres}`);
    if (yMetres < 0 || yMetres > widthMetres)
      refuse(`luminaires.${k}.yMetres`, `must lie in the room, from 0 to ${widthMetres}`);
  });
  if (luminaires) return luminaires.map((one) => ({ mountingMetres, rotationDegrees: 0, ...defined(one) }));
  const { rows = 1, columns = 1, rotationDegrees = 0 } = layout ?? {};
  const xs = middles({ fromMetres: 0, metres: lengthMetres, bandDropped: false }, columns);
  const ys = middles({ fromMetres: 0, metres: widthMetres, bandDropped: false }, rows);
  return ys.flatMap((yMetres) =>
    xs.map((xMetres) => ({ xMetres, yMetres, mountingMetres, rotationDegrees })),
  );
}

/** Optional fields that are given as undefined count as not given. */
function defined({
  xMetres,
  yMetres,
  mountingMetres,
  rotationDegrees,
}: NonNullable<PointIlluminanceInput['luminaires']>[number]) {
  return {
    xMetres,
    yMetres,
    ...(mountingMetres === undefined ? {} : { mountingMetres }),
    ...(rotationDegrees === undefined ? {} : { rotationDegrees }),
  };
}

function bound(name: string, value: number, most: number, what: string): void {
  if (value <= most) return;
  const message = `makes ${Math.round(value)} ${what}; at most ${most} are calculated here`;
  throw new EngineError('too-large', `${name}: ${message}`, [{ path: name, message }]);
}

/** E = I(C, gamma) * cos^3(gamma) / h^2, from one luminaire at one point of the plane, in lux. */
function direct(source: LightSource, at: Hung, x: number, y: number): number {
  const [dx, dy, h] = [x - at.xMetres, y - at.yMetres, at.mountingMetres];
  const across = Math.sqrt(dx * dx + dy * dy);
  const distance = Math.sqrt(dx * dx + dy * dy + h * h);
  const gamma = Math.atan2(across, h) * DEGREES;
  const c = across === 0 ? 0 : Math.atan2(dy, dx) * DEGREES - at.rotationDegrees;
  return (source.intensity(c, gamma) * h) / (distance * distance * distance);
}

function figuresOf(lux: number[][]) {
  const points = lux.reduce((sum, row) => sum + row.length, 0);
  const fold = (of: (a: number, b: number) => number, from: number) =>
    lux.reduce((all, row) => row.reduce((a, b) => of(a, b), all), from);
  const average = fold((a, b) => a + b, 0) / points;
  const minimum = fold(Math.min, Infinity);
  return {
    average,
    minimum,
    maximum: fold(Math.max, 0),
    uniformity: average > 0 ? minimum / average : null,
    points,
  };
}

/**
 * Maintained illuminance on a horizontal plane from luminaires that point straight down, without what walls, ceiling
 * and floor send back: E = sum of I(C, gamma) * cos^3(gamma) / h^2 * light loss factor. Each luminaire counts as a
 * point; intensities lie on straight lines between the file's angles.
 * @returns lux in rows along y, points at the middles of the cells; uniformity minimum/average
 * @throws {EngineError} `invalid-input` on `photometry…` (with the line for a file), `luminaires…`, `layout`;
 * `too-large` on `gridMetres` or `luminaires`
 * Source: inverse-square and cosine law; grid of EN 12464-1:2011 (read in copies); interpolation as CIE 140 (from
 * memory).
 */
export function pointIlluminance(input: PointIlluminanceInput, limits: Limits): Points {
  const source = lightSource(input.photometry);
  const band = input.wallBandMetres ?? WALL_BAND_METRES;
  const grid = gridOf(input.lengthMetres, input.widthMetres, band, input.gridMetres);
  bound('gridMetres', grid.columns * grid.rows, limits.maxDraws, 'points');
  const quantity = input.luminaires?.length ?? (input.layout?.rows ?? 1) * (input.layout?.columns ?? 1);
  const where = input.layout ? 'layout' : 'luminaires';
  bound(where, quantity, limits.maxCuts, 'luminaires');
  bound(
    where,
    grid.columns * grid.rows * quantity,
    limits.maxCuts * PAIRS_PER_CUT,
    'pairs of point and luminaire',
  );
  const luminaires = hangAll(input);
  const [xs, ys] = [middles(grid.x, grid.columns), middles(grid.y, grid.rows)];
  const lux = ys.map((y) =>
    xs.map((x) => luminaires.reduce((sum, at) => sum + direct(source, at, x, y), 0) * input.lightLossFactor),
  );
  const figures = figuresOf(lux);
  const installedLumens = source.lumens * luminaires.length;
  const useful = installedLumens * input.lightLossFactor;
  const result: PointIlluminance = {
    lux,
    xs,
    ys,
    ...figures,
    stepMetres: { x: grid.x.metres / grid.columns, y: grid.y.metres / grid.rows },
    installedLumens,
    directUtilisation: useful > 0 ? (figures.average * grid.x.metres * grid.y.metres) / useful : null,
    luminaires,
  };
  return { input, grid, source, result };
}

export const pointIlluminanceCalculation = defineCalculation({
  name: 'point-illuminance',
  summary: 'Direct illuminance over a grid of points in a room, from a photometric file or a cosine source',
  bench: false,
  schema,
  calculate: (input, limits): Outcome<PointIlluminance> => {
    const points = pointIlluminance(input, limits);
    return { result: points.result, findings: findingsOf(points), working: workingOf(points) };
  },
});
