// node tests/helpers/blank-build.mjs FOLDER
// The product's own build with one blank page for its pages. Prints the scripts that page loads, as a JSON list of paths.
import { join } from 'node:path'
import { buildNuxt, loadNuxt } from '@nuxt/kit'

const [folder] = process.argv.slice(2)
if (!folder) {
  console.error('Usage: node tests/helpers/blank-build.mjs FOLDER')
  process.exit(2)
}
const srcDir = join(process.cwd(), 'tests/fixtures/blank')
const nuxt = await loadNuxt({ cwd: process.cwd(), overrides: { srcDir, buildDir: folder, nitro: { output: { dir: join(folder, 'output') } } } })

/** A chunk and all it imports at once. */
function withImports(manifest, key, found = new Set()) {
  if (found.has(key)) return found
  found.add(key)
  for (const each of manifest[key].imports ?? []) withImports(manifest, each, found)
  return found
}

// The client half is all that is measured: the build ends before the server's half.
nuxt.hook('build:manifest', (manifest) => {
  const roots = Object.keys(manifest).filter(key => manifest[key].isEntry || key.endsWith('fixtures/blank/pages/index.vue'))
  const keys = new Set(roots.flatMap(key => [...withImports(manifest, key)]))
  const files = [...keys].map(key => manifest[key].file).filter(file => file.endsWith('.js'))
  process.stdout.write(`\n${JSON.stringify(files.map(file => join(folder, 'dist/client/_nuxt', file)))}\n`)
  process.exit(0)
})
await buildNuxt(nuxt)
