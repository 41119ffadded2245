import { zoneClock } from '#shared/air/zone'
import { decodeText } from '#shared/logger-file/decode'
import { guessDelimiter } from '#shared/logger-file/delimiter'
import { guessPlan } from '#shared/logger-file/guess'
import { fileReader, oldestReach } from '#shared/logger-file/read'
import type { FileReader } from '#shared/logger-file/read'
import { mostReadings } from '#shared/logger-file/types'
import type { Delimiter, FileGuess, FilePlan, FileReading } from '#shared/logger-file/types'
import type { ImportAnswer, ReadingImportRequest } from '#shared/schemas/reading-import'
import type { Units } from '#shared/units'
import { loggerWords } from '#shared/words/logger-file'

const largestFile = 20_000_000
const dayMs = 86_400_000

/** The text of a file, or why there is none. */
async function textOf(file: File): Promise<{ text: string } | { problem: string }> {
  if (file.size > largestFile) return { problem: loggerWords.tooLarge }
  const decoded = await file.arrayBuffer().then(bytes => decodeText(new Uint8Array(bytes)), () => undefined)
  if (decoded === undefined) return { problem: loggerWords.unreadable }
  if (decoded === null) return { problem: loggerWords.notText }
  return decoded.trim() === '' ? { problem: loggerWords.empty } : { text: decoded }
}

/** @param still whether the answer is wanted yet */
async function readRows(rows: readonly string[][], plan: FilePlan, zone: string, still: () => boolean, onShare: (share: number) => void): Promise<FileReader> {
  const now = Date.now()
  const reader = fileReader(plan, zoneClock(zone, now - oldestReach - dayMs, now + 2 * dayMs), now)
  await inPieces(rows, (piece) => {
    reader.take(piece)
    return still() && reader.readings.length <= mostReadings
  }, onShare)
  return reader
}

/** Sends all readings of a file as one body. Throws as `callApi` does. */
export function sendReadings(roomId: number, fileName: string, readings: readonly FileReading[], clientKey: string): Promise<ImportAnswer> {
  const body: ReadingImportRequest = { clientKey, fileName: fileName.slice(0, 200), times: readings.map(({ at }) => at), temps: readings.map(({ tempC }) => tempC), humidities: readings.map(({ rh }) => rh) }
  const path: string = `/api/rooms/${roomId}/imports`
  return callApi<ImportAnswer>(path, { method: 'POST', body })
}

/** What is known of a chosen file: how it is read, and what that gives. `share` 0..1 while it is being read, else null. */
export interface LoggerFile { name: string, problem: string | null, share: number | null, rows: readonly string[][], guess: FileGuess | null, plan: FilePlan | null, delimiter: Delimiter, result: FileReader | null }

const noFile: LoggerFile = { name: '', problem: null, share: null, rows: [], guess: null, plan: null, delimiter: ',', result: null }

/**
 * A logger's file from the choosing to the sending. Whatever changes in how it is read reads it anew; an older reading's answer that
 * comes late is dropped.
 */
export function useLoggerFile(zone: () => string, units: () => Units) {
  const file = shallowRef<LoggerFile>(noFile)
  let text = ''
  let round = 0
  const set = (part: Partial<LoggerFile>) => { file.value = { ...file.value, ...part } }
  const fail = (problem: string) => set({ problem, share: null })

  async function read(plan: FilePlan) {
    const mine = ++round
    set({ plan, problem: null, result: null, share: 0.5 })
    const reader = await readRows(file.value.rows, plan, zone(), () => mine === round, done => mine === round && set({ share: 0.5 + done / 2 }))
    if (mine !== round) return
    if (reader.readings.length > mostReadings) fail(loggerWords.tooMany)
    else set({ result: reader, share: null })
  }

  async function splitBy(delimiter: Delimiter) {
    const mine = ++round
    set({ delimiter, share: 0, result: null, problem: null })
    const rows = await splitRows(text, delimiter, done => mine === round && set({ share: done / 2 })).catch(() => null)
    if (mine !== round) return
    if (rows === null) return fail(loggerWords.unreadable)
    const guess = guessPlan(rows, units())
    set({ rows, guess })
    await read(guess.plan)
  }

  async function choose(chosen: File) {
    const mine = ++round
    file.value = { ...noFile, name: chosen.name, share: 0 }
    const found = await textOf(chosen)
    if (mine !== round) return
    if ('problem' in found) return fail(found.problem)
    text = found.text
    await splitBy(guessDelimiter(text.slice(0, 100_000)))
  }

  /** Changes how the file is read. */
  const change = async (part: Partial<FilePlan>) => { if (file.value.plan) await read({ ...file.value.plan, ...part }) }

  function clear() {
    round += 1
    text = ''
    file.value = noFile
  }

  return { file, choose, change, splitBy, clear }
}
