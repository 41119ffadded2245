import { pushSubscription, roomOf, sheetOf } from './rows'
import type { Rows } from './rows'
import type { Role } from '#shared/terms'

export interface RouteCase {
  /** The lowest role that may, or a door that asks for none. */
  least: Role | 'anyone' | 'signed in' | 'wall' | 'bench'
  /** Fills [id], [code] or [token] of the path from the first studio. */
  at?: keyof Rows
  body?: (rows: Rows) => unknown
  /**
   * What keeps studios apart: `row` the path names a row, another studio's owner gets 404; `named` the body
   * names one, likewise; `view` the answer must hold nothing of the first studio; `none` with the reason beside it.
   */
  apart: 'row' | 'named' | 'view' | 'none'
  /** What the lowest role is answered when the row is not theirs to change: the door is open, the row is not. */
  asLeast?: number
}

const recently = () => new Date(Date.now() - 60_000).toISOString()
let keys = 0
const clientKey = () => `access-key-${keys += 1}`

const place = (rows: Rows) => ({ roomId: rows.room, name: 'Rail', kind: 'rail', capacity: 4, sort: 1 })

/** A schedule of one coat, which only the studio of its material can keep. */
const washDraft = (materialId: number) => ({
  name: `Wash ${keys += 1}`, summary: '', parts: [{ key: 'piece', name: 'Piece', grip: null, faces: [] }], links: [],
  steps: [{
    key: 'wash', name: 'Wash', kind: 'coat', materialId, coatSize: 'normal', ground: 'primed', hold: null, placeKind: null, perDay: 1, days: 1, untilEnough: false,
    setupMin: 5, pieceMin: 5, cleanMin: 5, releaseMin: 0, hands: 1, dust: 'none', mayRunOver: false, targets: [{ part: 'piece', face: null }], checks: [],
  }],
})

