import type { CallKind } from '#shared/terms'
import type { Audience } from './types'

interface CallTraits {
  /** Who hears of its n-th repeat while they have not chosen; the first is 0. */
  audience: (repeat: number) => Audience
  /** Whether its loss costs more than hearing it twice: fire, and the last moment. */
  urgent: boolean
  /** Minutes that a push service may keep trying: until it is asked again, or says nothing any more. */
  keptMin: number
}

const makers = (): Audience => 'makers'

/** How each kind of call goes out. Rags go first to the makers and to whoever oiled, and 15 minutes later to everybody. */
export const callTraits: Record<CallKind, CallTraits> = {
  'last moment to start': { audience: makers, urgent: true, keptMin: 30 },
  'ready': { audience: makers, urgent: false, keptMin: 240 },
  'before you leave': { audience: makers, urgent: false, keptMin: 120 },
  'check the room': { audience: makers, urgent: false, keptMin: 60 },
  'promise slipping': { audience: makers, urgent: false, keptMin: 12 * 60 },
  'rags': { audience: repeat => (repeat === 0 ? 'makers and the one who did it' : 'everybody'), urgent: true, keptMin: 15 },
  'vapour': { audience: () => 'everybody', urgent: true, keptMin: 60 },
}
