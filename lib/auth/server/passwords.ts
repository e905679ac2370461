import { hash, verify } from '@node-rs/argon2'

/*
 * Argon2id with the parameters of the OWASP password storage cheat sheet (19 MiB, two passes, one lane), which are the
 * package's own defaults; spelled out, since a stored hash has to go on meaning what it meant.
 */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

export const hashPassword = (password: string): Promise<string> => hash(password, COST)

let decoy: Promise<string> | undefined

/** Checks a password; where there is no such account it works as long, so that nobody learns which addresses exist. */
export async function verifyPassword(passwordHash: string | undefined, password: string): Promise<boolean> {
  decoy ??= hashPassword('no account has this one')
  const matches = await verify(passwordHash ?? (await decoy), password)
  return matches && passwordHash !== undefined
}
