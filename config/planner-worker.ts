import { join } from 'node:path'
import type { Plugin } from 'rollup'

/**
 * Nitro does not bundle what `new Worker(new URL(...))` names, so the worker is an entry of its own in the server's build, beside the server's:
 * `server/utils/planRunner.ts` starts it from there. Only for production (`$production.nitro.rollupConfig.plugins`): in development a second
 * entry breaks Nitro's bundle, and the runner plans in its own thread.
 */
export function plannerWorkerPlugin(root: string): Plugin {
  return {
    name: 'stillwet:planner-worker',
    buildStart() {
      this.emitFile({ type: 'chunk', id: join(root, 'server/planner/worker.ts'), fileName: 'planner-worker.mjs' })
    },
  }
}