/** Every file under server/api, by its path. A new route is added here or the suite fails. */
export const routes: Record<string, RouteCase> = {
  // Doors: they ask who one is and touch no studio's rows.
  'auth/session.get.ts': { least: 'anyone', apart: 'view' },
  'auth/sign-in.post.ts': { least: 'anyone', apart: 'none', body: () => ({ email: 'nobody@example.test', password: 'wrong' }) },
  'auth/sign-out.post.ts': { least: 'anyone', apart: 'none' },
  // One's own sessions are all it can end.
  'auth/sign-out-elsewhere.post.ts': { least: 'signed in', apart: 'none' },
  'auth/studio.post.ts': { least: 'signed in', apart: 'named', body: () => ({ studioId: 1 }) },
  'auth/forgotten.post.ts': { least: 'anyone', apart: 'none', body: () => ({ email: 'nobody@example.test' }) },
  // A link's secret opens it to whoever holds it: that is what it is for.
  'auth/reset/[token].get.ts': { least: 'anyone', apart: 'none', at: 'invitationToken' },
  'auth/reset/[token].post.ts': { least: 'anyone', apart: 'none', at: 'invitationToken', body: () => ({ password: 'short' }) },
  'studios.get.ts': { least: 'anyone', apart: 'view' },
  'studios.post.ts': { least: 'anyone', apart: 'none', body: () => ({}) },
  // An invitation's secret opens it to whoever holds it: that is what it is for.
  'join/[token].get.ts': { least: 'anyone', apart: 'none', at: 'invitationToken' },
  'join/[token].post.ts': { least: 'anyone', apart: 'none', at: 'invitationToken', body: () => ({}) },

  'live.get.ts': { least: 'wall', apart: 'view' },
  'studio.get.ts': { least: 'helper', apart: 'view' },
  'studio.patch.ts': { least: 'owner', apart: 'view', body: () => ({ usualRh: 0.5 }) },
  'members/index.get.ts': { least: 'helper', apart: 'view' },
  'members/[id].patch.ts': { least: 'owner', apart: 'row', at: 'member', body: () => ({ stepKinds: ['coat'] }) },
  'members/[id].delete.ts': { least: 'owner', apart: 'row', at: 'member' },
  // One's own membership is all it can end.
  'members/leave.post.ts': { least: 'signed in', apart: 'none' },
  'invitations/index.get.ts': { least: 'owner', apart: 'view' },
  'invitations/index.post.ts': { least: 'owner', apart: 'view', body: () => ({ role: 'helper' }) },
  'invitations/[id].delete.ts': { least: 'owner', apart: 'row', at: 'invitation' },
  'wall-links/index.get.ts': { least: 'owner', apart: 'view' },
  'wall-links/index.post.ts': { least: 'owner', apart: 'view', body: () => ({ name: 'Door' }) },
  'wall-links/[id].delete.ts': { least: 'owner', apart: 'row', at: 'wallLink' },
  'bench-tablets/index.get.ts': { least: 'maker', apart: 'view' },
  'bench-tablets/index.post.ts': { least: 'maker', apart: 'named', body: rows => ({ name: 'Long bench', roomId: rows.room, lockMin: 5 }) },
  'bench-tablets/[id].patch.ts': { least: 'maker', apart: 'row', at: 'benchTablet', body: () => ({ lockMin: 2 }) },
  'bench-tablets/[id]/code.post.ts': { least: 'maker', apart: 'row', at: 'benchTablet' },
  'bench-tablets/[id].delete.ts': { least: 'maker', apart: 'row', at: 'benchTablet' },
  'own-pin/index.get.ts': { least: 'helper', apart: 'view' },
  // Everybody sets and ends their own PIN and nobody another's.
  'own-pin/index.put.ts': { least: 'helper', apart: 'view', body: () => ({ pin: '2580' }) },
  'own-pin/index.delete.ts': { least: 'helper', apart: 'view' },
  'bench/pair.post.ts': { least: 'anyone', apart: 'none', body: () => ({ code: 'CDFG-HJKM' }) },
  // No session of a person opens these: a tablet's own cookie does, for its own studio. tests/api/bench.test.ts asks them with one.
  'bench/index.get.ts': { least: 'bench', apart: 'none' },
  'bench/person.post.ts': { least: 'bench', apart: 'none', body: () => ({ memberId: 1, pin: '2580' }) },
  'bench/person.delete.ts': { least: 'bench', apart: 'none' },
  'bench/awake.post.ts': { least: 'bench', apart: 'none' },
  'bench/lock.post.ts': { least: 'bench', apart: 'none' },
  'bench/acts/index.post.ts': { least: 'bench', apart: 'none', body: rows => ({ clientKey: clientKey(), kind: 'seen', doneAt: recently(), pieces: [{ id: rows.piece, version: 1 }], body: {}, memberId: null }) },
  'bench/acts/[id]/correct.post.ts': { least: 'bench', apart: 'none', at: 'act', body: () => ({ clientKey: clientKey(), takeBack: true }) },
  // The invented studio is nobody's of these until one of them adds it: then it is theirs to take away (tests/api/demo.test.ts).
  'demo/index.get.ts': { least: 'owner', apart: 'view' },
  'demo/index.post.ts': { least: 'owner', apart: 'none' },
  'demo/index.delete.ts': { least: 'owner', apart: 'none' },
  'hours/index.get.ts': { least: 'helper', apart: 'view' },
  'hours/index.put.ts': { least: 'owner', apart: 'named', body: rows => ({ memberId: rows.member, hours: [{ weekday: 1, fromMin: 540, toMin: 1020 }] }) },
  'closures/index.get.ts': { least: 'helper', apart: 'view' },
  'closures/index.post.ts': { least: 'helper', apart: 'named', body: rows => ({ memberId: rows.member, name: '', fromDate: '2030-06-01', toDate: '2030-06-01' }) },
  'closures/[id].delete.ts': { least: 'helper', apart: 'row', at: 'closure', asLeast: 404 },
  'rooms/index.get.ts': { least: 'helper', apart: 'view' },
  'rooms/index.post.ts': { least: 'maker', apart: 'view', body: () => roomOf('Loft') },
  'rooms/[id].patch.ts': { least: 'maker', apart: 'row', at: 'room', body: () => ({ sort: 3 }) },
  'rooms/[id].delete.ts': { least: 'maker', apart: 'row', at: 'room' },
  // Nothing is shut in the first studio's room: who may is told so with a conflict.
  'rooms/[id]/open.post.ts': { least: 'maker', apart: 'row', at: 'room', body: () => ({}) },
  // Nobody has opened it of late: who may is told so with a conflict.
  'rooms/[id]/shut.post.ts': { least: 'helper', apart: 'row', at: 'room', body: () => ({}) },
  'vapour.get.ts': { least: 'helper', apart: 'view' },
  'rules/index.post.ts': { least: 'owner', apart: 'view', body: () => ({ text: 'No spraying after six.' }) },
  'rules/[id].delete.ts': { least: 'owner', apart: 'row', at: 'rule' },
  'statements/index.post.ts': { least: 'owner', apart: 'view', body: () => ({ kind: 'isocyanate', text: 'Brushed only, in the booth, with air-fed hood and gloves, one person.' }) },
  'statements/[id].delete.ts': { least: 'owner', apart: 'row', at: 'statement' },
  'materials/[id]/limits.put.ts': { least: 'owner', apart: 'row', at: 'material', body: () => ({ solventKey: null, limitMgM3: 350, ceilingMgM3: null, lelGramsM3: null, vocGramsPerLitre: 450, exemptGramsPerLitre: null, spreadM2PerLitre: null, touchDryMinutes: null }) },
  'batches/[id]/area.put.ts': { least: 'maker', apart: 'row', at: 'batch', body: () => ({ areaM2: 0.4 }) },
  'reminders/[id]/seen.post.ts': { least: 'helper', apart: 'row', at: 'reminder' },
  'materials/index.get.ts': { least: 'helper', apart: 'view' },
  'materials/[id].get.ts': { least: 'helper', apart: 'row', at: 'material' },
  'materials/[id]/learned.get.ts': { least: 'helper', apart: 'row', at: 'material' },
  'materials/[id]/reset.post.ts': { least: 'maker', apart: 'row', at: 'material', body: () => ({ forget: true }) },
  'materials/[id]/tin.post.ts': { least: 'maker', apart: 'row', at: 'material' },
  'materials/index.post.ts': { least: 'maker', apart: 'view', body: () => sheetOf('Loft varnish') },
  'materials/preview.post.ts': { least: 'maker', apart: 'view', body: () => sheetOf('Loft varnish') },
  'materials/[id].patch.ts': { least: 'maker', apart: 'row', at: 'ownMaterial', body: () => ({ putAway: false }) },
  'materials/[id]/editions.get.ts': { least: 'helper', apart: 'row', at: 'material' },
  // Nothing is typed: who may is told that a material has at least one time.
  'materials/[id]/editions.post.ts': { least: 'maker', apart: 'row', at: 'ownMaterial', asLeast: 400, body: () => ({ basedOn: 1, note: '', solvent: 'water', contents: [], mustLieLevel: false, gloves: false, hazards: '', rungs: [], windows: [], figures: [] }) },
  // The edition in use: who may is told so.
  'materials/[id]/back.post.ts': { least: 'maker', apart: 'row', at: 'ownMaterial', asLeast: 400, body: () => ({ no: 1, basedOn: 1 }) },
  'materials/[id]/mix.post.ts': { least: 'maker', apart: 'row', at: 'mix', body: rows => ({ basedOn: 1, basis: 'weight', parts: [{ materialId: rows.ownMaterial, parts: 1, private: true }, { materialId: rows.material, parts: 1, private: false }] }) },
  'mixes/index.post.ts': { least: 'maker', apart: 'named', body: rows => ({ name: 'Loft mix', basis: 'weight', parts: [{ materialId: rows.ownMaterial, parts: 3, private: false }, { materialId: rows.material, parts: 1, private: true }] }) },
  // What is sent is no data sheet: who may is told so.
  'attachments/data-sheets/[id].post.ts': { least: 'maker', apart: 'row', at: 'ownMaterial', asLeast: 400, body: () => ({}) },
  // It hangs on a private part: it is not there for a helper.
  'attachments/data-sheets/[id].get.ts': { least: 'helper', apart: 'row', at: 'sheetFile', asLeast: 404 },
  'attachments/data-sheets/[id].delete.ts': { least: 'maker', apart: 'row', at: 'sheetFile' },
  'witnesses/index.post.ts': { least: 'helper', apart: 'named', asLeast: 404, body: rows => ({ actId: rows.act }) },
  'witnesses/[id].delete.ts': { least: 'helper', apart: 'row', at: 'witness' },
  'advice/index.get.ts': { least: 'helper', apart: 'view' },
  'advice/index.post.ts': { least: 'helper', apart: 'named', body: rows => ({ code: 'blush', answer: 'going on', coatIds: [rows.coat] }) },
  'plan/index.get.ts': { least: 'helper', apart: 'view' },
  'plan/index.post.ts': { least: 'maker', apart: 'view' },
  // A time that has gone by: who may is told so.
  'pins/index.post.ts': { least: 'maker', apart: 'named', asLeast: 422, body: rows => ({ turnIds: [rows.turn], startsAt: recently(), memberId: null }) },
  'plan/bottleneck.get.ts': { least: 'helper', apart: 'view' },
  // The first studio's batch is for no order: who may is told that it has no date to move.
  'plan/what-if.post.ts': { least: 'maker', apart: 'named', asLeast: 422, body: rows => ({ kind: 'due', batchId: rows.batch, dueAt: new Date(Date.now() + 86_400_000).toISOString() }) },
  'pins/[id].delete.ts': { least: 'maker', apart: 'row', at: 'pin' },
  'week.get.ts': { least: 'helper', apart: 'view' },
  'air.get.ts': { least: 'helper', apart: 'view' },
  'materials/recent.get.ts': { least: 'helper', apart: 'view' },
  'rates/index.get.ts': { least: 'helper', apart: 'view' },
  'places/index.post.ts': { least: 'maker', apart: 'named', body: place },
  // An arrangement names all of a studio's own rooms and places; any other is a conflict with what stands there.
  'places/arrangement.put.ts': { least: 'maker', apart: 'none', asLeast: 409, body: () => ({ was: [], now: [] }) },
  'places/[id].patch.ts': { least: 'maker', apart: 'row', at: 'place', body: () => ({ capacity: 8 }) },
  'places/[id].delete.ts': { least: 'maker', apart: 'row', at: 'place' },
  'carriers/index.get.ts': { least: 'helper', apart: 'view' },
  'carriers/index.post.ts': { least: 'maker', apart: 'view', body: () => ({ name: 'Long board' }) },
  'carriers/[id].patch.ts': { least: 'maker', apart: 'row', at: 'carrier', body: () => ({ name: 'Tray 9' }) },
  'carriers/[id].delete.ts': { least: 'maker', apart: 'row', at: 'carrier' },
  'tags/index.get.ts': { least: 'helper', apart: 'view' },
  'tags/codes.post.ts': { least: 'maker', apart: 'view' },
  'tags/[code].get.ts': { least: 'helper', apart: 'row', at: 'tagCode' },
  'calendar/index.get.ts': { least: 'helper', apart: 'view' },
  'calendar/index.put.ts': { least: 'helper', apart: 'view', body: () => ({ everybody: false }) },
  // Everybody ends their own address and nobody another's.
  'calendar/index.delete.ts': { least: 'helper', apart: 'view' },
  // The secret opens it to whoever holds it: that is what it is for.
  'calendar/[token].get.ts': { least: 'anyone', apart: 'none', at: 'calendarToken' },
  'export.get.ts': { least: 'owner', apart: 'view' },
  'calls/index.get.ts': { least: 'helper', apart: 'view' },
  'calls/quiet.get.ts': { least: 'helper', apart: 'view' },
  'calls/quiet.put.ts': { least: 'helper', apart: 'none', body: () => ({ quiet: { fromMin: 1260, toMin: 420 } }) },
  'calls/index.put.ts': { least: 'helper', apart: 'view', body: () => ({ kind: 'ready', wanted: true }) },

  'pieces/marks.get.ts': { least: 'helper', apart: 'view' },
  'pieces/faces.get.ts': { least: 'helper', apart: 'view' },
  'pieces/gone.get.ts': { least: 'helper', apart: 'view' },
  'pieces/[id].patch.ts': { least: 'maker', apart: 'row', at: 'piece', body: () => ({ name: 'Elsewhere 1' }) },
  'batches/[id].patch.ts': { least: 'maker', apart: 'row', at: 'batch', body: () => ({ name: 'Elsewhere' }) },
  // The body is no picture: who may is told so.
  'photos/pieces/[id].post.ts': { least: 'helper', apart: 'row', at: 'piece', asLeast: 400, body: () => ({}) },
  'photos/[id]/index.get.ts': { least: 'helper', apart: 'row', at: 'photo' },
  'photos/[id]/small.get.ts': { least: 'helper', apart: 'row', at: 'photo' },
  // An owner took it.
  'photos/[id]/index.patch.ts': { least: 'helper', apart: 'row', at: 'photo', asLeast: 403, body: () => ({ caption: 'Elsewhere' }) },
  'photos/[id]/index.delete.ts': { least: 'helper', apart: 'row', at: 'photo', asLeast: 403 },
  'photos/[id]/back.post.ts': { least: 'helper', apart: 'row', at: 'photo', asLeast: 403 },
  'pieces/[id].get.ts': { least: 'helper', apart: 'row', at: 'piece' },
  'schedules/index.get.ts': { least: 'helper', apart: 'view' },
  'schedules/[id].get.ts': { least: 'helper', apart: 'row', at: 'schedule' },
  'schedules/[id]/versions.get.ts': { least: 'helper', apart: 'row', at: 'schedule' },
  'schedules/[id]/draft.get.ts': { least: 'maker', apart: 'row', at: 'schedule' },
  'schedules/materials.get.ts': { least: 'maker', apart: 'view' },
  'schedules/offers.get.ts': { least: 'maker', apart: 'view' },
  'schedules/put-away.get.ts': { least: 'maker', apart: 'view' },
  'schedules/index.post.ts': { least: 'maker', apart: 'named', body: rows => ({ draft: washDraft(rows.material) }) },
  // Nobody's newest edition is the ninetieth: who may is told what stands there now.
  'schedules/[id].put.ts': { least: 'maker', apart: 'row', at: 'schedule', body: rows => ({ baseNo: 90, draft: washDraft(rows.material) }) },
  'schedules/[id].patch.ts': { least: 'maker', apart: 'row', at: 'schedule', body: () => ({ archived: false }) },
  // Nothing was done to the first studio's piece that a schedule could be made of.
  'pieces/[id]/schedule-draft.get.ts': { least: 'maker', apart: 'row', at: 'piece', asLeast: 422 },
  'state.get.ts': { least: 'wall', apart: 'view' },
  'batches/index.post.ts': { least: 'maker', apart: 'named', body: rows => ({ clientKey: clientKey(), name: 'Boxes', scheduleId: null, pieces: ['Box 1'], placeId: rows.place, order: null, startsAt: recently() }) },
  // Its shelf is another studio's: told as a field that is wrong.
  'batches/start-check.post.ts': { least: 'maker', apart: 'named', body: rows => ({ scheduleId: rows.schedule, pieces: 1, placeId: rows.place, startsAt: recently() }) },
  'promises/estimate.post.ts': { least: 'maker', apart: 'named', body: rows => ({ scheduleId: rows.schedule, pieces: 1, placeId: rows.place, startsAt: recently() }) },
  'promises/basis.put.ts': { least: 'maker', apart: 'view', body: () => ({ reworkOfTen: 2 }) },
  'batches/[id]/card.get.ts': { least: 'helper', apart: 'row', at: 'batch' },
  'batches/[id]/promise.get.ts': { least: 'maker', apart: 'row', at: 'batch' },
  // Nothing of it is left to do: who may is told that no date can be given.
  'batches/[id]/promise.post.ts': { least: 'maker', apart: 'row', at: 'batch', asLeast: 422, body: () => ({ dateAt: new Date(Date.now() + 5 * 86_400_000).toISOString(), orderName: 'Fair' }) },
  'acts/index.post.ts': { least: 'helper', apart: 'named', body: rows => ({ clientKey: clientKey(), kind: 'seen', doneAt: recently(), pieces: [{ id: rows.piece, version: 1 }], body: {} }) },
  'acts/[id]/correct.post.ts': { least: 'helper', apart: 'row', at: 'act', asLeast: 403, body: () => ({ clientKey: clientKey(), takeBack: true }) },
  'rooms/[id]/sensor.get.ts': { least: 'maker', apart: 'row', at: 'room' },
  'rooms/[id]/sensor.put.ts': { least: 'maker', apart: 'row', at: 'room' },
  'rooms/[id]/sensor.delete.ts': { least: 'maker', apart: 'row', at: 'room' },
  // A sensor's secret opens it to whoever holds it: that is what it is for. This one opens nothing.
  'sensor/[token].post.ts': { least: 'anyone', apart: 'none', at: 'calendarToken', body: () => ({ humidity: 50 }) },
  'rooms/[id]/readings.get.ts': { least: 'helper', apart: 'row', at: 'room' },
  'rooms/[id]/readings.post.ts': { least: 'helper', apart: 'row', at: 'room', body: () => ({ clientKey: clientKey(), at: recently(), tempC: 19, rh: 0.5, words: null }) },
  'readings/[id].delete.ts': { least: 'helper', apart: 'row', at: 'reading', asLeast: 403 },
  'rooms/[id]/readings.csv.get.ts': { least: 'helper', apart: 'row', at: 'room' },
  'rooms/[id]/imports.post.ts': { least: 'helper', apart: 'row', at: 'room', body: () => ({ clientKey: clientKey(), fileName: 'shed.csv', times: [Date.now() - 3_600_000], temps: [12], humidities: [0.6] }) },
  'reading-imports/[id].delete.ts': { least: 'helper', apart: 'row', at: 'readingImport', asLeast: 403 },
  'air/course.get.ts': { least: 'helper', apart: 'view' },
  'rags/index.get.ts': { least: 'helper', apart: 'view' },
  'rags/[id]/answer.post.ts': { least: 'helper', apart: 'row', at: 'ragDuty', body: () => ({ answer: 'in water can' }) },
  'reminders/index.get.ts': { least: 'helper', apart: 'view' },
  'reminders/[id]/answer.post.ts': { least: 'helper', apart: 'row', at: 'reminder' },
  'deliveries.get.ts': { least: 'helper', apart: 'view' },
  'outbox.get.ts': { least: 'maker', apart: 'view' },
  'push/key.get.ts': { least: 'helper', apart: 'view' },
  'push/subscriptions/index.get.ts': { least: 'helper', apart: 'view' },
  'push/subscriptions/index.post.ts': { least: 'helper', apart: 'view', body: () => pushSubscription('elsewhere') },
  // Everybody ends their own subscription and nobody another's.
  'push/subscriptions/[id].delete.ts': { least: 'helper', apart: 'row', at: 'subscription', asLeast: 404 },
}
