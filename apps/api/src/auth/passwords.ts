import { hash, verify } from '@node-rs/argon2';

/** argon2id with 64 MiB and three passes, well above the OWASP minimum of 19 MiB and two passes. */
const COST = { memoryCost: 64 * 1024, timeCost: 3, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, COST);
}

/** Takes as long where there is no such account as where there is. */
export async function passwordHolds(storedHash: string | null, password: string): Promise<boolean> {
  nobodysHash ??= hashPassword('nobody has this password');
  const holds = await verify(storedHash ?? (await nobodysHash), password);
  return storedHash !== null && holds;
}
let nobodysHash: Promise<string> | undefined;
