import { existsSync } from 'node:fs'
import { ConfigError, readConfig } from '~~/server/utils/config'
import type { Config } from '~~/server/utils/config'

/** What cannot be done, as one sentence for whoever looks after the server. */
export class Refused extends Error {}

/** The server's own settings, from the environment and from .env. Commands need no session secret. */
export function readSettings(): Config {
  if (existsSync('.env')) process.loadEnvFile('.env')
  return readConfig({ ...process.env, STILLWET_SESSION_SECRET: process.env.STILLWET_SESSION_SECRET || 'commands open no session, so none is needed' })
}

/** Runs a command: its line on success and 0, or one sentence and 2. */
export async function runUpkeep(work: () => string | Promise<string>): Promise<void> {
  try {
    console.log(await work())
  }
  catch (error) {
    if (!(error instanceof Refused || error instanceof ConfigError)) throw error
    console.error(error.message)
    process.exitCode = 2
  }
}
