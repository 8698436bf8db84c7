import { hash, verify } from '@node-rs/argon2';

/** OWASP's least costly setting of argon2id: 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** A salted argon2id hash in PHC form. */
export const hashPassword = (password: string): Promise<string> => hash(password, COST);

/** Computed once: what an unknown account is compared with, so that it takes as long as a known one. */
let nobody: Promise<string> | undefined;

/** Whether the password is the one behind the hash; without a hash the same work is done, and the answer is no. */
export async function isPassword(passwordHash: string | undefined, password: string): Promise<boolean> {
  nobody ??= hashPassword('nobody has this password');
  const matches = await verify(passwordHash ?? (await nobody), password);
  return matches && passwordHash !== undefined;
}
