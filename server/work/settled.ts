import type { PredictedCoat } from '~~/server/work/predict'

interface OnFace { coatId: number, partId: number, faceId: number | null, layer: number }

/** Rungs that only handling in bulk or for good waits for: a film under another need not have reached them to be spoken for. */
const lastRungs = ['cured', 'full-strength']

/**
 * The films that can no longer change any answer: wholly cured, or buried under a film that is later at every rung and
 * hard enough themselves that no next step waits for them. Hot queries read only the others.
 * @param now ms UTC
 */
export function settledFilms(predicted: readonly PredictedCoat[], targets: readonly OnFace[], now: number): number[] {
  const targetsOf = new Map<number, OnFace[]>()
  const onFace = new Map<string, OnFace[]>()
  for (const each of targets) {
    targetsOf.set(each.coatId, [...targetsOf.get(each.coatId) ?? [], each])
    onFace.set(faceKey(each), [...onFace.get(faceKey(each)) ?? [], each])
  }
  const byId = new Map(predicted.map(each => [each.coat.id, each]))
  return predicted.filter((each) => {
    if (each.coat.hold !== null && each.coat.outAt === null) return false
    if (passed(each, now, () => true)) return true
    if (!passed(each, now, name => !lastRungs.includes(name))) return false
    const own = targetsOf.get(each.coat.id) ?? []
    return own.length > 0 && own.every(target => (onFace.get(faceKey(target)) ?? []).some(above => above.layer > target.layer && isLater(byId.get(above.coatId), each)))
  }).map(each => each.coat.id)
}

const faceKey = (target: OnFace) => `${target.partId} ${target.faceId}`

function passed(each: PredictedCoat, now: number, asked: (name: string) => boolean): boolean {
  return each.prediction.milestones.filter(rung => asked(rung.name)).every(rung => timeOf(rung) <= now)
}

const timeOf = (rung: { reachedAt: number | null, p98At: number | null }) => rung.reachedAt ?? rung.p98At ?? Infinity

function isLater(above: PredictedCoat | undefined, below: PredictedCoat): boolean {
  if (!above || above.coat.materialVersionId !== below.coat.materialVersionId) return false
  return below.prediction.milestones.every((rung) => {
    const same = above.prediction.milestones.find(each => each.name === rung.name)
    return same !== undefined && timeOf(same) >= timeOf(rung)
  })
}
