import { eq } from 'drizzle-orm'
import { member, person } from '~~/db/schema'
import type { Database, Transaction } from '~~/server/utils/database'
import { scoped } from '~~/server/utils/scoped'

/** What the members of a studio are called, those who have left too: history names them. */
export function memberNames(db: Database | Transaction, studioId: number): Map<number, string> {
  const rows = db.select({ id: member.id, name: person.name }).from(member).innerJoin(person, eq(person.id, member.personId)).where(scoped(member, studioId)).all()
  return new Map(rows.map(row => [row.id, row.name]))
}
