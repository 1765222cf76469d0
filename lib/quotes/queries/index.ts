/** What other domains and pages read of quotes. */
export { customerView, previewView, sentView } from './customer';
export { deskQuote } from './desk';
export { draftState, findDraft, type DraftState } from './draft';
export {
  acceptanceOf,
  acceptanceOfJob,
  acceptedRevision,
  type AcceptanceRow,
  contentOf,
  quoteForCustomer,
  type QuoteForReader,
  type SentQuote,
  sentQuotes,
} from './sent';
