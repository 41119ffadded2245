/** The content coding of RFC 8188 that web-push sends with. It brings no types of its own. */
declare module 'http_ece' {
  import type { ECDH } from 'node:crypto'

  interface Parameters { version: 'aes128gcm', privateKey: ECDH, authSecret: string, dh?: string, salt?: string }
  const ece: {
    encrypt: (text: Buffer, parameters: Parameters) => Buffer
    decrypt: (message: Buffer, parameters: Parameters) => Buffer
  }
  export default ece
}
