import { joinAs, visitor } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'

/** Every name in the first studio carries this word, so that a leak shows wherever it happens. */
export const marker = 'Firmark'

/** Row numbers of the first studio, for the paths and bodies of the table. */
export interface Rows { room: number, place: number, closure: number, invitation: number, member: number, wallLink: number, invitationToken: string, wallToken: string }

export const roomOf = (name: string) => ({ name, heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })

const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number, path: string, invitation: { id: number } }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}

/** Fills the first studio with a row of everything that has a number in a path. */
export async function fillStudio(owner: Visitor): Promise<Rows> {
  const room = await made(owner, '/api/rooms', roomOf(`${marker} room`))
  const place = await made(owner, '/api/places', { roomId: room.id, name: `${marker} shelf`, kind: 'shelf', capacity: 6, sort: 0 })
  const closure = await made(owner, '/api/closures', { memberId: null, name: `${marker} holiday`, fromDate: '2030-05-01', toDate: '2030-05-03' })
  const invitation = await made(owner, '/api/invitations', { role: 'helper', email: `${marker.toLowerCase()}@example.test` })
  const wall = await made(owner, '/api/wall-links', { name: `${marker} tablet` })
  const members = await owner.get<{ id: number, role: string }[]>('/api/members')
  const helper = members.body.find(({ role }) => role === 'helper')
  if (!helper) throw new Error('The first studio has no helper.')
  const last = (path: string) => path.split('/').at(-1) ?? ''
  return { room: room.id, place: place.id, closure: closure.id, invitation: invitation.invitation.id, member: helper.id, wallLink: wall.id, invitationToken: last(invitation.path), wallToken: last(wall.path) }
}

/** The owner of another studio on the same server, who belongs to no other. */
export async function otherOwner(origin: string, owner: Visitor): Promise<Visitor> {
  const before = await owner.get<{ studio: { id: number } }>('/api/auth/session')
  await made(owner, '/api/studios', { name: 'Kiln Yard', zone: 'Australia/Hobart' })
  const other = await joinAs(origin, owner, 'owner', 'otter@example.test')
  await made(owner, '/api/auth/studio', { studioId: before.body.studio.id })
  return other
}

/** Everybody the table asks after. */
export async function cast(origin: string, owner: Visitor) {
  return { nobody: visitor(origin), owner, maker: await joinAs(origin, owner, 'maker', 'moss@example.test'), helper: await joinAs(origin, owner, 'helper', 'hazel@example.test') }
}
