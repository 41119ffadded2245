import { join } from 'node:path'
import { defineNuxtModule } from '@nuxt/kit'
import { ownBundle } from './own-bundle'

/**
 * Builds `service-worker/sw.ts` into one classic script served as /sw.js. A precaching module was refused:
 * the board is useless without the studio's word, so nothing of the shell is kept offline; the page that says so is made by the worker.
 */
export default defineNuxtModule({
  meta: { name: 'stillwet:service-worker' },
  setup(_options, nuxt) {
    if (nuxt.options._prepare) return
    const out = join(nuxt.options.buildDir, 'service-worker')
    nuxt.hook('nitro:config', (nitro) => {
      nitro.publicAssets = [...nitro.publicAssets ?? [], { dir: out, baseURL: '/', maxAge: 0 }]
    })
    // Not earlier: Nuxt empties its build folder just before.
    nuxt.hook('build:before', async () => {
      await ownBundle(nuxt.options.rootDir, {
        outDir: out,
        emptyOutDir: true,
        lib: { entry: join(nuxt.options.rootDir, 'service-worker/sw.ts'), formats: ['iife'], name: 'stillwetWorker', fileName: () => 'sw.js' },
      })
    })
  },
})
