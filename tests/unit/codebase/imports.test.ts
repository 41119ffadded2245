import { describe, expect, it } from 'vitest'
import { filesBelow, importsOf, read } from './files'

/** Every import of a group of files that no rule allows, as `file: import`. */
const strays = (files: string[], allowed: (specifier: string, file: string) => boolean) =>
  files.flatMap(file => importsOf(file).filter(specifier => !allowed(specifier, file)).map(specifier => `${file}: ${specifier}`))

const shared = filesBelow('shared', /\.ts$/)
const appFolders = ['components', 'composables', 'layouts', 'middleware', 'pages', 'plugins', 'stores', 'service-worker'].flatMap((folder) => {
  try {
    return filesBelow(folder, /\.(ts|vue)$/)
  }
  catch {
    return []
  }
})

describe('shared/', () => {
  it('imports only itself, zod in schemas and psychrolib in its one wrapper', () => {
    expect(strays(shared, (specifier, file) =>
      specifier.startsWith('#shared/')
      || (specifier === 'zod/mini' && file.startsWith('shared/schemas/'))
      || (specifier === 'psychrolib' && file === 'shared/air/psychrometrics.ts'))).toEqual([])
  })
  it('asks neither the clock nor chance', () => {
    expect(shared.filter(file => /\bDate\.now\(|\bnew Date\(\)|\bMath\.random\(|\bprocess\.\w|\bperformance\.\w/.test(read(file)))).toEqual([])
  })
})

describe('server/planner/', () => {
  it('imports only itself and shared/, and the worker alone knows threads', () => {
    expect(strays(filesBelow('server/planner', /\.ts$/), (specifier, file) =>
      specifier.startsWith('#shared/') || specifier.startsWith('./') || specifier.startsWith('~~/server/planner/')
      || (specifier === 'node:worker_threads' && /worker/i.test(file)))).toEqual([])
  })
})

describe('the app', () => {
  it('never imports the server or the database', () => {
    expect(appFolders.length).toBeGreaterThan(10)
    expect(strays(appFolders, specifier => !/(^|\/)(server|db)\//.test(specifier) && !specifier.startsWith('#server'))).toEqual([])
  })
})

describe('the list of imports', () => {
  it('sees plain, side-effect, re-exported and dynamic ones, and lets types pass', () => {
    // This file itself: vitest and the reader beside it.
    expect(importsOf('tests/unit/codebase/imports.test.ts')).toEqual(['vitest', './files'])
    expect(importsOf('db/schema/index.ts')).toContain('./studio')
    expect(importsOf('db/schema/columns.ts')).toEqual(['drizzle-orm', 'drizzle-orm/sqlite-core'])
  })
})
