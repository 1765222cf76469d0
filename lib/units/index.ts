/** The one formatter and parser for units, money and dates. */
export * from './figures';
export * from './length';
export * from './money';
export * from './settings';
export * from './time';
