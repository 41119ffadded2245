export default defineNuxtConfig({
  compatibilityDate: '2026-05-01',
})
