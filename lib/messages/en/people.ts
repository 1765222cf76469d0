/** Mails to people of a shop. */
export const people = {
  'mail.password-reset.subject': 'A new password for Lampwright',
  'mail.password-reset.text':
    'Somebody asked for a new password for this e-mail address. The button leads to a page where you set it. It works once, within an hour.',
  'mail.password-reset.button': 'Set a new password',
  'mail.password-reset.not-you': 'If it was not you, do nothing: your password stays as it is.',
} as const;
