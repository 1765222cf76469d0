/**
 * The permission table: every page, route and action, and who may. A guard reads the build's manifests and fails on
 * one that is missing here, and asks the running server as each role whether the answer is the expected one.
 */
import type { Permission } from './policy';

export type Access =
  /** Anybody, signed in or not. */
  | 'public'
  /** Any signed-in person, in no shop. */
  | 'signed-in'
  /** Whoever holds a customer link (its cookie, or the address in the mail). */
  | 'link'
  /** The card service, by its signature. */
  | 'signature'
  | Permission;

/** By the build's app path, without `/page` or `/route`. */
export const PLACES: Readonly<Record<string, Access>> = {
  '/_global-error': 'public',
  '/_not-found': 'public',
  '/': 'public',
  '/icon.svg': 'public',
  '/sw.js': 'public',
  '/offline': 'public',
  '/sign-in': 'public',
  '/forgotten': 'public',
  '/new-password/[token]': 'public',
  '/api/auth/[...nextauth]': 'public',
  '/api/v1/health': 'public',
  '/api/v1/engine/[name]': 'signed-in',
  '/api/v1/shops/[shop]/documents/[document]/pdf': 'price:see',
  '/api/v1/shops/[shop]/jobs/[job]/events': 'work:edit',
  '/api/v1/shops/[shop]/jobs/[job]/survey': 'work:edit',
  '/api/v1/shops/[shop]/jobs/[job]/photos': 'work:edit',
  '/api/v1/shops/[shop]/jobs/[job]/photos/[photo]': 'work:edit',
  '/api/v1/shops/[shop]/sheets/[sheet]/sheet': 'sheet:write',
  '/api/v1/shops/[shop]/sheets/[sheet]/events': 'sheet:write',
  '/l/[link]': 'link',
  '/l/[link]/accept': 'link',
  '/l/[link]/decline': 'link',
  '/l/[link]/documents/[document]': 'link',
  '/l/[link]/opened': 'link',
  '/l/[link]/invoices/[invoice]': 'link',
  '/l/[link]/invoices/[invoice]/checkout': 'link',
  '/l/open/[token]': 'public',
  '/pay/[session]': 'public',
  '/api/v1/stripe/webhook': 'signature',
  '/l/wait': 'public',
  '/s/[shop]': 'shop:enter',
  '/s/[shop]/customers': 'job:see',
  '/s/[shop]/customers/new': 'customer:edit',
  '/s/[shop]/customers/[customer]': 'customer:edit',
  '/s/[shop]/jobs': 'job:see',
  '/s/[shop]/jobs/new': 'job:open',
  '/s/[shop]/jobs/[job]': 'job:see',
  '/s/[shop]/jobs/[job]/survey': 'work:edit',
  '/s/[shop]/jobs/[job]/circuits': 'work:edit',
  '/s/[shop]/jobs/[job]/circuits/[circuit]': 'work:edit',
  '/s/[shop]/jobs/[job]/savings': 'price:see',
  '/s/[shop]/jobs/[job]/quote': 'price:see',
  '/s/[shop]/jobs/[job]/quote/preview': 'price:see',
  '/s/[shop]/jobs/[job]/quote/[document]': 'price:see',
  '/s/[shop]/jobs/[job]/money': 'price:see',
  '/s/[shop]/jobs/[job]/install': 'job:see',
  '/s/[shop]/visits': 'sheet:write',
  '/s/[shop]/sheets/[sheet]': 'sheet:write',
  '/s/[shop]/parts': 'parts:see',
  '/s/[shop]/parts/new': 'parts:edit',
  '/s/[shop]/parts/[part]': 'parts:edit',
  '/s/[shop]/people': 'people:edit',
  '/s/[shop]/settings': 'settings:edit',
};

/** By file and exported name, as the build's server-reference manifest has them. */
export const ACTIONS: Readonly<Record<string, Access>> = {
  'lib/customers/actions.ts#saveCustomer': 'customer:edit',
  'lib/savings/actions.ts#saveSaving': 'work:edit',
  'lib/invoices/actions.ts#issueFinal': 'invoice:edit',
  'lib/invoices/actions.ts#issueDeposit': 'invoice:edit',
  'lib/invoices/actions.ts#voidOne': 'payment:refund',
  'lib/payments/actions.ts#recordPayment': 'payment:record',
  'lib/jobs/actions.ts#createJob': 'job:open',
  'lib/jobs/actions.ts#finishSurvey': 'work:edit',
  'lib/jobs/actions.ts#changeDepositRule': 'invoice:edit',
  'lib/jobs/actions.ts#closeJob': 'invoice:edit',
  'lib/links/actions.ts#closeLink': 'job:open',
  'lib/parts/actions.ts#savePart': 'parts:edit',
  'lib/people/actions.ts#addPerson': 'people:edit',
  'lib/people/actions.ts#changePerson': 'people:edit',
  'lib/people/actions.ts#removePerson': 'people:edit',
  'lib/people/actions.ts#askForNewPassword': 'public',
  'lib/people/actions.ts#setNewPassword': 'public',
  'lib/quotes/actions.ts#openDraft': 'work:edit',
  'lib/quotes/actions.ts#saveLine': 'work:edit',
  'lib/quotes/actions.ts#removeLine': 'work:edit',
  'lib/quotes/actions.ts#moveLine': 'work:edit',
  'lib/quotes/actions.ts#addSource': 'work:edit',
  'lib/quotes/actions.ts#bringUpToDate': 'work:edit',
  'lib/quotes/actions.ts#saveTerms': 'work:edit',
  'lib/quotes/actions.ts#sendQuote': 'quote:send',
  'lib/quotes/actions.ts#resendQuote': 'quote:send',
  'lib/quotes/actions.ts#withdrawQuote': 'quote:send',
  'lib/quotes/actions.ts#recordAcceptance': 'job:open',
  'lib/visits/actions.ts#saveVisit': 'visit:edit',
  'lib/visits/actions.ts#cancelVisit': 'visit:edit',
  'lib/wiring/actions.ts#releaseSheet': 'sheet:release',
  'lib/shops/actions.ts#saveSettings': 'settings:edit',
  'lib/surveys/actions.ts#overrideFinding': 'work:edit',
};
