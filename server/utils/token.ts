import { createHash, randomBytes } from 'node:crypto'

/** A secret for a link or a cookie: 256 random bits, and the hash that the database keeps instead of it. */
export function newToken() {
  const token = randomBytes(32).toString('base64url')
  return { token, hash: hashToken(token) }
}

/** SHA-256 suffices: the secret is random, so there is nothing to guess from. */
export const hashToken = (token: string) => createHash('sha256').update(token).digest('hex')
