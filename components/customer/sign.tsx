'use client';
import { useRouter } from 'next/navigation';
import { type FormEvent, useEffect, useRef, useState } from 'react';
import { Button } from '@/components/ui/button';
import { CheckBox, TextInput } from '@/components/ui/field';
import { Notice } from '@/components/ui/sheet';
import { customerMessage as message } from '@/lib/messages/quotes';
import type { FieldIssue } from '@/lib/messages/result';
import { postAnswer } from './send';
import { useHydrated } from './use-hydrated';

interface Signature {
  documentId: string;
  sha256: string;
  choices: string[];
  totalMinor: number;
  shownText: string;
}

interface Failed {
  code: string;
  message: string;
  issues: FieldIssue[];
}

const issueOf = (failed: Failed | null, path: string) =>
  failed?.issues.find((issue) => issue.path === path)?.message;

/** After these the page itself has changed: it is read again, and what was typed stays. */
const STALE = ['gone', 'conflict'];

function checkLocally(name: string, agreed: boolean): FieldIssue[] {
  const issues: FieldIssue[] = [];
  if (name.trim().length < 2) issues.push({ path: 'name', message: message('customer.sign.name-missing') });
  if (!agreed) issues.push({ path: 'agreed', message: message('customer.sign.agree-missing') });
  return issues;
}

export function SignPanel({
  base,
  shownText,
  answer,
}: {
  base: string | null;
  shownText: string;
  answer: Signature;
}) {
  const router = useRouter();
  const hydrated = useHydrated();
  const [name, setName] = useState('');
  const [agreed, setAgreed] = useState(false);
  const [sending, setSending] = useState(false);
  const [failed, setFailed] = useState<Failed | null>(null);
  const alert = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (!failed) return;
    const first = failed.issues[0]?.path;
    if (first === 'name' || first === 'agreed') document.getElementById(`sign-${first}`)?.focus();
    else alert.current?.focus();
  }, [failed]);

  const submit = async (event: FormEvent) => {
    event.preventDefault();
    if (base === null || sending) return;
    const missing = checkLocally(name, agreed);
    if (missing.length > 0)
      return setFailed({
        code: 'invalid-input',
        message: message('customer.sign.look-again'),
        issues: missing,
      });
    setSending(true);
    setFailed(null);
    const result = await postAnswer(`${base}/accept`, { ...answer, name, agreed });
    setSending(false);
    if (!result.ok) setFailed(result);
    if (result.ok || STALE.includes(result.code)) router.refresh();
    if (result.ok) window.scrollTo({ top: 0 });
  };

  return (
    <form onSubmit={(event) => void submit(event)} noValidate className="flex flex-col gap-4 print:hidden">
      {failed ? (
        <div ref={alert} tabIndex={-1}>
          <Notice kind="danger" word={message('customer.not-signed')} title={failed.message} role="alert" />
        </div>
      ) : null}
      <blockquote className="border-l-4 border-rule-strong pl-4">{shownText}</blockquote>
      <CheckBox
        id="sign-agreed"
        label={message('customer.sign.agree')}
        checked={agreed}
        onChange={(event) => setAgreed(event.target.checked)}
        error={issueOf(failed, 'agreed')}
      />
      <TextInput
        id="sign-name"
        label={message('customer.sign.name')}
        hint={message('customer.sign.name-hint')}
        autoComplete="name"
        maxLength={200}
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={issueOf(failed, 'name')}
      />
      <Button type="submit" disabled={base === null || !hydrated} pending={sending}>
        {message('customer.sign.button')}
      </Button>
      <noscript>
        <p>{message('customer.sign.no-script')}</p>
      </noscript>
    </form>
  );
}
