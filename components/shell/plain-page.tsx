import type { ReactNode } from 'react';

/** A page with one thing to do or to read, for people who are not inside a shop (yet). */
export function PlainPage({ title, children }: { title: ReactNode; children: ReactNode }) {
  return (
    <main id="main" className="mx-auto flex w-full max-w-lg flex-col gap-5 px-4 py-8 sm:py-14">
      <p className="font-plate text-2xl font-bold tracking-wider uppercase">Lampwright</p>
      <div className="flex flex-col gap-5 rounded-md border border-rule bg-sheet p-5 sm:p-7">
        <h1 className="text-3xl">{title}</h1>
        {children}
      </div>
    </main>
  );
}
