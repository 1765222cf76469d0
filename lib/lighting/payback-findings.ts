/** What a reader of a payback must know. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, note } from '@/lib/engine/finding';
import type { Paid } from './payback';
import { changesOfSign } from './payback-rate';

const PRACTICE = 'common practice';
const HANDBOOK_135 = 'NIST Handbook 135 and ASTM E917, from memory';

function ofThePayback({ input, firstYear, result }: Paid): Finding[] {
  const { simplePaybackYears, netCost, netPresentValue } = result;
  if (netCost <= 0) {
    if (input.cost === 0) return [];
    return [
      caution(
        'payback-incentive-covers-cost',
        'The incentive covers the whole cost; programmes seldom pay all of it.',
        { incentive: result.incentiveAllowed, cost: input.cost },
        PRACTICE,
      ),
    ];
  }
  if (simplePaybackYears === null)
    return [
      caution(
        'payback-no-saving',
        'The first year saves nothing: the job never pays back.',
        { firstYear },
        HANDBOOK_135,
      ),
    ];
  if (!atMost(simplePaybackYears, input.years))
    return [
      caution(
        'payback-beyond-years',
        'The job pays back later than the years that are looked at.',
        { simplePaybackYears, years: input.years },
        PRACTICE,
      ),
    ];
  if (netPresentValue < 0)
    return [
      caution(
        'payback-below-discount',
        'The job pays back, and still earns less than the discount rate asks.',
        { simplePaybackYears, discountPct: input.discountPct, netPresentValue },
        HANDBOOK_135,
      ),
    ];
  return [];
}

function ofTheRates({ input, result }: Paid): Finding[] {
  const escalationPct = input.escalationPct ?? 0;
  const found: Finding[] = [];
  if (escalationPct !== 0)
    found.push(
      note(
        'payback-first-year-plain',
        'The first year’s saving is not escalated; the second is the first that is.',
        { escalationPct },
        HANDBOOK_135,
      ),
    );
  if (escalationPct > 0 && !atMost(escalationPct, input.discountPct))
    found.push(
      caution(
        'payback-escalation-over-discount',
        'Savings grow faster than they are discounted: far years count more than near ones.',
        { escalationPct, discountPct: input.discountPct },
        PRACTICE,
      ),
    );
  if (result.netCost > 0 && changesOfSign(result.cashFlows) > 1)
    found.push(
      note(
        'payback-no-single-rate',
        'Savings turn into costs or back over the years: no single rate of return describes them.',
        { changes: changesOfSign(result.cashFlows) },
        HANDBOOK_135,
      ),
    );
  return found;
}

function ofTheIncentive({ input, result }: Paid): Finding[] {
  if (atMost(input.incentive, result.incentiveAllowed)) return [];
  return [
    note(
      'payback-incentive-capped',
      'The incentive is cut to the most that its programme pays.',
      { incentive: input.incentive, allowed: result.incentiveAllowed, capPct: input.incentiveCapPct ?? null },
      'the programme’s terms',
    ),
  ];
}

export const findingsOf = (paid: Paid): Finding[] => [
  ...ofThePayback(paid),
  ...ofTheRates(paid),
  ...ofTheIncentive(paid),
];
