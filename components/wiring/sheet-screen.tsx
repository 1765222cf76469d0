'use client';
/** The wiring sheet on a phone: cautions, proof, then circuit by circuit what goes where, ticks and readings. */
import { CircuitDrawing } from '@/components/circuits/figures';
import { ButtonLink } from '@/components/ui/button';
import { Notice, Sheet } from '@/components/ui/sheet';
import { message } from '@/lib/messages';
import type { SheetCircuit } from '@/lib/wiring/schema/sheet';
import { Cautions, DeadProved } from './cautions';
import { Readings } from './reading';
import { Say } from './say';
import { Refused, SheetStatus, SheetSync } from './sheet-status';
import { SignOff } from './sign-off';
import { Steps } from './steps';
import { type SheetOnPhone, useSheet } from './use-sheet';

function Circuit({ circuit, sheet }: { circuit: SheetCircuit; sheet: SheetOnPhone }) {
  // Amber is for what may be live: the mains conductors of a circuit until it is proved dead.
  const mayBeLive = circuit.kind === 'branch-circuit' && sheet.progress.deadProved === null;
  const answer = { engine: circuit.engine, result: circuit.result, findings: [], working: [] };
  return (
    <Sheet title={circuit.name} aside={circuit.areaName}>
      <div className={mayBeLive ? '[&_polyline]:stroke-live' : undefined}>
        <CircuitDrawing
          kind={circuit.kind}
          electrical={circuit.electrical}
          answer={answer}
          settings={sheet.settings}
        />
      </div>
      <div className="mt-4 flex flex-col gap-5">
        <Steps steps={circuit.steps} sheet={sheet} />
        <Readings readings={circuit.readings} sheet={sheet} />
        <Say sheet={sheet} target={circuit.id} />
      </div>
    </Sheet>
  );
}

function Changes({ sheet }: { sheet: SheetOnPhone }) {
  if (sheet.sheet.changes.length === 0) return null;
  return (
    <Sheet title={sheet.t('wiring.changes.title')}>
      <ul className="flex flex-col gap-5">
        {sheet.sheet.changes.map((change) => (
          <li
            key={change.id}
            className="flex flex-col gap-3 border-t border-rule pt-4 first:border-t-0 first:pt-0"
          >
            <p>
              <strong>{change.areaName}: </strong>
              {change.description}
            </p>
            <Steps steps={change.steps} sheet={sheet} />
            <Say sheet={sheet} target={change.id} />
          </li>
        ))}
      </ul>
    </Sheet>
  );
}

function Head({ sheet }: { sheet: SheetOnPhone }) {
  const { site, number, revision, job } = sheet.sheet;
  return (
    <div className="sticky top-0 z-10 -mx-4 border-b border-rule bg-ground px-4 py-2 sm:-mx-8 sm:px-8">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <p className="text-sm text-ink-2">
          {site.name}, {sheet.t('wiring.sheet.copy', { number, revision: String(revision) })}
        </p>
        <SheetStatus offline={sheet.offline} />
      </div>
      <h1 className="text-2xl sm:text-3xl">{job.title}</h1>
    </div>
  );
}

export function SheetScreen(ids: { shopId: string; membershipId: string; sheetId: string }) {
  const { ready, offline, sheet } = useSheet(ids);
  if (!ready) return <p role="status">{message('wiring.sheet.opening')}</p>;
  if (!sheet)
    return (
      <div className="flex flex-col gap-3">
        <p role="status">{message('wiring.sheet.missing')}</p>
        <SheetStatus offline={offline} />
      </div>
    );
  return (
    <div className="mx-auto flex w-full max-w-3xl flex-col gap-5">
      <Head sheet={sheet} />
      {sheet.newer ? (
        <Notice kind="caution" title={sheet.t('wiring.sheet.newer')} role="status">
          <ButtonLink className="mt-2" href={`/s/${ids.shopId}/sheets/${sheet.newer.id}`}>
            {sheet.t('wiring.sheet.to-newer', { revision: String(sheet.newer.revision) })}
          </ButtonLink>
        </Notice>
      ) : null}
      <SheetSync offline={offline} settings={sheet.settings} />
      <Refused offline={offline} />
      <Cautions sheet={sheet} />
      <DeadProved sheet={sheet} />
      {sheet.sheet.circuits.map((circuit) => (
        <Circuit key={circuit.id} circuit={circuit} sheet={sheet} />
      ))}
      <Changes sheet={sheet} />
      <SignOff sheet={sheet} />
    </div>
  );
}
