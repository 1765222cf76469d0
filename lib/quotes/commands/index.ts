/** What changes quotes. */
export {
  addSource,
  bringUpToDate,
  type BroughtUpToDate,
  moveLine,
  openDraft,
  removeLine,
  saveLine,
  saveTerms,
} from './draft';
export { resendQuote, type Sent, sendQuote, withdrawQuote } from './send';
export { type AcceptAnswer, acceptQuote, declineQuote, markOpened, recordAcceptance } from './answer';
