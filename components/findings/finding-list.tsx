/** Findings as screens say them: severity as a word, what happened and what to do next, and what it rests on. */
import type { ReactNode } from 'react';
import { cx } from '@/components/ui/cx';
import type { Finding } from '@/lib/engine/contract';
import { messageOr } from '@/lib/messages';
import type { ShopSettings } from '@/lib/units/settings';

const WORD = { stop: 'Stop', caution: 'Caution', note: 'Note' } as const;
const ORDER = { stop: 0, caution: 1, note: 2 } as const;

export function SeverityTag({ severity }: { severity: Finding['severity'] }) {
  return (
    <span
      className={cx(
        'rounded-plate border-2 px-1.5 text-sm font-bold tracking-wide uppercase',
        severity === 'stop' && 'border-danger bg-danger-ground text-danger',
        severity === 'caution' && 'border-ink',
        severity === 'note' && 'border-rule-strong text-ink-2',
      )}
    >
      {WORD[severity]}
    </span>
  );
}

export function FindingList({
  findings,
  settings,
  actions,
}: {
  findings: readonly Finding[];
  settings: ShopSettings;
  /** What can be done about a finding, right here. */
  actions?: (finding: Finding) => ReactNode;
}) {
  if (findings.length === 0) return <p className="text-ink-2">Nothing stands against it.</p>;
  const sorted = [...findings].sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  return (
    <ul className="flex flex-col">
      {sorted.map((finding, index) => (
        <li
          key={`${finding.code}-${index}`}
          className="border-t border-rule py-3 first:border-t-0 first:pt-0"
        >
          <p className="flex flex-wrap items-baseline gap-2">
            <SeverityTag severity={finding.severity} />
            <strong>
              {messageOr(`finding.${finding.code}.title`, finding.message, finding.values, settings)}
            </strong>
          </p>
          <p className="mt-1">
            {messageOr(`finding.${finding.code}.body`, finding.message, finding.values, settings)}
          </p>
          <p className="text-sm text-ink-2">
            {finding.severity === 'stop' && finding.hard ? 'Can not be overridden. ' : ''}Basis:{' '}
            {finding.basis}
          </p>
          {actions?.(finding)}
        </li>
      ))}
    </ul>
  );
}
