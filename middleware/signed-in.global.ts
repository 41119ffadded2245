const open = ['/sign-in', '/first-studio', '/join/', '/wall/', '/bench', '/forgotten', '/reset/']

/** Every page but the doors asks who one is; the address one wanted is kept for afterwards. */
export default defineNuxtRouteMiddleware(async (to) => {
  if (open.some(path => to.path.startsWith(path))) return
  const { session, load } = useSession()
  const found = session.value ?? await load()
  if (!found.person) return navigateTo({ path: '/sign-in', query: to.path === '/' ? {} : { to: to.fullPath } })
  if (!found.studio) return navigateTo('/first-studio')
})
