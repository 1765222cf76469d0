'use client';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useEffect, useRef } from 'react';
import { PlateFace } from '@/components/ui/plate';

export interface NavItem {
  href: string;
  label: string;
}

/** Navigation as a row of legend plates, each with a pilot lamp that is lit where you are. */
export function PlateNav({ items }: { items: NavItem[] }) {
  const path = usePathname();
  const best = items
    .filter((item) => path === item.href || path.startsWith(`${item.href}/`))
    .sort((a, b) => b.href.length - a.href.length)[0];
  const row = useRef<HTMLUListElement>(null);
  const here = best?.href;
  // A phone has width for some of the plates: the lit one is among those that are seen.
  useEffect(() => {
    const list = row.current;
    const lit = list?.querySelector<HTMLElement>('[aria-current="page"]');
    if (list && lit) list.scrollLeft = lit.offsetLeft - (list.clientWidth - lit.offsetWidth) / 2;
  }, [here]);
  return (
    <nav aria-label="Main" className="min-w-0">
      <ul
        ref={row}
        className="relative flex items-end gap-x-2 gap-y-2 overflow-x-auto pb-1 sm:flex-wrap sm:gap-x-3"
      >
        {items.map((item) => {
          const lit = item === best;
          return (
            <li key={item.href} className="shrink-0">
              <Link
                href={item.href}
                aria-current={lit ? 'page' : undefined}
                className="flex min-h-touch items-end no-underline"
              >
                <PlateFace lit={lit}>{item.label}</PlateFace>
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
