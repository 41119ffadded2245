import { join } from 'node:path'
import { defineNuxtModule } from '@nuxt/kit'
import { ownBundle } from './own-bundle'

/**
 * Bundles `server/planner/worker.ts` by itself and lays it beside the built server, where `server/utils/planRunner.ts`
 * starts it. Nitro does not bundle what `new Worker(new URL(...))` names; as a second entry of Nitro's own bundle it
 * shared a chunk with the server, and every worker started the whole server once more. In development there is none:
 * the runner plans in its own thread.
 */
export default defineNuxtModule({
  meta: { name: 'stillwet:planner-worker' },
  setup(_options, nuxt) {
    if (nuxt.options._prepare || nuxt.options.dev) return
    nuxt.hook('nitro:init', (nitro) => {
      nitro.hooks.hook('compiled', async () => {
        await ownBundle(nuxt.options.rootDir, {
          outDir: nitro.options.output.serverDir,
          emptyOutDir: false,
          minify: false,
          target: 'node20',
          rollupOptions: { external: [/^node:/] },
          lib: { entry: join(nuxt.options.rootDir, 'server/planner/worker.ts'), formats: ['es'], fileName: () => 'planner-worker.mjs' },
        })
      })
    })
  },
})
