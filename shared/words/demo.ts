import type { Role } from '#shared/terms'

interface SignIn { role: Role, name: string, email: string, password: string }

/** What the server prints at its start while there is a demo studio. */
export function demoWords(signIns: readonly SignIn[]): string {
  const lines = signIns.map(({ role, name, email, password }) => `  ${role.padEnd(7)} ${name.padEnd(8)} ${email.padEnd(18)} ${password}`)
  return ['The demo studio is open. Sign in as one of its people:', ...lines].join('\n')
}
