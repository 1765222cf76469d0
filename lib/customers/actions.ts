'use server';
import { shopAction } from '@/lib/access/action';
import { saveCustomer as saveCustomerCommand } from './commands';
import { type CustomerForm, customerForm } from './schema';

const save = shopAction({
  name: 'customers.saveCustomer',
  permission: 'customer:edit',
  schema: customerForm,
  run: saveCustomerCommand,
});

export async function saveCustomer(shopId: string, input: CustomerForm, meta?: { idempotencyKey?: string }) {
  return save(shopId, input, meta);
}
