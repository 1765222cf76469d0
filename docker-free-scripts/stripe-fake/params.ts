/** Reads a form's parameters and refuses what nobody asked for, with the parameter's full name. */
import { badParam, missingParam, unknownParam } from './errors';
import type { FormObject, FormValue } from './form';

export class Params {
  private readonly read = new Set<string>();

  constructor(
    private readonly form: FormObject,
    private readonly prefix = '',
  ) {}

  private name(key: string): string {
    return this.prefix ? `${this.prefix}[${key}]` : key;
  }

  private take(key: string): FormValue | undefined {
    this.read.add(key);
    const value = this.form[key];
    return value === '' ? undefined : value;
  }

  text(key: string, maxLength = 5_000): string | undefined {
    const value = this.take(key);
    if (value === undefined) return undefined;
    if (typeof value !== 'string') throw badParam(this.name(key), `Invalid string: ${this.name(key)}`);
    if (value.length > maxLength)
      throw badParam(
        this.name(key),
        `Invalid string: ${this.name(key)} must be at most ${maxLength} characters`,
        'parameter_invalid_string_length',
      );
    return value;
  }

  needText(key: string, maxLength?: number): string {
    const value = this.text(key, maxLength);
    if (value === undefined) throw missingParam(this.name(key));
    return value;
  }

  integer(key: string): number | undefined {
    const text = this.text(key);
    if (text === undefined) return undefined;
    const value = Number(text);
    if (!/^-?\d+$/.test(text) || !Number.isSafeInteger(value))
      throw badParam(this.name(key), `Invalid integer: ${text}`, 'parameter_invalid_integer');
    return value;
  }

  needInteger(key: string): number {
    const value = this.integer(key);
    if (value === undefined) throw missingParam(this.name(key));
    return value;
  }

  oneOf<T extends string>(key: string, allowed: readonly T[]): T | undefined {
    const text = this.text(key);
    if (text === undefined || (allowed as readonly string[]).includes(text)) return text as T | undefined;
    throw badParam(this.name(key), `Invalid ${this.name(key)}: must be one of ${allowed.join(', ')}`);
  }

  group(key: string): Params | undefined {
    const value = this.take(key);
    if (value === undefined) return undefined;
    if (typeof value === 'string') throw badParam(this.name(key), `Invalid object: ${this.name(key)}`);
    return new Params(value, this.name(key));
  }

  needGroup(key: string): Params {
    const group = this.group(key);
    if (!group) throw missingParam(this.name(key));
    return group;
  }

  /** The items of an array, in the order of their indexes. */
  private entries(key: string): [name: string, value: FormValue][] {
    const value = this.take(key);
    if (value === undefined) return [];
    const keys = typeof value === 'string' ? [] : Object.keys(value);
    if (typeof value === 'string' || keys.some((index) => !/^\d{1,4}$/.test(index)))
      throw badParam(this.name(key), `Invalid array: ${this.name(key)}`);
    return keys
      .sort((left, right) => Number(left) - Number(right))
      .map((index) => [`${this.name(key)}[${index}]`, value[index] as FormValue]);
  }

  groups(key: string): Params[] {
    return this.entries(key).map(([name, value]) => {
      if (typeof value === 'string') throw badParam(name, `Invalid object: ${name}`);
      return new Params(value, name);
    });
  }

  texts(key: string): string[] {
    return this.entries(key).map(([name, value]) => {
      if (typeof value !== 'string') throw badParam(name, `Invalid string: ${name}`);
      return value;
    });
  }

  /** At most 50 keys of 40 characters with 500 characters each: https://docs.stripe.com/api/metadata */
  metadata(key = 'metadata'): Record<string, string> {
    const value = this.take(key);
    if (value === undefined) return {};
    const name = this.name(key);
    if (typeof value === 'string') throw badParam(name, `Invalid object: ${name}`);
    const entries = Object.entries(value);
    if (entries.length > 50) throw badParam(name, `Metadata can have at most 50 keys: ${name}`);
    for (const [each, text] of entries)
      if (typeof text !== 'string' || each.length > 40 || text.length > 500)
        throw badParam(`${name}[${each}]`, 'Metadata keys have up to 40, values up to 500 characters');
    return Object.fromEntries(entries) as Record<string, string>;
  }

  /** @throws {ApiError} for the first parameter that was not read */
  end(): void {
    const left = Object.keys(this.form).find((key) => !this.read.has(key));
    if (left !== undefined) throw unknownParam(this.name(left));
  }
}
