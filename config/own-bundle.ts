import { join } from 'node:path'
import { build } from 'vite'
import type { BuildOptions } from 'vite'

/** Bundles one file by itself, apart from Nuxt's own builds, whose configuration it does not take over. */
export async function ownBundle(rootDir: string, options: BuildOptions): Promise<void> {
  await build({ configFile: false, root: rootDir, logLevel: 'warn', publicDir: false, resolve: { alias: { '#shared': join(rootDir, 'shared'), '~~': rootDir } }, build: options })
}

/** The threads that work beside the server, by the name of their bundle. */
export const workers = { 'planner-worker': 'server/planner/worker.ts', 'asking-worker': 'server/asking/worker.ts' } as const

/** Bundles one worker into a folder, as `NAME.mjs`. */
export function workerBundle(rootDir: string, name: keyof typeof workers, outDir: string): Promise<void> {
  return ownBundle(rootDir, {
    outDir,
    emptyOutDir: false,
    minify: false,
    target: 'node20',
    rollupOptions: {
      // The database's binary cannot be bundled; Nitro lays it beside the server for its own use.
      external: [/^node:/, 'better-sqlite3'],
      // A comment of zod's that no tree is shaken by.
      onwarn: (warning, warn) => warning.code === 'INVALID_ANNOTATION' || warn(warning),
    },
    lib: { entry: join(rootDir, workers[name]), formats: ['es'], fileName: () => `${name}.mjs` },
  })
}
