/** People of a shop, signing in, and forgotten passwords. */
import { z } from 'zod';

export const ROLE_NAMES = ['owner', 'estimator', 'office', 'crew'] as const;

export const memberForm = z.object({
  name: z.string().trim().min(1, 'Give the name.').max(120, 'At most 120 characters.'),
  email: z.email('This is not an e-mail address.').max(200, 'At most 200 characters.'),
  roles: z.array(z.enum(ROLE_NAMES)).min(1, 'Choose at least one role.'),
  licenceNumber: z.string().trim().max(60, 'At most 60 characters.'),
  mainsQualified: z.boolean(),
});
export type MemberForm = z.input<typeof memberForm>;
export type MemberInput = z.output<typeof memberForm>;

export const memberEditForm = memberForm
  .omit({ email: true })
  .extend({ id: z.uuid(), baseVersion: z.number().int() });
export type MemberEditForm = z.input<typeof memberEditForm>;
export type MemberEditInput = z.output<typeof memberEditForm>;

export const removeMemberForm = z.object({ id: z.uuid() });

export const signInForm = z.object({
  email: z.email('Type your e-mail address.'),
  password: z.string().min(1, 'Type your password.'),
});
export type SignInForm = z.input<typeof signInForm>;

export const forgottenForm = z.object({ email: z.email('Type your e-mail address.') });
export type ForgottenForm = z.input<typeof forgottenForm>;

export const newPasswordForm = z
  .object({
    token: z.string().min(10, 'This address is not complete.'),
    password: z.string().min(10, 'At least 10 characters.').max(200, 'At most 200 characters.'),
    again: z.string(),
  })
  .refine((form) => form.password === form.again, { path: ['again'], message: 'The two do not match.' });
export type NewPasswordForm = z.input<typeof newPasswordForm>;
