/** What a shop's figures and papers follow. Used in the browser, on the server and in mails alike. */
export interface ShopSettings {
  /** Which family of standards conductors and circuits are sized by. */
  basis: 'us' | 'iec';
  basisEdition: string;
  units: 'us' | 'metric';
  /** ISO 4217. */
  currency: string;
  locale: 'en-US' | 'en-GB';
  /** IANA name. */
  timeZone: string;
  paper: 'letter' | 'a4';
  taxRounding: 'line' | 'document';
}

export const DEFAULT_SETTINGS: ShopSettings = {
  basis: 'us',
  basisEdition: 'NEC 2023',
  units: 'us',
  currency: 'USD',
  locale: 'en-US',
  timeZone: 'America/New_York',
  paper: 'letter',
  taxRounding: 'document',
};
