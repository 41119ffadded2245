import { join } from 'node:path'
import { build } from 'vite'
import type { BuildOptions } from 'vite'

/** Bundles one file by itself, apart from Nuxt's own builds, whose configuration it does not take over. */
export async function ownBundle(rootDir: string, options: BuildOptions): Promise<void> {
  await build({ configFile: false, root: rootDir, logLevel: 'warn', publicDir: false, resolve: { alias: { '#shared': join(rootDir, 'shared') } }, build: options })
}
