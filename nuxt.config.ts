import { join } from 'node:path'
import { importGuard } from './config/import-guard'
import { security } from './config/security'

export default defineNuxtConfig({
  compatibilityDate: '2026-05-01',
  telemetry: false,
  devtools: { enabled: false },
  modules: ['@pinia/nuxt', '@nuxtjs/tailwindcss', 'nuxt-auth-utils', 'nuxt-security', '@nuxt/eslint', './config/service-worker', './config/workers'],
  css: ['@fontsource/atkinson-hyperlegible/400.css', '@fontsource/atkinson-hyperlegible/700.css'],
  tailwindcss: { cssPath: '~/assets/css/tailwind.css', viewer: false, exposeConfig: false },
  // A component is called by its file name wherever it lies: components/base/BaseButton.vue is <BaseButton>.
  components: [{ path: '~/components', pathPrefix: false }],
  // Named by path because the app's type check, which sees the routes, has another #imports than the server.
  alias: { '#cookie-session': join(import.meta.dirname, 'node_modules/nuxt-auth-utils/dist/runtime/server/utils/session') },
  // The browser asks our own /api/auth/session; the module's client half would ask a second time.
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: true } },
  // A page's script is fetched when a link to it is reached for, not when it comes into sight: a phone on the board needs the board.
  experimental: { defaults: { nuxtLink: { prefetchOn: { visibility: false, interaction: true } } } },
  hooks: {
    // What is lazy is fetched when it is asked for: a decoder for tags is nothing that a board should load beforehand.
    'build:manifest': (manifest) => {
      for (const chunk of Object.values(manifest)) chunk.prefetch = false
    },
  },
  runtimeConfig: {
    // Filled from NUXT_SESSION_PASSWORD and NUXT_SESSION_COOKIE_SECURE, which the start script sets.
    session: { name: 'stillwet', password: '', maxAge: 60 * 60 * 24 * 60, cookie: { sameSite: 'lax', secure: true, httpOnly: true } },
  },
  security,
  // Files are counted while they come in (server/utils/upload.ts), each kind against its own limit, and refused in a sentence.
  routeRules: { '/api/attachments/**': { security: { requestSizeLimiter: false } }, '/api/photos/pieces/**': { security: { requestSizeLimiter: false } } },
  nitro: {
    compressPublicAssets: true,
    imports: { autoImport: false },
    serverAssets: [{ baseName: 'migrations', dir: '../db/migrations' }],
  },
  vite: {
    plugins: [importGuard(import.meta.dirname)],
    optimizeDeps: { include: ['@vueuse/core'] },
  },
  // The service worker has other globals and a tsconfig of its own.
  typescript: { strict: true, tsConfig: { exclude: ['../service-worker'] } },
})
