import { z } from 'zod';

export const customerForm = z.object({
  id: z.uuid().optional(),
  baseVersion: z.number().int().optional(),
  name: z.string().trim().min(1, 'Give the customer a name.').max(200, 'At most 200 characters.'),
  contactName: z.string().trim().max(200, 'At most 200 characters.'),
  email: z.union([
    z.literal(''),
    z.email('This is not an e-mail address.').max(200, 'At most 200 characters.'),
  ]),
  phone: z.string().trim().max(40, 'At most 40 characters.'),
  address: z.string().trim().max(400, 'At most 400 characters.'),
  consumer: z.boolean(),
  notes: z.string().trim().max(4000, 'At most 4,000 characters.'),
});
export type CustomerForm = z.input<typeof customerForm>;
export type CustomerInput = z.output<typeof customerForm>;
