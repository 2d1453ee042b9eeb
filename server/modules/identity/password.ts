import { hash } from '@node-rs/argon2';

/**
 * argon2id with 19 MiB and two passes, the lower bound of the OWASP password storage cheat sheet (from
 * memory): about 10 ms here, dull for whoever guesses. Algorithm 2 is argon2id in the library's numbering.
 */
const ARGON2ID = { algorithm: 2, memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 } as const;

/** The hash to store; salt and cost are inside it. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, ARGON2ID);
}
