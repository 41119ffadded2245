import { airNoteKinds, goneWays, milestoneNames } from '#shared/terms'
import type { AirNoteKind, MilestoneName } from '#shared/terms'
import { cannotBe, latestAt, movesWith, newestCoat } from '#shared/work/draft'
import type { Draft } from '#shared/work/draft'
import type { FoldedCoat, WorkAct } from '#shared/work/types'

/** Put somewhere. A part that was joined has no place of its own: it goes where its fellow goes. */
export function moved(draft: Draft, act: WorkAct) {
  const placeId = act.body.placeId
  if (typeof placeId !== 'number') return
  const carrierId = typeof act.body.carrierId === 'number' ? act.body.carrierId : null
  for (const { partId, doneAt } of act.subjects) {
    if (draft.joins.some(join => join.partId === partId)) continue
    const now = draft.stays.find(stay => stay.partId === partId && stay.toAt === null)
    if (now) now.toAt = Math.max(now.fromAt, doneAt)
    draft.stays.push({ partId, placeId, carrierId, fromActId: act.rootId, fromAt: doneAt, toAt: null, seenAt: doneAt, missingSince: null })
  }
}

/** Somebody walked round and it was not where it should be. */
export function notThere(draft: Draft, act: WorkAct) {
  for (const { partId, doneAt } of act.subjects) {
    const stay = draft.stays.find(each => each.partId === partId && each.toAt === null)
    if (stay) stay.missingSince = doneAt
  }
}

/** Seen where it should be. */
export function seen(draft: Draft, act: WorkAct) {
  for (const { partId, doneAt } of act.subjects) {
    const stay = draft.stays.find(each => each.partId === partId && each.toAt === null)
    if (stay) Object.assign(stay, { seenAt: doneAt, missingSince: null })
  }
}

/** The start of its batch puts it on its place. */
export function started(draft: Draft, act: WorkAct) {
  draft.batch = { madeByActId: act.rootId }
  moved(draft, act)
}

/** To another batch, one there is or one that this act makes. All that was done stays with the piece. */
export function regrouped(draft: Draft, act: WorkAct) {
  draft.batch = typeof act.body.batchId === 'number' ? { batchId: act.body.batchId } : { madeByActId: act.rootId }
}

/** Here again after it was gone. */
export function back(draft: Draft, act: WorkAct) {
  if (draft.goneAt === null) return cannotBe(draft, act, 'still here')
  Object.assign(draft, { goneAt: null, goneHow: null })
  moved(draft, act)
}

/** Sold, scrapped or taken away: it holds no place any more. */
export function gone(draft: Draft, act: WorkAct) {
  const at = latestAt(act)
  draft.goneAt = at
  draft.goneHow = goneWays.find(way => way === act.body.how) ?? null
  for (const stay of draft.stays) if (stay.toAt === null) stay.toAt = Math.max(stay.fromAt, at)
}

/** Warm air, sun, shade, a cover: the coat's air was not the room's for a while. */
export function air(draft: Draft, act: WorkAct) {
  const kind = airNoteKinds.find(each => each === act.body.kind)
  if (!kind) return
  const minutes = typeof act.body.minutes === 'number' ? act.body.minutes : null
  for (const { partId, doneAt } of act.subjects) {
    endOpenNotes(draft, partId, kind, doneAt)
    draft.airNotes.push({ partId, actId: act.rootId, kind, fromAt: doneAt, toAt: minutes === null ? null : doneAt + minutes * 60_000 })
  }
}

function endOpenNotes(draft: Draft, partId: number, kind: AirNoteKind, at: number) {
  for (const note of draft.airNotes) if (note.partId === partId && note.toAt === null && (kind === 'shade' || note.kind === kind)) note.toAt = at
}

/** A thumb: a bound on the newest film of each part. A maker's or owner's yes also lifts a doubt; "spoilt" raises one. */
export function touchTest(draft: Draft, act: WorkAct) {
  const milestone = milestoneNames.find(name => name === act.body.milestone)
  const coats = testedCoats(draft, act)
  if (!milestone || coats.length === 0) return cannotBe(draft, act, 'no film to test')
  const reached = act.body.reached === true
  const at = latestAt(act)
  for (const coat of coats) {
    if (at < coat.endedAt) {
      cannotBe(draft, act, 'before its start')
      continue
    }
    record(draft, act, coat, milestone, reached, at)
  }
}

function record(draft: Draft, act: WorkAct, coat: FoldedCoat, milestone: MilestoneName, reached: boolean, at: number) {
  const witnessId = typeof act.body.witnessId === 'number' ? act.body.witnessId : null
  draft.tests.push({ actId: act.rootId, coatActId: coat.actId, milestone, at, reached, byRole: act.role, witnessId })
  if (act.body.spoilt === true) draft.doubts.push({ coatActId: coat.actId, cause: 'failed', fromAt: at, clearedActId: null })
  if (!reached || act.role === 'helper') return
  draft.clearings.push({ coatActId: coat.actId, at, actId: act.rootId })
  for (const doubt of draft.doubts) if (doubt.coatActId === coat.actId && doubt.clearedActId === null && doubt.fromAt <= at) doubt.clearedActId = act.rootId
}

/** The coat the act names, or the newest on each part touched and what moves with it. */
function testedCoats(draft: Draft, act: WorkAct): FoldedCoat[] {
  const wanted = act.body.coatActId
  if (typeof wanted === 'number') return draft.coats.filter(coat => coat.actId === wanted && coat.strippedAt === null)
  const newest = act.subjects.map(subject => newestCoat(draft, movesWith(draft, subject.partId)))
  return [...new Set(newest.filter(coat => coat !== null))]
}
