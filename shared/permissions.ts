import type { Role, StepKind } from '#shared/terms'

/** Everything a route can ask leave for. `do steps` is granted to a helper kind by kind. */
export const permissions = [
  'read the studio', 'record touch tests', 'move pieces', 'do steps', 'add readings', 'add photos', 'choose own calls', 'set own absences',
  'start batches', 'promise dates', 'correct acts of others', 'pin the plan', 'edit places', 'edit materials', 'edit schedules', 'set up tablets', 'see private mixes', 'read the outbox',
  'manage people', 'change settings', 'export', 'delete the studio',
] as const
export type Permission = typeof permissions[number]

const ofHelper: readonly Permission[] = ['read the studio', 'record touch tests', 'move pieces', 'do steps', 'add readings', 'add photos', 'choose own calls', 'set own absences']
const ofMaker: readonly Permission[] = [...ofHelper, 'start batches', 'promise dates', 'correct acts of others', 'pin the plan', 'edit places', 'edit materials', 'edit schedules', 'set up tablets', 'see private mixes', 'read the outbox']

const granted: Record<Role, readonly Permission[]> = { owner: permissions, maker: ofMaker, helper: ofHelper }

/** Whether somebody in this role may do this at all. For a helper's steps ask `mayDoStep` as well. */
export function may(role: Role, permission: Permission): boolean {
  return granted[role].includes(permission)
}

/**
 * Whether somebody may do a step of this kind.
 * @param helperKinds the kinds the owner allows to this helper; not looked at for other roles
 */
export function mayDoStep(role: Role, helperKinds: readonly StepKind[], kind: StepKind): boolean {
  return may(role, 'do steps') && (role !== 'helper' || helperKinds.includes(kind))
}
