/**
 * The message catalogue: every text of the customer's pages, the crew's sheet, findings, working and mails by its
 * key. How a text is written: catalogue.ts. The customer's pages load their part of it alone: quotes.ts.
 */
import type { ShopSettings } from '@/lib/units/settings';
import { catalogueOf, type MessageValues } from './catalogue';
import { crew } from './en/crew';
import { findings } from './en/findings';
import { benchAndBusFindings, benchAndBusWorking } from './en/findings-bench-and-bus';
import { circuitFindings } from './en/findings-circuits';
import { constantCurrentFindings } from './en/findings-constant-current';
import { lightingFindings, lightingWorking } from './en/findings-lighting';
import { photometryFindings, photometryWorking } from './en/findings-photometry';
import { faultFinderFindings, faultFinderWorking } from './en/findings-fault-finder';
import { retrofitFindings } from './en/findings-retrofit';
import { tapePlanFindings } from './en/findings-tape-plan';
import { jobs } from './en/jobs';
import { labels } from './en/labels';
import { money } from './en/money';
import { people } from './en/people';
import { quotes } from './en/quotes';
import { words } from './en/words';
import { wiring } from './en/wiring';
import { working } from './en/working';

export type { MessageValues } from './catalogue';
export { term } from './terms';

const catalogue = catalogueOf({
  ...quotes,
  ...findings,
  ...working,
  ...crew,
  ...jobs,
  ...people,
  ...money,
  ...circuitFindings,
  ...constantCurrentFindings,
  ...benchAndBusFindings,
  ...benchAndBusWorking,
  ...lightingFindings,
  ...lightingWorking,
  ...photometryFindings,
  ...photometryWorking,
  ...faultFinderFindings,
  ...faultFinderWorking,
  ...retrofitFindings,
  ...tapePlanFindings,
  ...labels,
  ...words,
  ...wiring,
});

export type MessageKey = (typeof catalogue.keys)[number];

export const catalogueKeys = catalogue.keys;
export const messageText = catalogue.text;
export const hasMessage: (key: string) => key is MessageKey = catalogue.has;

/** Fills a text of the catalogue. A placeholder without a value shows as a dash. */
export const message = catalogue.message;

/** For keys that come with data (finding codes, working keys): the fallback is the engine's own English. */
export function messageOr(
  key: string,
  fallback: string,
  values?: MessageValues,
  settings?: ShopSettings,
): string {
  return hasMessage(key) ? message(key, values, settings) : fallback;
}
