let booted: Promise<void> | undefined

/** Remembers the boot, so that what must not run before it can wait on it. */
export function finishBoot(work: Promise<void>): Promise<void> {
  booted = work
  return work
}

/** Resolves once the database is open and up to date. For plugins with a higher number: the minute tick, the planner. */
export async function whenReady(): Promise<void> {
  if (!booted) throw new Error('The boot has not begun: only plugins after 10.database may wait on it.')
  await booted
}
