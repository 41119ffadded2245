import { randomBytes, scrypt, timingSafeEqual } from 'node:crypto'

// 2^15 rounds over 32 MB: about a tenth of a second here, which a person does not notice and a guesser does.
const cost = { N: 2 ** 15, r: 8, p: 1, maxmem: 64 * 2 ** 20 }
const length = 32

const derive = (password: string, salt: Buffer) => new Promise<Buffer>((resolve, reject) => {
  scrypt(password.normalize('NFKC'), salt, length, cost, (error, key) => error ? reject(error) : resolve(key))
})

/** Hashes a password as `scrypt$salt$key`, both in base64url. */
export async function makePasswordHash(password: string): Promise<string> {
  const salt = randomBytes(16)
  const key = await derive(password, salt)
  return `scrypt$${salt.toString('base64url')}$${key.toString('base64url')}`
}

/**
 * Whether a password fits a hash. Without a hash (no such person) it works just as long and answers no,
 * so that the time taken does not tell which addresses are known.
 */
export async function passwordFits(password: string, hash: string | null): Promise<boolean> {
  const [scheme, salt, key] = (hash ?? '').split('$')
  const known = scheme === 'scrypt' && salt !== undefined && key !== undefined
  const found = await derive(password, Buffer.from(salt ?? 'no such person', 'base64url'))
  const wanted = Buffer.from(key ?? '', 'base64url')
  return known && wanted.length === found.length && timingSafeEqual(found, wanted)
}
