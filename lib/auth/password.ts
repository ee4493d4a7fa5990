import { hash, verify } from '@node-rs/argon2';

// OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, two passes, one lane (argon2id is the package's default)
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1, outputLen: 32 } as const;

export function hashPassword(plain: string): Promise<string> {
  return hash(plain, cost);
}

export function verifyPassword(stored: string, plain: string): Promise<boolean> {
  return verify(stored, plain);
}

let decoy: Promise<string> | undefined;

/** Spends the time of a verification where there is no such person, so that the answer's delay does not tell. */
export async function verifyNobody(plain: string): Promise<false> {
  decoy ??= hashPassword('nobody signs in with this sentence');
  await verifyPassword(await decoy, plain);
  return false;
}
