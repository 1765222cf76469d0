import type { ReactNode } from 'react';
import { customerMessage as message } from '@/lib/messages/quotes';
import type { ContentOption, QuoteContent } from '@/lib/quotes/schema/content';
import { formatMoney } from '@/lib/units/money';
import { Band } from './section';

const ROW = 'flex min-h-touch items-center gap-4 py-3 print:break-inside-avoid';

function Words({ option, children }: { option: ContentOption; children?: ReactNode }) {
  return (
    <span className="min-w-0 grow">
      {option.area ? `${option.area}: ${option.text}` : option.text}
      {children}
    </span>
  );
}

function Amount({ option, settings }: { option: ContentOption; settings: QuoteContent['settings'] }) {
  return (
    <span className="font-mono whitespace-nowrap">
      + {formatMoney(option.amountMinor, settings, { symbol: false })}
    </span>
  );
}

interface OptionsProps {
  options: readonly ContentOption[];
  settings: QuoteContent['settings'];
  choices: readonly string[];
}

/** Additions, as boxes to tick while the quote waits for an answer. */
export function Options({
  options,
  settings,
  choices,
  onToggle,
}: OptionsProps & { onToggle: (id: string) => void }) {
  if (options.length === 0) return null;
  return (
    <Band title={message('customer.options')}>
      <ul>
        {options.map((option) => (
          <li key={option.id} className="border-b border-rule last:border-b-0">
            <label className={ROW}>
              <input
                type="checkbox"
                checked={choices.includes(option.id)}
                onChange={() => onToggle(option.id)}
                className="size-7 shrink-0 accent-plate"
              />
              <Words option={option} />
              <Amount option={option} settings={settings} />
            </label>
          </li>
        ))}
      </ul>
    </Band>
  );
}

/** Additions once the choice stands: an ink tick with the word. */
export function SettledOptions({ options, settings, choices }: OptionsProps) {
  if (options.length === 0) return null;
  return (
    <Band title={message('customer.options')}>
      <ul>
        {options.map((option) => {
          const taken = choices.includes(option.id);
          return (
            <li key={option.id} className="border-b border-rule last:border-b-0">
              <div className={ROW}>
                <span aria-hidden className="w-7 shrink-0 text-center text-xl font-bold">
                  {taken ? '✓' : '–'}
                </span>
                <Words option={option}>
                  <span className="block text-sm text-ink-2">
                    {message(taken ? 'customer.option-taken' : 'customer.option-left')}
                  </span>
                </Words>
                <Amount option={option} settings={settings} />
              </div>
            </li>
          );
        })}
      </ul>
    </Band>
  );
}
