/** IEC basis: mm2 sizes by the tables of IEC 60364-5-52, Ib <= In <= Iz, and the fault loop where Ze is given. */
import { atLeast, atMost, type Finding, refuse, type WorkingStep } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import { conductorResistance } from './conductor-resistance';
import { dropOf, type Ladder, type Rung } from './conductor-ladder';
import type { SizeRequest } from './conductor-size-input';
import { ampacityStep, overcurrentStep } from './conductor-size-steps';
import { nextStandardRating, SURE_TRIP } from './tables/breakers';
import { IEC_60228 } from './tables/conductors';
import {
  CONDUCTOR_CELSIUS,
  IEC_B_52,
  IEC_FAULT_BASIS,
  IEC_LEAST_SIZE,
  IEC_OVERLOAD_BASIS,
  IEC_SIZES,
  iecAmbientFactor,
  iecAmpacityBasis,
  iecGroupFactor,
  type Insulation,
  MOST_GROUPED,
  ONE_SQUARE_AMPS,
  type ReferenceMethod,
} from './tables/iec-ampacity';

/** Lowest share of the nominal volts that is counted on in a fault, IEC 60909-0. */
const VOLTAGE_FACTOR = 0.95;
/** Ordinary terminals. */
const TERMINAL_CELSIUS = 70;
const SIZES = ['1 mm2', ...IEC_SIZES] as const;

interface IecCase {
  request: SizeRequest;
  insulation: Insulation;
  method: ReferenceMethod;
  loaded: 2 | 3;
  ambientFactor: number | null;
  groupFactor: number;
  celsius: number;
  overcurrentAmps: number | null;
  zsMaxOhms: number | null;
}

function methodOf({ installMethod }: SizeRequest): ReferenceMethod {
  if (installMethod === undefined) return 'B2';
  if (installMethod === 'raceway' || installMethod === 'NM')
    return refuse('installMethod', 'must be A1, A2, B1, B2 or C on the IEC basis');
  return installMethod;
}

function faultLimit(request: SizeRequest, overcurrentAmps: number | null): number | null {
  const { zeOhms, curve, system, volts } = request;
  if (zeOhms === undefined) return null;
  if (system === 'dc') return refuse('zeOhms', 'is for alternating current: leave it out here');
  if (curve === undefined) return refuse('curve', 'is needed beside zeOhms: B, C or D');
  const lineToEarth = system === 'three-phase' ? volts / Math.sqrt(3) : volts;
  return overcurrentAmps === null
    ? null
    : (VOLTAGE_FACTOR * lineToEarth) / (SURE_TRIP[curve] * overcurrentAmps);
}

function iecCase(request: SizeRequest): IecCase {
  const { loadedConductors: loaded, groupedCircuits = 1, breakerAmps } = request;
  if (loaded !== 2 && loaded !== 3) return refuse('loadedConductors', 'must be 2 or 3 on the IEC basis');
  const insulation = request.insulation ?? 'PVC70';
  const overcurrentAmps = breakerAmps ?? nextStandardRating('iec', request.amps);
  return {
    request,
    insulation,
    method: methodOf(request),
    loaded,
    ambientFactor: iecAmbientFactor(insulation, request.ambientCelsius),
    groupFactor:
      iecGroupFactor(groupedCircuits) ?? refuse('groupedCircuits', `must be at most ${MOST_GROUPED}`),
    celsius: request.celsius ?? CONDUCTOR_CELSIUS[insulation],
    overcurrentAmps,
    zsMaxOhms: faultLimit(request, overcurrentAmps),
  };
}

function tableAmps({ insulation, loaded, method }: IecCase, size: string): number {
  if (size === '1 mm2') return ONE_SQUARE_AMPS[insulation][loaded][method];
  return IEC_B_52[insulation][loaded].amps[method][IEC_SIZES.findIndex((one) => one === size)] ?? 0;
}

/** As large as the line conductor to 16 mm2, then 16 mm2. IEC 60364-5-54:2011 Table 54.2, from memory. */
function protectiveSize({ request }: IecCase, size: string): string {
  if (request.protectiveSize !== undefined) return request.protectiveSize;
  return (IEC_60228[size]?.squareMillimetres ?? 0) > 16 ? '16 mm2' : size;
}

function loop(c: IecCase, size: string): { line: number; protective: number; zsOhms: number } | null {
  const { request } = c;
  if (request.zeOhms === undefined) return null;
  // At what the insulation may reach, however cool the drop is figured: a fault comes on a loaded conductor too.
  const celsius = CONDUCTOR_CELSIUS[c.insulation];
  const stranding = request.stranding ?? 'stranded';
  const line = conductorResistance(size, stranding, celsius).ohmsPerMetre;
  const protective = conductorResistance(protectiveSize(c, size), stranding, celsius).ohmsPerMetre;
  const metres = request.faultMetres ?? request.metres;
  return { line, protective, zsOhms: request.zeOhms + (line + protective) * metres };
}

