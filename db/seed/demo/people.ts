import { member, memberStepKind, person } from '~~/db/schema'
import type { Membership } from '~~/server/services/sessions'
import type { Database } from '~~/server/utils/database'
import type { Role, StepKind } from '#shared/terms'

export interface SignIn { role: Role, name: string, email: string, password: string }

interface DemoPerson extends SignIn { key: DemoKey, stepKinds: StepKind[] }
export type DemoKey = 'owner' | 'maker' | 'second' | 'helper'

// The words are no secret: they open the demo studio only, and never in production.
const people: readonly DemoPerson[] = [
  { key: 'owner', role: 'owner', name: 'Isaura', email: 'owner@demo.test', password: 'chalk on the shelf', stepKinds: [] },
  { key: 'maker', role: 'maker', name: 'Bertel', email: 'maker@demo.test', password: 'gesso before sanding', stepKinds: [] },
  { key: 'second', role: 'maker', name: 'Oda', email: 'second@demo.test', password: 'varnish in the draught', stepKinds: [] },
  { key: 'helper', role: 'helper', name: 'Jory', email: 'helper@demo.test', password: 'hold it by the back', stepKinds: ['light sanding', 'turn over', 'bench work', 'packing'] },
]

/** The three sign-ins to show: one for each role. */
export const demoSignIns: readonly SignIn[] = people.filter(({ key }) => key !== 'second')
  .map(({ role, name, email, password }) => ({ role, name, email, password }))

/** What has to be hashed before the people can be written, in their order. */
export const demoPasswords: readonly string[] = people.map(each => each.password)

/** Writes the four people of the demo and answers who they are to the services. */
export function addPeople(db: Database, studioId: number, hashes: readonly string[]): Record<DemoKey, Membership> {
  const members = people.map((each, index): [DemoKey, Membership] => {
    const { name, email, role, stepKinds } = each
    const personId = db.insert(person).values({ name, email, passwordHash: hashes[index] ?? '', demo: true }).returning({ id: person.id }).get().id
    const { id } = db.insert(member).values({ studioId, personId, role }).returning({ id: member.id }).get()
    if (stepKinds.length > 0) db.insert(memberStepKind).values(stepKinds.map(kind => ({ studioId, memberId: id, kind }))).run()
    return [each.key, { id, role, stepKinds: [...stepKinds] }]
  })
  const found = (key: DemoKey) => {
    const known = members.find(([each]) => each === key)
    if (!known) throw new Error(`The demo has no ${key}.`)
    return known[1]
  }
  return { owner: found('owner'), maker: found('maker'), second: found('second'), helper: found('helper') }
}
