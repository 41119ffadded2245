import { existsSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { isOpen } from './archive'
import { Refused } from './settings'
import { studio } from '~~/db/schema'
import { findDemo, seedDemo } from '~~/db/seed/demo'
import { deleteDemo } from '~~/server/services/demo-studio'
import type { Config } from '~~/server/utils/config'
import { prepareDatabase } from '~~/server/utils/database'
import type { Database } from '~~/server/utils/database'

type Settings = Pick<Config, 'databaseFile' | 'backupFolder' | 'storageFolder' | 'production'>

/** The database, brought up to date as a start would, while no server has it; what `work` does is all that happens to it. */
async function alone<T>({ databaseFile, backupFolder }: Settings, now: number, work: (db: Database) => T | Promise<T>): Promise<T> {
  if (existsSync(databaseFile) && isOpen(databaseFile)) throw new Refused('The server is running. Stop it first.')
  const db = prepareDatabase(databaseFile, 'db/migrations', backupFolder, now)
  try {
    return await work(db)
  }
  finally {
    db.$client.close()
  }
}

/**
 * Adds the demo studio beside whatever there is.
 * @param now ms UTC: the demo is in the middle of this week
 * @returns a line saying what was done
 */
export function addDemo(settings: Settings, now: number): Promise<string> {
  if (settings.production) throw new Refused('STILLWET_PRODUCTION=1 refuses the demo studio and its sign-ins.')
  return alone(settings, now, async (db) => {
    if (findDemo(db) !== null) throw new Refused('The demo studio is there already.')
    const { signIns } = await seedDemo(db, now)
    return ['The demo studio is added. Sign in as', ...signIns.map(one => `  ${one.email}   ${one.password}`)].join('\n')
  })
}

/** Removes the demo studio whole, with its people. Nothing of any other studio is touched. */
export function removeDemo(settings: Settings, now: number): Promise<string> {
  return alone(settings, now, (db) => {
    const found = findDemo(db)
    if (found === null) throw new Refused('There is no demo studio.')
    deleteDemo(db, found)
    rmSync(join(settings.storageFolder, String(found)), { recursive: true, force: true })
    const left = db.select({ id: studio.id }).from(studio).limit(1).all().length
    return `The demo studio is removed.${left === 0 ? ' No studio is left: set STILLWET_DEMO=0, or the next start makes it again.' : ''}`
  })
}
