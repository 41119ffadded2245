import { demoSignIns } from '~~/db/seed/demo/people'
import type { RecentMaterialWire } from '#shared/schemas/material'
import type { StudioState } from '#shared/schemas/piece-state'
import { fromWire } from '#shared/schemas/wire'
import type { Wire } from '#shared/schemas/wire'
import type { Role } from '#shared/terms'
import { signIn } from './sign-in'
import type { Visitor } from './sign-in'

let keys = 0
const key = () => `demo-studio-test-${++keys}`

/** Somebody of the demo studio with this role, signed in over HTTP. */
export function signInAs(origin: string, role: Role): Promise<Visitor> {
  const found = demoSignIns.find(each => each.role === role)
  return signIn(origin, found?.email ?? '', found?.password)
}

/** The studio as `/api/state` tells it. */
export async function stateOf(who: Visitor): Promise<StudioState> {
  return fromWire<StudioState>((await who.get<Wire<StudioState>>('/api/state')).body)
}

/** A new piece without a schedule on the shelf with the most room, which nobody's plan is about. */
export async function newPiece(who: Visitor, name: string): Promise<number> {
  const { places } = await stateOf(who)
  const place = places.filter(each => each.kind === 'shelf' || each.kind === 'bench').sort((a, b) => (b.capacity - b.taken) - (a.capacity - a.taken))[0]
  const body = { clientKey: key(), name: `${name} batch`, scheduleId: null, pieces: [name], placeId: place?.id, order: null, startsAt: new Date().toISOString() }
  const { status, body: made } = await who.post<{ pieceIds: number[] }>('/api/batches', body)
  if (status !== 200) throw new Error(JSON.stringify(made))
  return made.pieceIds[0] ?? 0
}

/** Puts a coat of the first material at hand on a piece, now; resolves to when the studio answered, ms. */
export async function coat(who: Visitor, id: number): Promise<number> {
  const piece = (await stateOf(who)).pieces.find(each => each.id === id)
  const [material] = (await who.get<{ recent: RecentMaterialWire[] }>('/api/materials/recent')).body.recent.filter(each => !each.glue)
  const { status, body } = await who.post('/api/acts', { clientKey: key(), kind: 'coat on', doneAt: new Date().toISOString(), pieces: [{ id, version: piece?.version }], body: { materialVersionId: material?.versionId, step: null } })
  if (status !== 200) throw new Error(JSON.stringify(body))
  return Date.now()
}
