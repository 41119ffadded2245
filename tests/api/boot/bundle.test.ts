import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { makersIn } from '../../outside/makers'
import { filesBelow } from '../../unit/codebase/files'

const files = filesBelow('.output/public', /\.js$/)
const holding = (marker: string) => files.filter(file => readFileSync(file, 'utf8').includes(marker))

describe('what the browser is given', () => {
  it('holds nothing of the server or the database', () => {
    expect(files.length).toBeGreaterThan(3)
    // Words of server/utils/database.ts and of db/schema that no bundler can rename.
    expect(['The database is not open yet', 'foreign_key_check', 'password_hash', 'token_hash'].flatMap(holding)).toEqual([])
  })
  it('would be caught: the server\'s own files hold these words', () => {
    const server = filesBelow('.output/server/chunks', /\.mjs$/).map(file => readFileSync(file, 'utf8'))
    expect(server.some(source => source.includes('The database is not open yet'))).toBe(true)
    expect(server.some(source => source.includes('password_hash'))).toBe(true)
  })
  it('has the service worker at its root', () => {
    expect(files).toContain('.output/public/sw.js')
  })
})

describe('names of makers', () => {
  it('stand nowhere in what was built', () => {
    // Without node_modules: what came from other people's packages is theirs to word.
    const built = filesBelow('.output', /\.(m?js|css|json|html|svg|txt|webmanifest)$/)
    expect(built.some(file => file.includes('/server/chunks/'))).toBe(true)
    expect(built.some(file => file.includes('/public/_nuxt/'))).toBe(true)
    expect(built.flatMap(file => makersIn(readFileSync(file, 'utf8')).map(name => `${file}: ${name}`))).toEqual([])
  })
})
