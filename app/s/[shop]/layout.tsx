import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { type NavItem } from '@/components/shell/plate-nav';
import { ShopHeader } from '@/components/shell/header';
import { OnThisDevice } from '@/components/shell/on-this-device';
import { SignOut } from '@/components/shell/sign-out';
import { type Theme, ThemeSwitch } from '@/components/ui/theme-switch';
import { pageActor } from '@/lib/access/actor';
import { type Actor, may, type Permission } from '@/lib/access/policy';
import { shopName } from '@/lib/shops/queries';

const PLATES: { path: string; label: string; needs: Permission }[] = [
  { path: '', label: 'Next up', needs: 'shop:enter' },
  { path: '/jobs', label: 'Jobs', needs: 'job:see' },
  { path: '/visits', label: 'Visits', needs: 'sheet:write' },
  { path: '/customers', label: 'Customers', needs: 'job:see' },
  { path: '/parts', label: 'Parts and prices', needs: 'parts:see' },
  { path: '/people', label: 'People', needs: 'people:edit' },
  { path: '/settings', label: 'Shop', needs: 'settings:edit' },
];

function platesFor(actor: Actor): NavItem[] {
  return PLATES.filter((plate) => may(actor, plate.needs)).map((plate) => ({
    href: `/s/${actor.shopId}${plate.path}`,
    label: plate.label,
  }));
}

export default async function ShopLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ shop: string }>;
}) {
  const { shop } = await params;
  const actor = await pageActor(shop, 'shop:enter');
  const theme = (await cookies()).get('theme')?.value;
  return (
    <>
      <ShopHeader
        shopName={await shopName(shop)}
        personName={actor.name}
        roles={actor.roles.join(', ')}
        items={platesFor(actor)}
        tools={
          <>
            <ThemeSwitch
              initial={(theme === 'light' || theme === 'dark' ? theme : 'device') satisfies Theme}
            />
            <SignOut />
          </>
        }
      />
      <OnThisDevice shopId={shop} membershipId={actor.membershipId} />
      {children}
    </>
  );
}
