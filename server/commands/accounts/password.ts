import { compare, hash } from 'bcryptjs';
import { limits } from '@/shared/limits';

/** bcrypt hash of a password of at most 72 bytes, which the contracts see to. */
export function hashPassword(password: string, cost: number): Promise<string> {
  return hash(password, cost);
}

/**
 * True when the password belongs to the hash. Without a hash (nobody has the address) it takes as long, and is false.
 * bcrypt would cut a longer password and might find it right, so it is refused after the same work.
 */
export async function passwordMatches(password: string, passwordHash: string | null, cost: number): Promise<boolean> {
  const matches = await compare(password, passwordHash ?? `$2b$${String(cost).padStart(2, '0')}$${'.'.repeat(53)}`);
  return matches && passwordHash !== null && Buffer.byteLength(password) <= limits.passwordMaxBytes;
}
