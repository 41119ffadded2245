import { createECDH, randomBytes } from 'node:crypto'
import Sqlite from 'better-sqlite3'
import { plainPicture } from '../../helpers/pictures'
import { joinAs, visitor } from '../../helpers/sign-in'
import type { Visitor } from '../../helpers/sign-in'

/** Every name in the first studio carries this word, so that a leak shows wherever it happens. */
export const marker = 'Firmark'

/** Row numbers of the first studio, for the paths and bodies of the table. */
export interface Rows { room: number, place: number, closure: number, invitation: number, member: number, wallLink: number, benchTablet: number, piece: number, act: number, schedule: number, reading: number, readingImport: number, ragDuty: number, reminder: number, rule: number, statement: number, batch: number, coat: number, photo: number, witness: number, turn: number, pin: number, subscription: number, material: number, ownMaterial: number, mix: number, sheetFile: number, carrier: number, tagCode: string, invitationToken: string, calendarToken: string, wallToken: string }

export const roomOf = (name: string) => ({ name, heated: true, outdoor: false, sprayArea: false, sleptIn: false, volumeM3: 60, exhaustM3H: null, nightDropC: 4, sort: 0 })

/** The least that a data sheet must say. */
export const sheetOf = (name: string, more: object = {}) => ({ name, kind: 'varnish', hardening: 'water', solvent: null, contents: [], mustLieLevel: false, gloves: false, hazards: '', figures: { 'ready-to-recoat': '2-4 h' }, ...more })

