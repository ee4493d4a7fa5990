import { createHash, randomBytes } from 'node:crypto';

/** A fresh secret of 256 bits for a link or a token, in base64url. */
export function makeSecret(): string {
  return randomBytes(32).toString('base64url');
}

/** What is stored of a secret: its SHA-256. The secret itself has too much entropy to need a slow hash. */
export function hashSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}
