/** Mails to people of a shop, rendered when they are sent. */
import { createElement } from 'react';
import { render } from '@react-email/render';
import { PasswordReset } from '@/emails/password-reset';
import { message } from '@/lib/messages';
import { withShop } from '@/lib/platform/db';
import { env } from '@/lib/platform/env';
import { sendMail } from '@/lib/platform/mail';
import type { Handler } from '@/lib/platform/queue/worker';
import { getShop } from '@/lib/shops/queries';
import { resetToken } from './resets';

const passwordReset: Handler = async (item) => {
  const { resetId = '', email = '' } = item.payload;
  const shop = await withShop(item.shopId, async () => (await getShop(item.shopId)).get({ plain: true }));
  const link = `${env().APP_URL.replace(/\/$/, '')}/new-password/${resetToken(resetId)}`;
  const body = createElement(PasswordReset, { shopName: shop.name, link });
  await sendMail({
    id: item.id,
    to: email,
    fromName: shop.name,
    subject: message('mail.password-reset.subject'),
    html: await render(body),
    text: await render(body, { plainText: true }),
  });
};

export const peopleHandlers: [string, Handler][] = [['people.password-reset', passwordReset]];
