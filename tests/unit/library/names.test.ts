import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { makers, makersIn } from '../../outside/makers'

const root = fileURLToPath(new URL('../../..', import.meta.url))
const shipped = ['shared', 'db', 'components', 'composables', 'layouts', 'middleware', 'pages', 'plugins', 'public', 'scripts', 'server', 'service-worker', 'stores', 'app.vue', 'error.vue', 'nuxt.config.ts']
const isText = /\.(ts|mts|mjs|js|vue|css|json|sql|html|svg|txt|md|webmanifest)$/

function filesIn(path: string): string[] {
  if (!existsSync(path)) return []
  if (statSync(path).isFile()) return isText.test(path) ? [path] : []
  return readdirSync(path).flatMap(name => filesIn(join(path, name)))
}

describe('names of makers', () => {
  it('are found where they stand, whole and in any case', () => {
    expect(makersIn('Recoat after 3 h, says minwax.')).toEqual(['Minwax'])
    expect(makersIn('Winsor & Newton, and nobody else')).toEqual(['Winsor & Newton'])
    expect(makersIn('A plaid cloth, a rash of bubbles, 13M and 3Mm')).toEqual([])
    expect(new Set(makers).size).toBe(makers.length)
  })

  it('stand nowhere in what is shipped', () => {
    const files = shipped.flatMap(folder => filesIn(join(root, folder)))
    expect(files.length).toBeGreaterThan(40)
    const found = files.flatMap(file => makersIn(readFileSync(file, 'utf8')).map(name => `${file.slice(root.length)}: ${name}`))
    expect(found).toEqual([])
  })
})
