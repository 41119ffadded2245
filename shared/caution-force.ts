import type { RoomVapourState, VapourState } from '#shared/schemas/vapour'

type Standing = VapourState['cautions'][number]

/** What is wet in the rooms or comes on within a day, by the names of the materials. */
function materialsInUse(rooms: readonly Pick<RoomVapourState, 'now' | 'ahead'>[]): Set<string> {
  return new Set(rooms.flatMap(room => [...room.now?.contributions ?? [], ...room.ahead?.contributions ?? []]).map(each => each.material))
}

/**
 * The standing cautions by whether they are in force now. In force are those of what is wet or comes on within a day, those of rags while anybody
 * has to answer for some, and those that no single material carries. A coat of an unknown material puts all of them in force.
 */
export function cautionsInForce(state: Pick<VapourState, 'cautions' | 'rags'> & { rooms: readonly Pick<RoomVapourState, 'now' | 'ahead'>[] }): { now: Standing[], others: Standing[] } {
  const used = materialsInUse(state.rooms)
  const unknown = used.has('')
  const isNow = ({ key, materials }: Standing) => unknown || materials.length === 0 || materials.some(name => used.has(name)) || (state.rags.length > 0 && (key === 'oily rags' || key === 'waste can'))
  return { now: state.cautions.filter(isNow), others: state.cautions.filter(each => !isNow(each)) }
}
