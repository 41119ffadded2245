import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'

const root = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const alias = { '#shared': root('./shared'), '~~': root('.'), '~': root('.'), '@': root('.') }

/** Pure tests run at once; those with a server or a browser share one build and run file by file. */
export default defineConfig({
  test: {
    projects: [
      { resolve: { alias }, test: { name: 'unit', include: ['tests/unit/**/*.test.ts'], environment: 'node' } },
      { resolve: { alias }, test: { name: 'outside', include: ['tests/outside/**/*.test.ts'], environment: 'node' } },
    ],
  },
})
