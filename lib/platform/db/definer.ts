/** The one place that calls the SECURITY DEFINER functions: what runs before a shop is known. Ids only. */
import { select } from './index';

async function id(sql: string, bind: unknown[]): Promise<string | null> {
  const rows = await select<{ id: string | null }>(`select ${sql} as id`, bind);
  return rows[0]?.id ?? null;
}

async function ids(sql: string, bind: unknown[]): Promise<string[]> {
  const rows = await select<{ id: string }>(`select id from ${sql} as t(id)`, bind);
  return rows.map((row) => row.id);
}

export const personIdByEmail = (email: string) => id('person_id_by_email($1)', [email]);
export const personIdBySession = (sessionId: string) => id('person_id_by_session($1)', [sessionId]);
export const personIdByReset = (tokenSha256: string) => id('person_id_by_reset($1)', [tokenSha256]);
export const personIdForNewEmail = (email: string) => id('person_id_for_new_email($1)', [email]);
export const shopIdsByPerson = (personId: string) => ids('shop_ids_by_person($1)', [personId]);
export const shopIdsWithOutbox = (most: number) => ids('shop_ids_with_outbox($1)', [most]);
export const shopIdByLink = (tokenSha256: string) => id('shop_id_by_link($1)', [tokenSha256]);
export const linkIdByToken = (tokenSha256: string) => id('link_id_by_token($1)', [tokenSha256]);
export const shopIdByCheckout = (account: string, checkoutId: string) =>
  id('shop_id_by_checkout($1, $2)', [account, checkoutId]);
export const shopIdByPaymentSession = (sessionId: string) =>
  id('shop_id_by_payment_session($1)', [sessionId]);
