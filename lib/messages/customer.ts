/** The customer's part of the catalogue: what their pages load in the browser, and nothing of the engine's texts. */
import { catalogueOf } from './catalogue';
import { jobs } from './en/jobs';
import { quotes } from './en/quotes';

const catalogue = catalogueOf({ ...quotes, ...jobs });

export type CustomerMessageKey = (typeof catalogue.keys)[number];

export const message = catalogue.message;
