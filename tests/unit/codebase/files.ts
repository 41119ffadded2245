import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'

const skipped = new Set(['node_modules', '.nuxt', '.output', '.data', '.git', 'coverage', 'meta'])

/** Paths of all files below a folder of the project, from its root, with slashes. */
export function filesBelow(folder: string, ending: RegExp): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    if (skipped.has(entry.name)) return []
    const path = join(folder, entry.name)
    return entry.isDirectory() ? filesBelow(path, ending) : ending.test(entry.name) ? [path.replaceAll('\\', '/')] : []
  })
}

export const read = (path: string) => readFileSync(path, 'utf8')

/** What a file imports at run time: type-only imports are erased and do not count. */
export function importsOf(path: string): string[] {
  const source = read(path)
  const statements = source.matchAll(/^\s*(?:import|export)\s+(?!type\b)(?:[\w*{][^'"]*?\bfrom\s*)?['"]([^'"]+)['"]/gm)
  const calls = source.matchAll(/\bimport\(\s*['"]([^'"]+)['"]\s*\)/g)
  return [...statements, ...calls].map(([, specifier = '']) => specifier)
}
