import { KeyFigure, Notice } from '@/components/ui/sheet';
import { message } from '@/lib/messages';
import type { DeskDraft } from '@/lib/quotes/schema/desk';
import { totalRows } from '@/lib/quotes/schema/present';
import { formatMoney, formatNumber } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';

/** Totals as they stand; cost and margin only where they were given. */
export function DraftTotals({ draft, settings }: { draft: DeskDraft; settings: ShopSettings }) {
  const { cost, terms, totals } = draft;
  const shown = {
    settings,
    terms: { ...terms, depositPct: draft.depositApplies ? terms.depositPct : '0' },
  };
  return (
    <dl>
      {totalRows(shown, totals).map((row) => (
        <KeyFigure key={row.key} label={row.label} value={row.amount} />
      ))}
      {cost ? (
        <>
          <KeyFigure
            label="Cost to the shop"
            value={formatMoney(cost.costMinor, settings, { symbol: false })}
          />
          <KeyFigure
            label="Margin on the price before tax"
            value={cost.marginPct === null ? '–' : formatNumber(cost.marginPct, 1)}
            unit="%"
          />
        </>
      ) : null}
    </dl>
  );
}

/** What keeps the draft from being sent, each in words that name the line. */
export function Blockers({ draft }: { draft: DeskDraft }) {
  if (draft.blockers.length === 0) return null;
  return (
    <Notice kind="danger" word="Not yet" title="This keeps the quote from going out">
      <ul className="flex list-disc flex-col gap-1.5 pl-5">
        {draft.blockers.map((blocker, index) => (
          <li key={index}>
            {message(`quote.blocker.${blocker.code}`, { line: blocker.line, ...blocker.values })}
          </li>
        ))}
      </ul>
    </Notice>
  );
}
