import { message } from '@/lib/messages';
import type { ContentOption, QuoteContent } from '@/lib/quotes/schema/content';
import { formatMoney } from '@/lib/units/money';
import { Band } from './section';

/** Additions: boxes to tick while the quote waits for an answer, ticks in ink once it has one. */
export function Options({
  options,
  settings,
  choices,
  onToggle,
}: {
  options: readonly ContentOption[];
  settings: QuoteContent['settings'];
  choices: readonly string[];
  /** Without it the choice stands. */
  onToggle?: ((id: string) => void) | undefined;
}) {
  if (options.length === 0) return null;
  return (
    <Band title={message('customer.options')}>
      <ul>
        {options.map((option) => (
          <li key={option.id} className="border-b border-rule last:border-b-0">
            <label className="flex min-h-touch items-center gap-4 py-3 print:break-inside-avoid">
              <input
                type="checkbox"
                checked={choices.includes(option.id)}
                disabled={!onToggle}
                onChange={() => onToggle?.(option.id)}
                className="size-7 shrink-0 accent-plate"
              />
              <span className="min-w-0 grow">
                {option.area ? `${option.area}: ${option.text}` : option.text}
              </span>
              <span className="font-mono whitespace-nowrap">
                + {formatMoney(option.amountMinor, settings, { symbol: false })}
              </span>
            </label>
          </li>
        ))}
      </ul>
    </Band>
  );
}
