import { relative, resolve } from 'node:path'
import type { Plugin } from 'vite'

const forbidden = ['server', 'db']

/**
 * Refuses server code in the browser's bundle. Nuxt by itself lets a page import `db/` or `server/`
 * and ships it silently; a type-only import is erased before this and stays allowed.
 */
export function importGuard(root: string): Plugin {
  return {
    name: 'stillwet:import-guard',
    enforce: 'pre',
    applyToEnvironment: environment => environment.name === 'client',
    transform(_code, id) {
      const path = relative(resolve(root), id.split('?')[0] ?? id)
      const folder = path.split(/[\\/]/)[0] ?? ''
      if (forbidden.includes(folder)) this.error(`${path} belongs to the server and must not reach the browser.`)
    },
  }
}
