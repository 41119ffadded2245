import { createHash, randomUUID } from 'node:crypto'
import { mkdir, open, readFile, rename, rm } from 'node:fs/promises'
import { join } from 'node:path'
import { malformed } from '~~/server/utils/errors'
import type { Refusal } from '~~/server/utils/errors'
import { sniffType } from '#shared/file-types'
import type { FileType } from '#shared/file-types'
import { fileRefusals } from '#shared/words/files'

/** A file in the storage folder: its name there is the SHA-256 of what is in it, so that one file kept twice lies there once. */
export interface KeptFile { sha256: string, bytes: number }

const isName = (sha256: string) => /^[0-9a-f]{64}$/.test(sha256)

/** Each studio's files lie in a folder of its own: what one has kept says nothing to another, and a studio goes whole. */
function pathOf(folder: string, studioId: number, sha256: string): string {
  if (!isName(sha256)) throw new Error('A kept file is named by 64 hexadecimal digits.')
  return join(folder, String(studioId), sha256)
}

/** Looks at what a file begins with, whatever it is called. @param field the field of the form that the refusal names */
export function checkType(data: Uint8Array, wanted: readonly FileType[], field = 'file'): FileType | Refusal {
  const refuse = (message: string) => malformed({ [field]: message }, message)
  if (data.length === 0) return refuse(fileRefusals.empty)
  const found = sniffType(data)
  if (found === null) return refuse(fileRefusals.unknownType(wanted))
  if (wanted.includes(found)) return found
  return refuse(found === 'image/heic' ? fileRefusals.heic(wanted) : fileRefusals.otherType(found, wanted))
}

/**
 * Keeps a file under a studio. It is written beside its place and renamed, so that a file with a name is whole; a crash leaves at most a
 * stray part. Keep the file first and its row after: a row without a file is worse than a file without a row.
 * @param folder the installation's storage folder
 */
export async function keepFile(folder: string, studioId: number, data: Uint8Array): Promise<KeptFile> {
  const sha256 = createHash('sha256').update(data).digest('hex')
  const path = pathOf(folder, studioId, sha256)
  await mkdir(join(folder, String(studioId)), { recursive: true })
  const part = `${path}.${randomUUID().slice(0, 8)}.part`
  const file = await open(part, 'w', 0o600)
  try {
    await file.writeFile(data)
    await file.sync()
  }
  finally {
    await file.close()
  }
  await rename(part, path)
  return { sha256, bytes: data.length }
}

/** What is in a kept file, or null when it is not there or no longer what it was. */
export async function readKept(folder: string, studioId: number, sha256: string): Promise<Buffer | null> {
  const data = await readFile(pathOf(folder, studioId, sha256)).catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return null
    throw error
  })
  return data && createHash('sha256').update(data).digest('hex') === sha256 ? data : null
}

/** Takes a kept file away. One that is gone already is no error. Ask first whether another row still names it. */
export async function deleteKept(folder: string, studioId: number, sha256: string): Promise<void> {
  await rm(pathOf(folder, studioId, sha256), { force: true })
}
