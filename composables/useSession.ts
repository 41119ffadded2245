import type { SessionWire } from '#shared/schemas/session'
import { may } from '#shared/permissions'
import type { Permission } from '#shared/permissions'

/** Who is signed in and where, the same on the server and in the browser. `load` asks again. */
export function useSession() {
  const session = useState<SessionWire | null>('session', () => null)
  const ask = useRequestFetch()

  async function load(): Promise<SessionWire> {
    const found = await ask<SessionWire>('/api/auth/session')
    session.value = found
    return found
  }

  /** Signs out and goes to one of the doors. */
  async function signOut(door = '/sign-in') {
    await callApi('/api/auth/sign-out', { method: 'POST' })
    session.value = null
    await navigateTo(door)
  }

  /** Turns to another of one's studios; everything on the page belongs to the old one, so it is loaded anew. */
  async function turnTo(studioId: number, path = '/') {
    await callApi('/api/auth/studio', { method: 'POST', body: { studioId } })
    reloadNuxtApp({ path, force: true })
  }

  /** Whether a control is worth offering; the server decides again. */
  const can = (permission: Permission) => session.value?.member ? may(session.value.member.role, permission) : false

  return { session, load, signOut, turnTo, can }
}
