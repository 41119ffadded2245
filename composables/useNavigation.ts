import { mayDoStep } from '#shared/permissions'
import { wayCurrent } from '#shared/ways'
import { shellWords } from '#shared/words/shell'

export interface NavigationLink { to: string, label: string }

/** The ways through the product: across the top from a tablet up; on a phone four in thumb reach, the rest under More. */
export function useNavigation() {
  const route = useRoute()
  const { session, can } = useSession()
  const who = session.value?.member ?? null
  /** A way that ends in a refusal is none: whoever puts nothing on reads what may be handled. */
  const mayPutOn = who === null || mayDoStep(who.role, who.stepKinds, 'coat')
  const top: NavigationLink[] = [
    { to: '/board', label: shellWords.board },
    { to: '/hands', label: shellWords.hands },
    { to: '/pieces', label: shellWords.pieces },
    { to: '/week', label: shellWords.week },
    { to: '/schedules', label: shellWords.schedules },
    { to: '/materials', label: shellWords.materials },
    { to: '/air', label: shellWords.air },
    { to: '/safety', label: shellWords.safety },
    { to: '/sheet', label: shellWords.sheet },
    { to: '/settings', label: shellWords.settings },
  ]
  const thumb: NavigationLink[] = [
    { to: '/hands', label: shellWords.hands },
    { to: '/board', label: shellWords.board },
    mayPutOn ? { to: '/put-on', label: shellWords.putOn } : { to: '/sheet', label: shellWords.sheet },
    { to: '/air', label: shellWords.air },
  ]
  const more: NavigationLink[] = [
    ...can('start batches') ? [{ to: '/start', label: shellWords.startBatch }] : [],
    ...top.filter(({ to }) => !thumb.some(link => link.to === to)),
  ]
  const currentOf = (link: NavigationLink) => wayCurrent(route.path, link.to)
  return { mayPutOn, top, thumb, more, currentOf }
}
