/** The one formatter and parser for units, money and dates. */
export * from './figures';
export * from './length';
export * from './light';
export * from './money';
export * from './parse-figures';
export type { Parsed } from './parsed';
export * from './settings';
export * from './time';
export * from './wire';
