import { redirect } from 'next/navigation';
import { PlainPage } from '@/components/shell/plain-page';
import { SignOut } from '@/components/shell/sign-out';
import { ButtonLink } from '@/components/ui/button';
import { shopsOfPerson } from '@/lib/people/queries';
import { currentSession } from '@/lib/platform/auth';

/** Where a signed-in person belongs: their shop, or the choice between several. */
export default async function Home() {
  const session = await currentSession();
  if (!session) redirect('/sign-in');
  const shops = await shopsOfPerson(session.personId);
  const [only] = shops;
  if (only && shops.length === 1) redirect(`/s/${only.id}`);
  return (
    <PlainPage title={shops.length === 0 ? 'No shop yet' : 'Which shop?'}>
      {shops.length === 0 ? (
        <p>You are signed in, but no shop has you in its list. Ask the owner of your shop to add you.</p>
      ) : (
        <ul className="flex flex-col gap-3">
          {shops.map((shop) => (
            <li key={shop.id}>
              <ButtonLink href={`/s/${shop.id}`} look="secondary" className="w-full">
                {shop.name}
              </ButtonLink>
            </li>
          ))}
        </ul>
      )}
      <SignOut />
    </PlainPage>
  );
}
