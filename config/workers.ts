import { defineNuxtModule } from '@nuxt/kit'
import { workerBundle, workers } from './own-bundle'

/**
 * Bundles the workers by themselves and lays them beside the built server, where `server/utils/planRunner.ts` and `server/utils/asker.ts`
 * start them. Nitro does not bundle what `new Worker(new URL(...))` names; as a second entry of Nitro's own bundle it
 * shared a chunk with the server, and every worker started the whole server once more. In development there is none:
 * both work in their own thread.
 */
export default defineNuxtModule({
  meta: { name: 'stillwet:workers' },
  setup(_options, nuxt) {
    if (nuxt.options._prepare || nuxt.options.dev) return
    nuxt.hook('nitro:init', (nitro) => {
      nitro.hooks.hook('compiled', async () => {
        for (const name of Object.keys(workers) as (keyof typeof workers)[]) await workerBundle(nuxt.options.rootDir, name, nitro.options.output.serverDir)
      })
    })
  },
})
