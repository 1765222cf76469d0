/** Invoices, receipts and the pay page. */
export const money = {
  'invoice.row.deposit': 'Deposit, {pct} % of quote {number}, revision {revision}',
  'invoice.row.work': 'Work of quote {number}, revision {revision}, before tax',
  'invoice.row.earlier': 'Less invoice {number}',
  'invoice.heading': 'Invoices',
  'invoice.deposit': 'Deposit invoice {number}',
  'invoice.final': 'Final invoice {number}',
  'invoice.line': 'Of {issued}, due {due}',
  'invoice.total': 'To be paid',
  'invoice.received': 'Received',
  'invoice.balance': 'Still open',
  'invoice.pay-card': 'Pay by card',
  'invoice.paid': 'This invoice is paid. Thank you.',
  'invoice.voided': 'This invoice is void: nothing is asked for it.',
  'invoice.over-ceiling':
    'This amount is above what {shop} takes by card. Please pay by transfer or cheque, or ask them.',
  'invoice.how-else': 'Or by transfer or cheque: ask {shop}.',
  'invoice.to-job': 'Where your job stands',
  'mail.invoice.subject': 'Invoice {number} from {shop}: {title}',
  'mail.invoice.body':
    'Here is invoice {number} over {total}, due {due}. It is attached, and can be paid online.',
  'mail.invoice.nothing':
    'Here is the final invoice {number}. All of it has been invoiced before: nothing more is to be paid for it.',
  'mail.invoice.button': 'See and pay the invoice',
  'mail.receipt.subject': 'Received: {amount} for invoice {number} of {shop}',
  'mail.receipt.body': '{shop} received {amount} on {date} for invoice {number}, {title}. Thank you.',
  'mail.receipt.open': 'Still open on it: {balance}.',
  'mail.receipt.settled': 'The invoice is paid.',
  'mail.paid-on-void.subject': '{amount} received for invoice {number}, which is void',
  'mail.paid-on-void.body':
    '{customer} paid {amount} by card for invoice {number} in the moment in which it was voided. The payment is recorded.',
  'mail.paid-on-void.next':
    'Give it back at your card service, or agree with the customer what it pays for. Nothing is done by itself.',
  'mail.paid-on-void.button': 'Open the money page',
  'pay.paid.title': 'Paid. Thank you.',
  'pay.paid.text': 'Your payment for invoice {number} has arrived. A receipt is on its way by mail.',
  'pay.pending.title': 'On its way',
  'pay.pending.text':
    'Your payment for invoice {number} is being settled. This can take a few days; a receipt follows by mail.',
  'pay.open.title': 'Not paid yet',
  'pay.open.text': 'Nothing was taken for invoice {number}. You can go back and pay it.',
  'pay.failed.title': 'The payment did not go through',
  'pay.failed.text': 'Nothing was taken for invoice {number}. Try again, or ask {shop} for another way.',
  'pay.expired.title': 'This payment page has run out',
  'pay.expired.text':
    'Nothing was taken for invoice {number}. Open the invoice again from your mail and start anew.',
  'pay.back': 'To your job',
} as const;
