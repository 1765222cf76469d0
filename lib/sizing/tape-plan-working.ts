/** How a plan's figures came about. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Case, TapePlan } from './tape-plan-result';

const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});
const PRICES = 'prices and hours as given';

function worstSection({ runs }: TapePlan): { id: string; dropPct: number } {
  let worst = { id: '', dropPct: -1 };
  for (const { id, sections } of runs ?? [])
    for (const { worstDropPct } of sections)
      if (worstDropPct > worst.dropPct) worst = { id, dropPct: worstDropPct };
  return worst;
}

function costSteps({ input }: Case, plan: TapePlan): WorkingStep[] {
  const { bill } = plan;
  if (!bill) return [];
  const drivers = bill.drivers.reduce((sum, { quantity }) => sum + quantity, 0);
  const metres = bill.conductors.reduce((sum, own) => sum + own.metres, 0);
  const { labour } = input;
  return [
    {
      key: 'plan-drivers',
      name: 'Drivers',
      formula: 'sum of quantity * cost',
      inputs: bill.drivers.map(({ sku, quantity }) => given(sku, quantity, '')),
      value: bill.driverCost,
      unit: 'currency',
      basis: PRICES,
    },
    {
      key: 'plan-conductors',
      name: 'Feeders',
      formula: 'sum of metres * cost per metre',
      inputs: bill.conductors.map(({ size, metres: own }) => given(size, own, 'm')),
      value: bill.conductorCost,
      unit: 'currency',
      basis: PRICES,
    },
    {
      key: 'plan-labour',
      name: 'Labour',
      formula: '(feeds * hours + drivers * hours + metres * hours) * rate',
      inputs: [
        given('feeds', bill.feeds, ''),
        given('hours per feed', labour.hoursPerFeed, 'h'),
        given('drivers', drivers, ''),
        given('hours per driver', labour.hoursPerDriver, 'h'),
        given('metres', metres, 'm'),
        given('hours per metre', labour.hoursPerMetre, 'h'),
        given('rate', labour.ratePerHour, 'currency/h'),
      ],
      value: bill.labourCost,
      unit: 'currency',
      basis: PRICES,
    },
    {
      key: 'plan-total',
      name: 'Total of the plan',
      formula: 'drivers + feeders + labour',
      inputs: [
        given('drivers', bill.driverCost, 'currency'),
        given('feeders', bill.conductorCost, 'currency'),
        given('labour', bill.labourCost, 'currency'),
      ],
      value: plan.totalCost,
      unit: 'currency',
      basis: PRICES,
    },
  ];
}

export function workingOf(c: Case, plan: TapePlan): WorkingStep[] {
  const { input, check } = c;
  const worst = worstSection(plan);
  return [
    {
      key: 'plan-cut-watts',
      name: 'Load of one segment at the full volts',
      formula: 'V * I at V, or the data sheet’s watts per metre * cut length, the larger',
      inputs: [
        given('V', input.tape.volts, 'V'),
        given('I', check.cutAmps, 'A'),
        given('cut length', input.tape.cutMetres, 'm'),
      ],
      value: check.cutWatts,
      unit: 'W',
      basis: 'datasheet',
    },
    ...costSteps(c, plan),
    {
      key: 'plan-worst-drop',
      name: 'Worst drop of a section',
      formula: '(V - Vmin) / V * 100 by the exact ladder',
      inputs: [given('run', worst.id, ''), given('limit', input.limits.maxDropPct, '%')],
      value: worst.dropPct,
      unit: '%',
      basis: "Kirchhoff's laws",
    },
    {
      key: 'plan-bound',
      name: 'How far from the best it can be',
      formula: '(total - least that any plan costs) / total * 100',
      inputs: [given('total', plan.totalCost, 'currency')],
      value: plan.boundPct,
      unit: '%',
      basis: 'bound by linear programming',
    },
  ];
}
