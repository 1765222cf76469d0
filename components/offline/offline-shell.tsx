'use client';
/** What the service worker answers with when there is no server: the screens that work from the device's own store. */
import { useSyncExternalStore } from 'react';
import { CircuitDesk } from '@/components/circuits/circuit-desk';
import { CircuitList } from '@/components/circuits/circuit-list';
import { PageBody } from '@/components/shell/header';
import { SurveyScreen } from '@/components/survey/survey-screen';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/sheet';
import { SheetScreen } from '@/components/wiring/sheet-screen';
import { knownPerson } from '@/lib/offline/person';

const never = () => () => undefined;

/** The address as the person asked for it; the page itself stands at another one. */
const usePath = () =>
  useSyncExternalStore(
    never,
    () => location.pathname,
    () => '',
  );

const ADDRESS = /^\/s\/([^/]+)\/(?:jobs\/([^/]+)\/(survey|circuits)(?:\/([^/]+))?|sheets\/([^/]+))$/;

function Screen({ path }: { path: string }) {
  const [, shopId = '', jobId = '', screen, circuitId, sheetId] = ADDRESS.exec(path) ?? [];
  const membershipId = shopId ? knownPerson(shopId) : null;
  if (!membershipId)
    return (
      <PageBody title="No signal">
        <Notice kind="caution" word="No signal" title="The server can not be reached.">
          {shopId
            ? 'Nobody has worked in this shop on this device since the last sign-out. Sign in when there is a signal.'
            : 'Surveys, circuits and wiring sheets that were opened on this device work without one: open them by their own address.'}
        </Notice>
        <div>
          <Button onClick={() => location.reload()}>Try again</Button>
        </div>
      </PageBody>
    );
  const ids = { shopId, membershipId };
  if (sheetId)
    return (
      <main id="main" className="px-4 py-5 sm:px-8">
        <SheetScreen {...ids} sheetId={sheetId} />
      </main>
    );
  if (screen === 'survey')
    return (
      <PageBody
        title="Site survey"
        sub="Saved on this device while you type, and sent when there is a signal."
      >
        <SurveyScreen {...ids} jobId={jobId} />
      </PageBody>
    );
  return (
    <PageBody title={circuitId ? 'Circuit desk' : 'Circuits'}>
      {circuitId ? (
        <CircuitDesk {...ids} jobId={jobId} circuitId={circuitId} />
      ) : (
        <CircuitList {...ids} jobId={jobId} />
      )}
    </PageBody>
  );
}

export function OfflineShell() {
  const path = usePath();
  return (
    <>
      <header className="no-print border-b border-rule bg-sheet px-4 py-3 sm:px-8">
        <p className="font-plate text-2xl leading-none font-bold tracking-wider uppercase">Lampwright</p>
        <p className="text-sm text-ink-2">Working from this device</p>
      </header>
      {path ? <Screen path={path} /> : null}
    </>
  );
}
