import { PlainPage } from '@/components/shell/plain-page';
import { ButtonLink } from '@/components/ui/button';

export default function NotFound() {
  return (
    <PlainPage title="There is nothing here">
      <p>This address does not lead anywhere, or it leads to something that your sign-in does not open.</p>
      <ButtonLink href="/">Go to your shop</ButtonLink>
    </PlainPage>
  );
}
