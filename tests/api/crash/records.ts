import Sqlite from 'better-sqlite3'

/** What stands in the database of a server that was killed or still runs. Each call opens it for itself. */
export function records(file: string) {
  function use<T>(work: (db: Sqlite.Database) => T): T {
    const db = new Sqlite(file)
    try {
      return work(db)
    }
    finally {
      db.close()
    }
  }
  const column = <T>(sql: string, ...values: unknown[]) => use(db => db.prepare(sql).pluck().all(...values) as T[])

  return {
    column,
    rows: <T>(sql: string) => use(db => db.prepare(sql).all() as T[]),
    run: (sql: string) => use(db => db.exec(sql)),
    integrity: () => use(db => db.pragma('integrity_check', { simple: true })),
    leaveRags: (name: string) => use(db => leaveRags(db, name)),
    /** What was planned for the next half day should have begun while the server was down, and nobody has said that it did. */
    passPlannedStarts: () => use(db => db.prepare('update plan_entry set due_at = ? where due_at between ? and ?').run(Date.now() - 60_000, Date.now() - 60_000, Date.now() + 12 * 60 * 60_000)),
    /** Calls that are due and not made, and sendings nobody knows the end of. */
    unfinished: () => column<number>(`
      select (select count(*) from reminder where status = 'claimed' or (status = 'due' and due_at <= ?))
        + (select count(*) from delivery where status in ('queued', 'sending'))`, Date.now())[0] ?? 0,
  }
}

export type Records = ReturnType<typeof records>

/** Oil went on 31 minutes ago in a room of its own, while the server was down: one fire call that is due. */
function leaveRags(db: Sqlite.Database, name: string): number {
  const at = Date.now() - 31 * 60_000
  const room = db.prepare('insert into room (studio_id, name, heated, night_drop_c) values (1, ?, 1, 3)').run(name).lastInsertRowid
  const act = db.prepare('insert into act (studio_id, client_key, kind, done_at, told_at, actor, body) values (1, ?, \'coat on\', ?, ?, \'bench\', \'{}\')').run(name, at, at).lastInsertRowid
  return Number(db.prepare('insert into rag_duty (studio_id, room_id, last_oil_at, last_oil_act_id) values (1, ?, ?, ?)').run(room, at, act).lastInsertRowid)
}

/** A sending on record, with what it is for. `endpoint` as the receivers name it. */
export interface Sending { id: string, kind: string, subject: number, group: string, stage: string, repeat: number, endpoint: string, status: string, problem: string | null }

/** Every sending, and the last moment of each batch's call, as the database has them. */
export const sendings = (kept: Records) => kept.rows<Sending>(`
  select d.stable_id as id, c.kind, c.subject_id as subject, c.group_key as "group", r.stage, r.repeat, d.status, d.problem,
    case d.channel when 'mail' then 'mail' else (select substr(s.endpoint, instr(substr(s.endpoint, 9), '/') + 8) from subscription s where s.id = d.endpoint_id) end as endpoint
  from delivery d join reminder r on r.id = d.reminder_id join cause c on c.id = r.cause_id order by d.id`)
