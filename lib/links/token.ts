/**
 * The customer's key: base64url(HMAC-SHA256(LINK_SECRET, link id and version)). It is never stored: the table
 * holds its SHA-256, and each mail works it out again when it is sent.
 */
import { required } from '@/lib/platform/env';
import { hmacSha256, sha256 } from '@/lib/platform/http/hash';

export function tokenOf(linkId: string, version: number): string {
  return hmacSha256(required('LINK_SECRET'), `customer-link:${linkId}:${version}`).toString('base64url');
}

export const hashOfToken = (token: string): string => sha256(token);

const TOKEN = /^[A-Za-z0-9_-]{43}$/;
export const looksLikeToken = (text: string): boolean => TOKEN.test(text);
