'use server';
import { shopAction } from '@/lib/access/action';
import {
  addSource as addSourceCommand,
  bringUpToDate as bringUpToDateCommand,
  moveLine as moveLineCommand,
  openDraft as openDraftCommand,
  recordAcceptance as recordAcceptanceCommand,
  removeLine as removeLineCommand,
  resendQuote as resendQuoteCommand,
  saveLine as saveLineCommand,
  saveTerms as saveTermsCommand,
  sendQuote as sendQuoteCommand,
  withdrawQuote as withdrawQuoteCommand,
} from './commands';
import {
  type AddSourceInput,
  addSourceForm,
  type LineForm,
  lineForm,
  type LineRefInput,
  lineRefForm,
  type MoveLineInput,
  moveLineForm,
  type OfficeAcceptanceForm,
  officeAcceptanceForm,
  type OpenDraftInput,
  openDraftForm,
  type ResendForm,
  resendForm,
  type SendForm,
  sendForm,
  type TermsForm,
  termsForm,
  type WithdrawForm,
  withdrawForm,
} from './schema/forms';

interface Meta {
  idempotencyKey?: string;
}

const open = shopAction({
  name: 'quotes.openDraft',
  permission: 'work:edit',
  schema: openDraftForm,
  run: (actor, input) => openDraftCommand(actor, input),
});
const line = shopAction({
  name: 'quotes.saveLine',
  permission: 'work:edit',
  schema: lineForm,
  run: saveLineCommand,
});
const remove = shopAction({
  name: 'quotes.removeLine',
  permission: 'work:edit',
  schema: lineRefForm,
  run: removeLineCommand,
});
const move = shopAction({
  name: 'quotes.moveLine',
  permission: 'work:edit',
  schema: moveLineForm,
  run: moveLineCommand,
});
const source = shopAction({
  name: 'quotes.addSource',
  permission: 'work:edit',
  schema: addSourceForm,
  run: (actor, input) => addSourceCommand(actor, input),
});
const fresh = shopAction({
  name: 'quotes.bringUpToDate',
  permission: 'work:edit',
  schema: openDraftForm,
  run: (actor, input) => bringUpToDateCommand(actor, input),
});
const terms = shopAction({
  name: 'quotes.saveTerms',
  permission: 'work:edit',
  schema: termsForm,
  run: saveTermsCommand,
});
const send = shopAction({
  name: 'quotes.sendQuote',
  permission: 'quote:send',
  schema: sendForm,
  // Makes and stores the PDF first, and opens its own transaction after.
  outsideTransaction: true,
  run: (actor, input) => sendQuoteCommand(actor, input),
});
const resend = shopAction({
  name: 'quotes.resendQuote',
  permission: 'quote:send',
  schema: resendForm,
  run: resendQuoteCommand,
});
const withdraw = shopAction({
  name: 'quotes.withdrawQuote',
  permission: 'quote:send',
  schema: withdrawForm,
  run: withdrawQuoteCommand,
});
const record = shopAction({
  name: 'quotes.recordAcceptance',
  permission: 'job:open',
  schema: officeAcceptanceForm,
  run: recordAcceptanceCommand,
});

export async function openDraft(shopId: string, input: OpenDraftInput, meta?: Meta) {
  return open(shopId, input, meta);
}
export async function saveLine(shopId: string, input: LineForm, meta?: Meta) {
  return line(shopId, input, meta);
}
export async function removeLine(shopId: string, input: LineRefInput, meta?: Meta) {
  return remove(shopId, input, meta);
}
export async function moveLine(shopId: string, input: MoveLineInput, meta?: Meta) {
  return move(shopId, input, meta);
}
export async function addSource(shopId: string, input: AddSourceInput, meta?: Meta) {
  return source(shopId, input, meta);
}
export async function bringUpToDate(shopId: string, input: OpenDraftInput, meta?: Meta) {
  return fresh(shopId, input, meta);
}
export async function saveTerms(shopId: string, input: TermsForm, meta?: Meta) {
  return terms(shopId, input, meta);
}
export async function sendQuote(shopId: string, input: SendForm, meta?: Meta) {
  return send(shopId, input, meta);
}
export async function resendQuote(shopId: string, input: ResendForm, meta?: Meta) {
  return resend(shopId, input, meta);
}
export async function withdrawQuote(shopId: string, input: WithdrawForm, meta?: Meta) {
  return withdraw(shopId, input, meta);
}
export async function recordAcceptance(shopId: string, input: OfficeAcceptanceForm, meta?: Meta) {
  return record(shopId, input, meta);
}