function rungOf(c: IecCase, size: string): Rung {
  const ampacity = tableAmps(c, size) * (c.ambientFactor ?? 0) * c.groupFactor;
  const device = c.overcurrentAmps;
  const zsOhms = loop(c, size)?.zsOhms ?? null;
  return {
    size,
    ampacity,
    carries: device !== null && ampacity > 0 && atMost(c.request.amps, device) && atMost(device, ampacity),
    ...dropOf(c.request, size, c.celsius),
    zsOhms,
    // Without a device there is nothing that could trip: `carries` says so already.
    faultFits: zsOhms === null || c.zsMaxOhms === null || atMost(zsOhms, c.zsMaxOhms),
  };
}

function findingsOf(c: IecCase): Finding[] {
  const { request, insulation } = c;
  const findings: Finding[] = [];
  const terminals = request.terminalCelsius ?? TERMINAL_CELSIUS;
  if (!atLeast(terminals, CONDUCTOR_CELSIUS[insulation]))
    findings.push(
      caution(
        'terminals-below-insulation',
        `The conductor may reach ${CONDUCTOR_CELSIUS[insulation]} C: see that breaker and terminals take that, or size it as PVC70.`,
        { terminalCelsius: terminals, insulationCelsius: CONDUCTOR_CELSIUS[insulation] },
        'IEC 60364-5-52:2009 523.1 (from memory)',
      ),
    );
  if (request.system !== 'dc' && request.zeOhms === undefined)
    findings.push(
      note(
        'fault-loop-not-checked',
        'The fault loop is not checked: give zeOhms and the curve of the breaker.',
        { metres: request.faultMetres ?? request.metres },
        IEC_FAULT_BASIS,
      ),
    );
  return findings;
}

function faultSteps(c: IecCase, rung: Rung): WorkingStep[] {
  const ohms = loop(c, rung.size);
  const { curve, zeOhms, faultMetres, metres, system, volts } = c.request;
  if (!ohms || curve === undefined || zeOhms === undefined) return [];
  return [
    {
      key: 'fault-loop',
      name: 'Impedance of the fault loop',
      formula: 'Zs = Ze + (R1 + R2) * L',
      inputs: [
        { name: 'Ze', value: zeOhms, unit: 'ohm' },
        { name: 'R1', value: ohms.line, unit: 'ohm/m' },
        { name: 'R2', value: ohms.protective, unit: 'ohm/m' },
        { name: 'L', value: faultMetres ?? metres, unit: 'm' },
      ],
      value: ohms.zsOhms,
      unit: 'ohm',
      basis: IEC_FAULT_BASIS,
    },
    {
      key: 'fault-loop-limit',
      name: 'Highest impedance at which the breaker trips at once',
      formula: system === 'three-phase' ? '0.95 * U / sqrt(3) / (m * In)' : '0.95 * U0 / (m * In)',
      inputs: [
        { name: 'U', value: volts, unit: 'V' },
        { name: 'm', value: SURE_TRIP[curve], unit: '' },
        { name: 'In', value: c.overcurrentAmps, unit: 'A' },
      ],
      value: c.zsMaxOhms,
      unit: 'ohm',
      basis: IEC_FAULT_BASIS,
    },
  ];
}

function stepsOf(c: IecCase, rung: Rung): WorkingStep[] {
  return [
    overcurrentStep(c.request.amps, c.request.breakerAmps, c.overcurrentAmps, IEC_OVERLOAD_BASIS),
    ampacityStep(
      'Iz = table(size, method) * Ca * Cg',
      [
        { name: 'size', value: rung.size, unit: '' },
        { name: 'method', value: c.method, unit: '' },
        { name: 'table', value: tableAmps(c, rung.size), unit: 'A' },
        { name: 'Ca', value: c.ambientFactor, unit: '' },
        { name: 'Cg', value: c.groupFactor, unit: '' },
      ],
      rung.ampacity,
      iecAmpacityBasis(c.insulation, c.loaded),
    ),
    ...faultSteps(c, rung),
  ];
}

function leastSize({ minimumSize }: SizeRequest): number {
  const rule = SIZES.indexOf(IEC_LEAST_SIZE);
  if (minimumSize === undefined) return rule;
  const area = IEC_60228[minimumSize]?.squareMillimetres;
  if (area === undefined) return refuse('minimumSize', 'must be a size in mm2 on the IEC basis');
  return Math.max(
    rule,
    SIZES.findIndex((size) => (IEC_60228[size]?.squareMillimetres ?? 0) >= area),
  );
}

/** Sizes 1.5 to 35 mm2 (and 1 mm2 below) with what each carries. @throws {EngineError} `invalid-input`. */
export function iecLadder(request: SizeRequest): Ladder {
  const c = iecCase(request);
  return {
    rungs: SIZES.map((size) => rungOf(c, size)),
    least: leastSize(request),
    overcurrentAmps: c.overcurrentAmps,
    zsMaxOhms: c.zsMaxOhms,
    celsius: c.celsius,
    findings: () => findingsOf(c),
    steps: (rung) => stepsOf(c, rung),
  };
}
