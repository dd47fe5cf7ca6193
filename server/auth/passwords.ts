import { hash, verify } from '@node-rs/argon2'

/**
 * argon2id with the parameters of OWASP's password storage recommendations (19 MiB, two passes): the library's defaults.
 */
export function hashPassword(password: string): Promise<string> {
  return hash(password)
}

/** Verified against when there is no account, so that an unknown address takes as long to refuse as a wrong password. */
const nobody = hash('nobody has this password, and nobody ever will')

/** @param passwordHash - null when there is no such account, or none that can sign in */
export async function passwordIs(passwordHash: string | null, password: string): Promise<boolean> {
  const matches = await verify(passwordHash ?? (await nobody), password)
  return matches && passwordHash !== null
}