const made = async (who: Visitor, path: string, body: unknown) => {
  const answer = await who.post<{ id: number, path: string, invitation: { id: number } }>(path, body)
  if (answer.status !== 200) throw new Error(`${path} was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body
}

const now = () => new Date(Date.now() - 120_000).toISOString()

/** A browser's wish to be called: a real point of the curve and a secret of sixteen bytes. */
export function pushSubscription(path: string) {
  const curve = createECDH('prime256v1')
  return { endpoint: `http://127.0.0.1:9/${path}`, keys: { p256dh: curve.generateKeys('base64url'), auth: randomBytes(16).toString('base64url') }, device: 'test' }
}

function versionOf(file: string, piece: number) {
  const db = new Sqlite(file, { readonly: true })
  const version = db.prepare<[number], number>('select version from piece where id = ?').pluck().get(piece)
  db.close()
  return version ?? 0
}

/** What comes about by the clock alone, so that no request can make it: a rag duty and a call; and a settled coat, which asks for a schedule. */
function writeCalls(file: string, room: number, act: number, piece: number) {
  const db = new Sqlite(file)
  const insert = (sql: string, ...values: unknown[]) => Number(db.prepare(sql).run(...values).lastInsertRowid)
  const ragDuty = insert('insert into rag_duty (studio_id, room_id, last_oil_at, last_oil_act_id) values (1, ?, ?, ?)', room, Date.now(), act)
  const cause = insert(`insert into cause (studio_id, kind, subject_type, subject_id, group_key, made_at) values (1, 'ready', 'turn', 1, 'g', ?)`, Date.now())
  const reminder = insert(`insert into reminder (studio_id, cause_id, stage, due_at, status, title, body, path) values (1, ?, 'first', ?, 'sent', ?, '', '/hands')`, cause, Date.now(), `${marker} call`)
  const coat = insert(`insert into coat (studio_id, piece_id, act_id, kind, began_at, ended_at, size, ground, settled_at) values (1, ?, ?, 'coat', ?, ?, 'normal', 'primed', ?)`, piece, act, Date.now(), Date.now(), Date.now())
  const witness = insert('insert into witness (studio_id, coat_id, name) values (1, ?, ?)', coat, `${marker} board`)
  db.close()
  return { ragDuty, reminder, coat, witness }
}

/** A photograph of a piece, in a caption that names the studio. */
async function sendPhoto(owner: Visitor, piece: number) {
  const answer = await owner.post<{ photoId: number }>(`/api/photos/pieces/${piece}?clientKey=access-photo&caption=${marker}`, await plainPicture())
  if (answer.status !== 200) throw new Error(`The photograph was answered with ${answer.status}: ${JSON.stringify(answer.body)}`)
  return answer.body.photoId
}

/** A turn of a batch with a schedule, and a pin that nobody's request can make without a plan. */
function writePin(file: string, batchId: number) {
  const db = new Sqlite(file)
  const turn = db.prepare<[number], number>('select turn.id from turn join piece_step on piece_step.id = turn.step_id join piece on piece.id = piece_step.piece_id where piece.batch_id = ? order by turn.id').pluck().get(batchId) ?? 0
  const pin = Number(db.prepare('insert into pin (studio_id, turn_id, starts_at, made_at) values (1, ?, ?, ?)').run(turn, Date.now() + 86_400_000, Date.now()).lastInsertRowid)
  db.close()
  return { turn, pin }
}

/** Fills the first studio with a row of everything that has a number in a path. */
export async function fillStudio(owner: Visitor, databaseFile: string): Promise<Rows> {
  const room = await made(owner, '/api/rooms', roomOf(`${marker} room`))
  const place = await made(owner, '/api/places', { roomId: room.id, name: `${marker} shelf`, kind: 'shelf', capacity: 6, sort: 0 })
  const carrier = await made(owner, '/api/carriers', { name: `${marker} tray` })
  const carriers = await owner.get<{ code: string }[]>('/api/carriers')
  const closure = await made(owner, '/api/closures', { memberId: null, name: `${marker} holiday`, fromDate: '2030-05-01', toDate: '2030-05-03' })
  const invitation = await made(owner, '/api/invitations', { role: 'helper', email: `${marker.toLowerCase()}@example.test` })
  const wall = await made(owner, '/api/wall-links', { name: `${marker} tablet` })
  const tablet = await made(owner, '/api/bench-tablets', { name: `${marker} bench`, roomId: room.id, lockMin: 5 })
  const calendar = await owner.put<{ path: string }>('/api/calendar', { everybody: true })
  const members = await owner.get<{ id: number, role: string }[]>('/api/members')
  const helper = members.body.find(({ role }) => role === 'helper')
  if (!helper) throw new Error('The first studio has no helper.')
  const rule = await made(owner, '/api/rules', { text: `${marker} rule` })
  const statement = await made(owner, '/api/statements', { kind: 'isocyanate', text: `${marker}: brushed only, by one person, with air from outside and gloves.` })
  const batch = await owner.post<{ batchId: number, pieceIds: number[] }>('/api/batches', { clientKey: 'access-first-batch', name: `${marker} ledgers`, scheduleId: null, pieces: [`${marker} 1`], placeId: place.id, order: null, startsAt: now() })
  const [piece = 0] = batch.body.pieceIds
  const seen = await owner.post<{ actId: number }>('/api/acts', { clientKey: 'access-first-act', kind: 'seen', doneAt: new Date().toISOString(), pieces: [{ id: piece, version: versionOf(databaseFile, piece) }], body: {} })
  if (seen.status !== 200) throw new Error(`The act was answered with ${seen.status}: ${JSON.stringify(seen.body)}`)
  const photo = await sendPhoto(owner, piece)
  const reading = await made(owner, `/api/rooms/${room.id}/readings`, { clientKey: 'access-reading', at: now(), tempC: 19, rh: 0.5, words: null })
  const imported = await owner.post<{ importId: number }>(`/api/rooms/${room.id}/imports`, { clientKey: 'access-import', fileName: `${marker}.csv`, times: [Date.now() - 7_200_000], temps: [18], humidities: [0.5] })
  if (imported.status !== 200) throw new Error(`The file was answered with ${imported.status}: ${JSON.stringify(imported.body)}`)
  const subscription = await made(owner, '/api/push/subscriptions', pushSubscription(marker))
  const [schedule] = (await owner.get<{ id: number }[]>('/api/schedules')).body
  if (!schedule) throw new Error('The first studio has no finishing schedule.')
  const [material] = (await owner.get<{ id: number }[]>('/api/materials')).body
  if (!material) throw new Error('The first studio has no material.')
  const own = await made(owner, '/api/materials', sheetOf(`${marker} varnish`))
  const mix = await made(owner, '/api/mixes', { name: `${marker} mix`, basis: 'volume', parts: [{ materialId: own.id, parts: 2, private: true }, { materialId: material.id, parts: 1, private: false }] })
  const file = await owner.upload<{ id: number }>(`/api/attachments/data-sheets/${own.id}?name=${marker}.pdf`, new TextEncoder().encode(`%PDF-1.7 ${marker}`))
  if (file.status !== 200) throw new Error(`The data sheet was answered with ${file.status}: ${JSON.stringify(file.body)}`)
  const calls = writeCalls(databaseFile, room.id, seen.body.actId, piece)
  const planned = await owner.post<{ batchId: number }>('/api/batches', { clientKey: 'access-planned-batch', name: `${marker} bowls`, scheduleId: schedule.id, pieces: [`${marker} bowl`], placeId: place.id, order: null, startsAt: now() })
  const pinned = writePin(databaseFile, planned.body.batchId)
  const last = (path: string) => path.split('/').at(-1) ?? ''
  return { room: room.id, place: place.id, closure: closure.id, invitation: invitation.invitation.id, member: helper.id, wallLink: wall.id, benchTablet: tablet.id, piece, photo, act: seen.body.actId, schedule: schedule.id, reading: reading.id, readingImport: imported.body.importId, subscription: subscription.id, material: material.id, ownMaterial: own.id, mix: mix.id, sheetFile: file.body.id, carrier: carrier.id, tagCode: carriers.body[0]?.code ?? '', rule: rule.id, statement: statement.id, batch: batch.body.batchId, ...calls, ...pinned, invitationToken: last(invitation.path), calendarToken: last(calendar.body.path), wallToken: last(wall.path) }
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
