// node scripts/ensure.mjs build|browser
// Plain Node without packages: it runs before there are any. Installs what package-lock.json asks for, then
// builds the server when a source is newer than the last build, or finds a browser for the tests.
import { execFileSync } from 'node:child_process'
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs'
import { join } from 'node:path'

const run = (command, args, options = {}) => execFileSync(command, args, { stdio: 'inherit', ...options })

// Only what ends up in the build: a changed test or page of documentation rebuilds nothing.
const sources = ['app.vue', 'error.vue', 'nuxt.config.ts', 'tailwind.config.ts', 'package-lock.json', 'assets', 'components', 'composables', 'config', 'db', 'layouts', 'middleware', 'pages', 'plugins', 'public', 'server', 'service-worker', 'shared', 'stores']

function newest(path) {
  if (!existsSync(path)) return 0
  const stat = statSync(path)
  if (!stat.isDirectory()) return stat.mtimeMs
  // The folder's own time tells of a file that was taken away.
  return Math.max(stat.mtimeMs, ...readdirSync(path).map(name => newest(join(path, name))))
}

// Compared by content: a fresh checkout gives the lock file a new time and would install everything again.
function isInstalled() {
  const installed = 'node_modules/.package-lock.json'
  if (!existsSync(installed)) return false
  const [wanted, found] = ['package-lock.json', installed].map(file => JSON.parse(readFileSync(file, 'utf8')).packages)
  return Object.entries(wanted).every(([path, { version, optional }]) => path === '' || optional || found[path]?.version === version)
}

export function ensurePackages() {
  if (!isInstalled()) run('npm', ['ci', '--no-audit', '--no-fund'])
}

export function ensureBuild() {
  const built = '.output/nitro.json'
  if (existsSync(built) && Math.max(...sources.map(newest)) <= statSync(built).mtimeMs) return
  // The same build whoever asks: a test runner's variables would make it another one.
  const env = { ...process.env, NODE_ENV: 'production', NUXT_TELEMETRY_DISABLED: '1' }
  delete env.VITEST
  delete env.TEST
  run(process.execPath, ['node_modules/nuxt/bin/nuxt.mjs', 'build'], { env })
}

export function findBrowser() {
  const candidates = [process.env.CHROMIUM_PATH, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome']
  return candidates.find(path => path && existsSync(path)) ?? null
}

function ensureBrowser() {
  if (findBrowser()) return
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get')) {
    console.error('The tests need Chromium: install it (on Debian: sudo apt-get install chromium) or set CHROMIUM_PATH to one.')
    process.exit(1)
  }
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  run('apt-get', ['update'], { env })
  run('apt-get', ['install', '-y', '--no-install-recommends', 'chromium'], { env })
}

const wanted = process.argv[1]?.endsWith('ensure.mjs') ? process.argv[2] : null
if (wanted !== null) {
  if (!['build', 'browser'].includes(wanted)) {
    console.error('Usage: node scripts/ensure.mjs build|browser')
    process.exit(2)
  }
  ensurePackages()
  if (wanted === 'build') ensureBuild()
  else ensureBrowser()
}
