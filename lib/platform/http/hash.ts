/** Hashes over bytes and over canonical JSON (RFC 8785). */
import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import canonicalize from 'canonicalize';

export function sha256(data: string | Uint8Array): string {
  return createHash('sha256').update(data).digest('hex');
}

export function hmacSha256(key: string, data: string): Buffer {
  return createHmac('sha256', key).update(data).digest();
}

/** RFC 8785 text. @throws when the value has no JSON form. */
export function canonical(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new Error('This value has no JSON form.');
  return text;
}

export function equalText(a: string, b: string): boolean {
  const left = Buffer.from(a);
  const right = Buffer.from(b);
  return left.length === right.length && timingSafeEqual(left, right);
}
