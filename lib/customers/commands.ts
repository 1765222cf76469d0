import { Customer } from '@/models';
import { type AnyActor, command } from '@/lib/access/command';
import { conflict, notFound } from '@/lib/platform/http/errors';
import { findCustomer } from './queries';
import type { CustomerInput } from './schema';

/** Makes a customer, or changes one against the version that the form was opened with. */
export async function saveCustomer(
  actor: AnyActor,
  input: CustomerInput,
): Promise<{ id: string; version: number }> {
  const { id, baseVersion, ...values } = input;
  return command(actor, async ({ audit, shopId }) => {
    if (id === undefined || baseVersion === undefined) {
      const row = await Customer.create({ shopId, ...(id === undefined ? {} : { id }), ...values });
      await audit('customer.created', { type: 'customer', id: row.id }, { after: values });
      return { id: row.id, version: 1 };
    }
    const before = await findCustomer(id);
    if (!before) throw notFound('This customer');
    const [changed] = await Customer.update(
      { ...values, version: baseVersion + 1 },
      { where: { id, version: baseVersion } },
    );
    if (changed !== 1)
      throw conflict('Somebody else changed this customer meanwhile. Both are shown.', before);
    await audit('customer.changed', { type: 'customer', id }, { before: { ...before }, after: values });
    return { id, version: baseVersion + 1 };
  });
}
