import { connect, createServer } from 'node:net'
import type { AddressInfo, Socket } from 'node:net'

/** Something between page and studio that can let its connections die without a word, as a sleeping access point does. */
export interface Proxy {
  origin: string
  /** Nothing passes any more on the connections that are open now; they are not ended. New ones work. */
  freeze: () => void
  stop: () => Promise<void>
}

export async function startProxy(target: string): Promise<Proxy> {
  const { hostname, port } = new URL(target)
  const open = new Set<Socket>()
  const server = createServer((near) => {
    const far = connect(Number(port), hostname)
    for (const [from, to] of [[near, far], [far, near]] as const) {
      open.add(from)
      from.on('error', () => from.destroy())
      from.on('close', () => {
        open.delete(from)
        to.end()
      })
      from.pipe(to)
    }
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const { port: own } = server.address() as AddressInfo
  return {
    origin: `http://127.0.0.1:${own}`,
    freeze: () => {
      for (const socket of open) socket.unpipe().pause()
    },
    stop: () => new Promise((resolve) => {
      for (const socket of open) socket.destroy()
      server.close(() => resolve())
    }),
  }
}
