import { sha256 } from '@noble/hashes/sha256';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils';
import canonicalize from 'canonicalize';

/**
 * Hashes a document in its canonical form, so that the same content has the same hash whatever the order of its keys.
 *
 * @param document - Any JSON value.
 * @returns SHA-256 of the canonical JSON, 64 hexadecimal digits.
 * @source RFC 8785, JSON Canonicalization Scheme; FIPS 180-4.
 */
export function sectionHash(document: unknown): string {
  return bytesToHex(sha256(utf8ToBytes(canonicalize(document) ?? 'null')));
}
