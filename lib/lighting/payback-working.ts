/** How a payback came about. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import type { Paid } from './payback';

const HANDBOOK_135 = 'NIST Handbook 135 and ASTM E917, from memory';
const PRACTICE = 'common practice';

const of = (name: string, value: number, unit = ''): WorkingInput => ({ name, value, unit });

export function workingOf({ input, firstYear, presentSavings, result }: Paid): WorkingStep[] {
  const rates = [
    of('discount', input.discountPct, '%'),
    of('escalation', input.escalationPct ?? 0, '%'),
    of('years', input.years),
  ];
  return [
    {
      key: 'payback-net-cost',
      name: 'Net cost',
      formula: 'cost - incentive',
      inputs: [of('cost', input.cost), of('incentive', result.incentiveAllowed)],
      value: result.netCost,
      unit: '',
      basis: PRACTICE,
    },
    {
      key: 'payback-simple',
      name: 'Simple payback',
      formula: 'net cost / first year’s saving',
      inputs: [of('net cost', result.netCost), of('first year’s saving', firstYear)],
      value: result.simplePaybackYears,
      unit: 'years',
      basis: PRACTICE,
    },
    {
      key: 'payback-present-savings',
      name: 'Savings of all years, worth today',
      formula: 'sum over k of (saving * (1 + escalation)^(k - 1) + maintenance) / (1 + discount)^k',
      inputs: [
        of('saving', input.annualSaving),
        of('maintenance', input.annualMaintenanceSaving ?? 0),
        ...rates,
      ],
      value: presentSavings,
      unit: '',
      basis: HANDBOOK_135,
    },
    {
      key: 'payback-net-present-value',
      name: 'Net present value',
      formula: 'savings worth today - net cost',
      inputs: [of('savings worth today', presentSavings), of('net cost', result.netCost)],
      value: result.netPresentValue,
      unit: '',
      basis: HANDBOOK_135,
    },
    {
      key: 'payback-internal-rate',
      name: 'Internal rate of return',
      formula: 'the discount at which the net present value is 0',
      inputs: [
        of('net cost', result.netCost),
        of('first year’s saving', firstYear),
        of('years', input.years),
      ],
      value: result.internalRatePct,
      unit: '%',
      basis: HANDBOOK_135,
    },
    {
      key: 'payback-savings-to-investment',
      name: 'Savings to investment',
      formula: 'savings worth today / net cost',
      inputs: [of('savings worth today', presentSavings), of('net cost', result.netCost)],
      value: result.savingsToInvestmentRatio,
      unit: '',
      basis: HANDBOOK_135,
    },
  ];
}
