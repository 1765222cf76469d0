import type { ReactNode } from 'react';
import { type NavItem, PlateNav } from './plate-nav';

/** The head of every signed-in page. */
export function ShopHeader({
  shopName,
  personName,
  roles,
  items,
  tools,
}: {
  shopName: string;
  personName: string;
  roles: string;
  items: NavItem[];
  tools: ReactNode;
}) {
  return (
    <header className="no-print border-b border-rule bg-sheet">
      <div className="mx-auto flex w-full max-w-[90rem] flex-wrap items-end justify-between gap-x-8 gap-y-3 px-4 py-3 sm:px-8">
        <div className="min-w-0">
          <p className="font-plate text-2xl leading-none font-bold tracking-wider uppercase">Lampwright</p>
          <p className="text-sm text-ink-2">{shopName}</p>
        </div>
        <div className="order-last min-w-0 basis-full lg:order-none lg:basis-auto">
          <PlateNav items={items} />
        </div>
        <details className="relative">
          <summary className="flex min-h-touch list-none flex-col justify-center text-right leading-tight">
            <span>{personName}</span>
            <span className="text-sm text-ink-2">{roles}</span>
          </summary>
          <div className="absolute right-0 z-20 mt-1 flex w-64 max-w-[90vw] flex-col gap-3 rounded-md border-2 border-rule bg-sheet p-4">
            {tools}
          </div>
        </details>
      </div>
    </header>
  );
}

/** The body of a signed-in page: a heading and what belongs beside it. */
export function PageBody({
  title,
  sub,
  actions,
  children,
}: {
  title: ReactNode;
  sub?: ReactNode;
  actions?: ReactNode;
  children: ReactNode;
}) {
  return (
    <main id="main" className="mx-auto flex w-full max-w-[90rem] flex-col gap-5 px-4 py-5 sm:px-8 sm:py-7">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <div className="min-w-0">
          <h1 className="text-3xl sm:text-4xl">{title}</h1>
          {sub ? <p className="mt-1 text-ink-2">{sub}</p> : null}
        </div>
        {actions ? <div className="flex flex-wrap gap-3">{actions}</div> : null}
      </div>
      {children}
    </main>
  );
}
