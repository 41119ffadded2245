import { fileURLToPath } from 'node:url'
import { defineVitestProject } from '@nuxt/test-utils/config'
import { defineConfig } from 'vitest/config'

const root = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const resolve = { alias: { '#shared': root('./shared'), '~~': root('.'), '~': root('.'), '@': root('.') } }
const pure = (name: string) => ({ resolve, test: { name, include: [`tests/${name}/**/*.test.ts`], environment: 'node' as const, setupFiles: ['tests/helpers/seed.ts'], testTimeout: 20_000 } })
const served = (name: string, retry = 0) => ({
  resolve,
  test: { name, include: [`tests/${name}/**/*.test.ts`], environment: 'node' as const, globalSetup: ['tests/helpers/build.ts'], fileParallelism: false, testTimeout: 60_000, hookTimeout: 120_000, retry },
})

// `nuxt prepare`, the type check and every build empty .nuxt except for its cache; what a mounted page is read from must outlast them.
const mounted = { domEnvironment: 'happy-dom' as const, overrides: { buildDir: '.nuxt/cache/mounted' } }

/**
 * Pure tests run at once; those with a server or a browser share one build and run file by file. A page may be tried twice:
 * on a busy machine it can miss its second, and one that misses it twice is broken.
 */
export default defineConfig({
  test: {
    reporters: ['default', './tests/helpers/tally-reporter.ts'],
    projects: [
      pure('unit'), pure('outside'),
      await defineVitestProject({ test: { name: 'nuxt', include: ['tests/nuxt/**/*.test.ts'], environment: 'nuxt', environmentOptions: { nuxt: mounted } } }),
      served('api'), served('browser', 1),
    ],
  },
})
