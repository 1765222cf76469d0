'use client';
/** A soft stop stands on a named person's word: the reason travels with the line. A hard one has no button. */
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/field';
import type { Finding } from '@/lib/engine/contract';
import type { OfflineScope } from '@/lib/offline/use-offline';
import { overrideFinding } from '@/lib/surveys/actions';

export function OverrideStop({
  finding,
  offline,
  subject,
  dirty,
}: {
  finding: Finding;
  offline: OfflineScope;
  subject: { type: 'change-line' | 'circuit'; id: string };
  /** There are unsent changes: what is overridden must be what the server figured. */
  dirty: boolean;
}) {
  const id = useId();
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const [said, setSaid] = useState<{ text: string; bad: boolean } | null>(null);
  const [pending, setPending] = useState(false);
  if (finding.severity !== 'stop' || finding.hard) return null;
  const shopId = window.location.pathname.split('/')[2] ?? '';
  const send = async () => {
    setPending(true);
    const result = await overrideFinding(shopId, {
      jobId: offline.scope,
      subjectType: subject.type,
      subjectId: subject.id,
      code: finding.code,
      reason,
    }).catch(() => null);
    setPending(false);
    if (result?.ok)
      setSaid({ text: 'Overridden on your licence number. The reason goes with the line.', bad: false });
    else
      setSaid({
        text: result?.issues[0]?.message ?? result?.message ?? 'No signal: try again when there is one.',
        bad: true,
      });
  };
  if (said && !said.bad) return <p className="mt-2">✓ {said.text}</p>;
  if (!open)
    return (
      <Button look="secondary" className="mt-2" disabled={dirty} onClick={() => setOpen(true)}>
        Let it stand, with a reason
      </Button>
    );
  return (
    <div className="mt-2 flex flex-col gap-3">
      <TextArea
        id={id}
        label="Why may this stand?"
        value={reason}
        error={said?.text}
        onChange={(event) => setReason(event.target.value)}
      />
      <div className="flex flex-wrap gap-3">
        <Button pending={pending} onClick={() => void send()}>
          Let it stand
        </Button>
        <Button look="secondary" onClick={() => setOpen(false)}>
          Leave the stop
        </Button>
      </div>
    </div>
  );
}
