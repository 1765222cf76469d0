'use client';
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/field';
import { Notice } from '@/components/ui/sheet';
import { customerMessage as message } from '@/lib/messages/quotes';
import { postAnswer } from './send';
import { useHydrated } from './use-hydrated';

export function DeclinePanel({ base, documentId }: { base: string | null; documentId: string }) {
  const router = useRouter();
  const hydrated = useHydrated();
  const [reason, setReason] = useState('');
  const [sending, setSending] = useState(false);
  const [failed, setFailed] = useState<{ message: string; field?: string | undefined } | null>(null);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    if (base === null || sending) return;
    setSending(true);
    setFailed(null);
    const result = await postAnswer(`${base}/decline`, { documentId, reason });
    setSending(false);
    if (result.ok || result.code === 'gone' || result.code === 'conflict') router.refresh();
    if (result.ok) return window.scrollTo({ top: 0 });
    setFailed({ message: result.message, field: result.issues[0]?.message });
  };

  return (
    <details className="mt-6 print:hidden">
      <summary className="inline-flex min-h-touch items-center underline underline-offset-4">
        {message('customer.decline.open')}
      </summary>
      <form onSubmit={(event) => void submit(event)} noValidate className="mt-3 flex flex-col gap-4">
        {failed && !failed.field ? (
          <Notice
            kind="danger"
            word={message('customer.decline.not-sent')}
            title={failed.message}
            role="alert"
          />
        ) : null}
        <TextArea
          id="decline-reason"
          label={message('customer.decline.reason')}
          maxLength={2000}
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          error={failed?.field}
        />
        <Button type="submit" look="secondary" disabled={base === null || !hydrated} pending={sending}>
          {message('customer.decline.button')}
        </Button>
      </form>
    </details>
  );
}
