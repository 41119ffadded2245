import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { useStorage } from 'nitropack/runtime'

/** Lends the bundled migrations as a folder, which is what the migrator reads, and takes it away afterwards. */
export async function withMigrations<T>(use: (folder: string) => T): Promise<T> {
  const storage = useStorage('assets:migrations')
  const folder = mkdtempSync(join(tmpdir(), 'stillwet-migrations-'))
  try {
    for (const key of await storage.getKeys()) {
      const file = join(folder, key.replaceAll(':', '/'))
      mkdirSync(dirname(file), { recursive: true })
      const content: unknown = await storage.getItemRaw(key)
      writeFileSync(file, typeof content === 'string' || content instanceof Uint8Array ? content : JSON.stringify(content))
    }
    return use(folder)
  }
  finally {
    rmSync(folder, { recursive: true })
  }
}
